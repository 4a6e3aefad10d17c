import { useStore } from "zustand";
import type { Part } from "../../shared-types/setup";
import { trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { texts } from "../texts/texts";

const words = texts.layOut.part;

/** What the field says of a conductor: where it floats, or what it carries. */
export function PartReading({ planning, part }: { readonly planning: Planning; readonly part: Part }) {
  const plan = useStore(planning, (state) => (state.refusal === null ? state.plan : null));
  if (part.role === "insulator") return null;
  const reading = plan?.conductors.find(({ id, role }) => id === part.id && role === part.role);
  const [name, value] =
    part.role === "floating"
      ? [words.floatsAt, reading === undefined ? "–" : Number.isNaN(reading.volts) ? words.undetermined : `${trimmed(reading.volts, 4)} V`]
      : [words.currentOut, reading === undefined ? "–" : `${trimmed(reading.currentA * 1000, 4)} mA`];
  return (
    <dl className="readouts">
      <div>
        <dt>{name}</dt>
        <dd>{value}</dd>
      </div>
    </dl>
  );
}

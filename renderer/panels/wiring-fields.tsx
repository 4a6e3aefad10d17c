import type { Part, PartRole, Setup } from "../../shared-types/setup";
import { setHeight, setMaterial, setRole, setTap } from "../document/commands/parts";
import type { Document } from "../document/document";
import { texts } from "../texts/texts";
import { tried } from "./field-surroundings";
import { ChoiceField, choicesOf } from "./fields";
import { NumberField } from "./number-field";

const words = texts.layOut.part;
const MIXED = "";

/** @returns what all have in common, or undefined where they differ. */
function common<Item, Value>(items: readonly Item[], of: (item: Item) => Value): Value | undefined {
  const first = of(items[0]);
  return items.every((item) => of(item) === first) ? first : undefined;
}

const mixed = texts.layOut.many.mixed;

/** Role, lead, material and height of one part or of several at once. */
export function RoleFields({
  document,
  setup,
  parts,
}: {
  readonly document: Document;
  readonly setup: Setup;
  readonly parts: readonly Part[];
}) {
  const ids = parts.map(({ id }) => id);
  const { volts } = setup.supply;
  const role = common(parts, (part) => part.role);
  const material = common(parts, (part) => part.material);
  const heightMm = common(parts, (part) => part.heightMm);
  const taps = parts.flatMap((part) => (part.role === "electrode" ? [part.tap] : []));
  const tap = taps.length === 0 ? undefined : common(taps, (one) => one);
  const roles: readonly (readonly [PartRole | typeof MIXED, string])[] = choicesOf(words.roles);
  const materials: readonly (readonly [string, string])[] = choicesOf(words.materials);
  return (
    <>
      <ChoiceField
        label={words.role}
        value={role ?? MIXED}
        choices={role === undefined ? [[MIXED, mixed], ...roles] : roles}
        onSet={(next) => next !== MIXED && document.run(setRole(setup, ids, next))}
      />
      {role === "electrode" && (
        <fieldset className="field leads">
          <legend>{words.lead}</legend>
          <div>
            {(
              [
                [0, words.common],
                [1, words.live],
              ] as const
            ).map(([lead, text]) => (
              <button key={text} type="button" aria-pressed={tap === lead} onClick={() => document.run(setTap(setup, ids, lead))}>
                {text}
              </button>
            ))}
          </div>
        </fieldset>
      )}
      {tap !== undefined && role === "electrode" && (
        <NumberField
          label={words.potential}
          unit="V"
          value={Number((tap * volts).toFixed(6))}
          step={0.5}
          onSet={(potential, stepping) => tried(document, setTap(setup, ids, potential / volts), stepping)}
        />
      )}
      <ChoiceField
        label={words.material}
        value={material ?? MIXED}
        choices={material === undefined ? [[MIXED, mixed], ...materials] : materials}
        onSet={(next) => next !== MIXED && document.run(setMaterial(setup, ids, next))}
      />
      {heightMm !== undefined && (
        <NumberField
          label={words.heightMm}
          unit="mm"
          value={heightMm}
          step={1}
          {...(parts.length === 1 ? { setting: `parts[${setup.parts.indexOf(parts[0])}].heightMm` } : {})}
          onSet={(next, stepping) => tried(document, setHeight(setup, ids, next), stepping)}
        />
      )}
    </>
  );
}

import { memo } from "react";
import { useStore } from "zustand";
import type { Document } from "../document/document";
import { isPart, type Thing, thingName, thingsOf } from "../document/edit";
import { toggled } from "../document/holding";
import { trimmed } from "../document/number-text";
import { texts } from "../texts/texts";
import { Icon } from "./icons";
import { PartPicture } from "./part-picture";

const words = texts.layOut.parts;

/** What a part is to the field, in a word: its sign and volts, or that it floats or insulates. */
function standing(thing: Thing, volts: number): string {
  if (!isPart(thing)) return words.slab;
  if (thing.role === "floating") return words.floats;
  if (thing.role === "insulator") return words.insulates;
  const sign = thing.tap === 0 ? "− " : thing.tap === 1 ? "+ " : "";
  return `${sign}${trimmed(thing.tap * volts, 3)} V`;
}

const Row = memo(function Row(props: {
  readonly thing: Thing;
  readonly volts: number;
  readonly selected: boolean;
  readonly onSelect: (id: string, adding: boolean) => void;
}) {
  const { thing, volts, selected, onSelect } = props;
  const kind = isPart(thing) ? thing.role : "slab";
  return (
    <li>
      <button
        type="button"
        className={`in-tray in-tray-${kind}${thing.locked === true || thing.group !== undefined ? " in-tray-held" : ""}`}
        aria-pressed={selected}
        onClick={(event) => onSelect(thing.id, event.shiftKey || event.ctrlKey || event.metaKey)}
      >
        <PartPicture shape={thing.shape} turnDeg={thing.turnDeg} sizePx={22} plate={kind === "slab"} hollow={kind === "insulator"} />
        <span className="in-tray-name">{thingName(thing)}</span>
        <span className="in-tray-standing">
          {standing(thing, volts)}
          {thing.group !== undefined && <span title={words.groupLong(thing.group)}> {words.group(thing.group)}</span>}
          {thing.locked === true && <Icon name="lock" />}
        </span>
      </button>
    </li>
  );
});

/** What lies in the tray, one a line; it shares the selection with the tray. */
export function PartsInTray({ document, none }: { readonly document: Document; readonly none: string }) {
  const setup = useStore(document, (state) => state.setup);
  const selection = useStore(document, (state) => state.selection);
  const things = thingsOf(setup);
  return (
    <section className="parts-in-tray" aria-label={words.title}>
      <h2>
        {words.title} <span className="count">{things.length > 0 && things.length}</span>
      </h2>
      {things.length === 0 ? (
        <p className="hint">{none}</p>
      ) : (
        <ul>
          {things.map((thing) => (
            <Row
              key={thing.id}
              thing={thing}
              volts={setup.supply.volts}
              selected={selection.includes(thing.id)}
              onSelect={(id, adding) => {
                const chosen = document.getState().selection;
                document.select(adding ? toggled(document.getState().setup, chosen, id) : [id]);
              }}
            />
          ))}
        </ul>
      )}
    </section>
  );
}

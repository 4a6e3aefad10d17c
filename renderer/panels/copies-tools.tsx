import { useState } from "react";
import { copyAlongRow, copyAroundCentre, rowStepMm } from "../document/commands/copies";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { texts } from "../texts/texts";
import { tried } from "./field-surroundings";
import { boxOf, type ToolsProps } from "./many-tools";
import { NumberField } from "./number-field";

const words = texts.layOut.many;
const CLEAR_MM = 10;
const MOST_COPIES = 64;

/** Copies of the selection: in a row, or round a centre. Folded away until it is wanted. */
export function CopiesTools({ document, setup, ids }: ToolsProps) {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const [count, setCount] = useState(3);
  const [by, setBy] = useState<readonly [number, number]>(() => [Math.round(rowStepMm(setup, ids, CLEAR_MM, boxOf)), 0]);
  const [centre, setCentre] = useState<readonly [number, number]>([lengthMm / 2, widthMm / 2]);
  const pair = (labels: readonly [string, string], value: readonly [number, number], set: (value: readonly [number, number]) => void) =>
    labels.map((label, index) => (
      <NumberField
        key={label}
        label={label}
        unit="mm"
        value={value[index]}
        step={1}
        onSet={(next) => {
          set(index === 0 ? [next, value[1]] : [value[0], next]);
          return [];
        }}
      />
    ));
  return (
    <details className="more">
      <summary>{words.copies}</summary>
      <NumberField
        label={words.count}
        unit=""
        value={count}
        step={1}
        onSet={(next) => {
          setCount(Math.min(MOST_COPIES, Math.max(2, Math.round(next))));
          return [];
        }}
      />
      <h3>{words.row}</h3>
      <div className="grid-2">{pair([words.byX, words.byY], by, setBy)}</div>
      <button type="button" onClick={() => tried(document, copyAlongRow(setup, ids, count, by[0], by[1]))}>
        {words.makeRow}
      </button>
      <h3>{words.ring}</h3>
      <div className="grid-2">{pair([words.centreX, words.centreY], centre, setCentre)}</div>
      <button type="button" onClick={() => tried(document, copyAroundCentre(setup, ids, count, centre))}>
        {words.makeRing}
      </button>
    </details>
  );
}

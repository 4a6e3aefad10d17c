import { type FormEvent, useId, useState } from "react";
import type { Plan } from "../../../shared-types/plan";
import type { JudgedRun } from "../../../shared-types/readings";
import { fixed, trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import { ChoiceField } from "../fields";
import { IconButton } from "../icon-button";
import { LENGTHS_IN_MM, readNumber } from "../read-number";

const words = texts.readings.found;

export interface FoundCardProps {
  readonly plan: Plan;
  readonly judged: JudgedRun | null;
  readonly onAdd: (volts: number, xMm: number, yMm: number) => void;
  readonly onRemove: (index: number) => void;
  readonly onExport: () => void;
}

/** Places at which a class found a potential, and how far off the predicted line they are. */
export function FoundCard({ plan, judged, onAdd, onRemove, onExport }: FoundCardProps) {
  const levels = plan.probing.levels.map(({ volts }): [string, string] => [String(volts), texts.readings.volts(trimmed(volts, 3))]);
  const [chosen, setChosen] = useState<string | null>(null);
  const [place, setPlace] = useState({ x: "", y: "" });
  const [refused, setRefused] = useState(false);
  const ids = { x: useId(), y: useId() };
  const level = levels.some(([value]) => value === chosen) ? (chosen ?? "") : (levels[Math.floor(levels.length / 2)]?.[0] ?? "");
  function add(event: FormEvent<HTMLFormElement>): void {
    event.preventDefault();
    const [x, y] = [readNumber(place.x, LENGTHS_IN_MM), readNumber(place.y, LENGTHS_IN_MM)];
    setRefused(x === null || y === null || level === "");
    if (x === null || y === null || level === "") return;
    onAdd(Number(level), x, y);
    setPlace({ x: "", y: "" });
    event.currentTarget.querySelector<HTMLInputElement>("input")?.focus();
  }
  const places = judged?.places ?? [];
  return (
    <section className="card points readings-found" aria-label={words.title}>
      <header className="card-head">
        <h2>{words.title}</h2>
        <button type="button" disabled={places.length === 0} onClick={onExport}>
          {words.export}
        </button>
      </header>
      <p className="hint">{words.hint}</p>
      <form onSubmit={add}>
        <ChoiceField<string> label={words.level} value={level} choices={levels} onSet={setChosen} />
        {(["x", "y"] as const).map((axis) => (
          <div className="field" key={axis}>
            <label htmlFor={ids[axis]}>{words[axis]}</label>
            <span className="field-box">
              <input
                id={ids[axis]}
                inputMode="decimal"
                autoComplete="off"
                value={place[axis]}
                onChange={(event) => setPlace({ ...place, [axis]: event.target.value })}
              />
              <span className="field-unit">mm</span>
            </span>
          </div>
        ))}
        <button type="submit">{words.add}</button>
        {refused && (
          <p className="field-refusal" role="alert">
            {words.needsNumbers}
          </p>
        )}
      </form>
      {places.length > 0 && (
        <table>
          <thead>
            <tr>
              {words.columns.map((column) => (
                <th key={column} scope="col">
                  {column}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {places.map(({ volts, xMm, yMm, distanceMm, bandMm, verdict }, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: the same place may be found twice; rows carry no state.
              <tr key={index} className={verdict === null ? undefined : `reading-${verdict}`}>
                <td>{trimmed(volts, 3)}</td>
                <td>{trimmed(xMm, 1)}</td>
                <td>{trimmed(yMm, 1)}</td>
                <td>{distanceMm === null ? words.noLine : `${distanceMm > 0 ? "+" : ""}${fixed(distanceMm, 1)}`}</td>
                <td>{bandMm === null ? "" : fixed(bandMm, 1)}</td>
                <td className="sign-and-remove">
                  {verdict !== null && <span aria-hidden="true">{texts.readings.signs[verdict]}</span>}
                  {verdict !== null && <span className="unseen">{texts.readings.verdict.words[verdict]}</span>}
                  <IconButton
                    icon="remove"
                    name={words.remove(trimmed(volts, 3), trimmed(xMm, 1), trimmed(yMm, 1))}
                    onPress={() => onRemove(index)}
                  />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </section>
  );
}

import { type KeyboardEvent, useContext, useId, useState } from "react";
import type { Problem } from "../../shared-types/result";
import { texts } from "../texts/texts";
import { FieldContext, mmPer } from "./field-surroundings";
import { readNumber, unitsFor } from "./read-number";

export interface NumberFieldProps {
  readonly label: string;
  /** The unit of `value`. Lengths (mm) are shown in the unit that the user chose. */
  readonly unit: string;
  readonly value: number;
  /** What one press of an arrow key changes; Shift makes it ten times that. */
  readonly step: number;
  /** Takes a new number, in `unit`; `stepping` while a key is held. @returns why it was refused, empty when it was taken. */
  readonly onSet: (value: number, stepping: boolean) => readonly Problem[];
  /** Dotted path in the setup, by which a finding finds its field. */
  readonly setting?: string;
  /** The label is heard but not seen: the field stands in a table. */
  readonly bare?: boolean;
}

const shownNumber = (value: number): string => String(Number(value.toFixed(6)));

/** A number of the setup: taken on Enter or on leaving, stepped by the arrow keys, put back by Escape; a refusal stands below it in words. */
export function NumberField({ label, unit, value, step, onSet, setting, bare = false }: NumberFieldProps) {
  const id = useId();
  const { lengthUnit, onStepsEnd } = useContext(FieldContext);
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const factor = unit === "mm" ? mmPer(lengthUnit) : 1;
  const read = (text: string): number | null => readNumber(text, unitsFor(unit), factor);

  function give(next: number | null, stepping: boolean): void {
    const problems = next === null ? [{ where: "", message: texts.layOut.fields.noNumber(typed ?? "") }] : onSet(next, stepping);
    setRefusal(problems.length === 0 ? null : problems[0].message);
    if (problems.length === 0) setTyped(null);
  }
  function take(): void {
    if (typed === null) return;
    if (typed.trim() === "") restore();
    else give(read(typed), false);
  }
  function restore(): void {
    setTyped(null);
    setRefusal(null);
  }
  function turn(by: number): void {
    const from = typed === null ? value : (read(typed) ?? value);
    give(Number((from + by * step).toPrecision(10)), true);
  }
  function onKeyDown(event: KeyboardEvent<HTMLInputElement>): void {
    const direction = { ArrowUp: 1, ArrowDown: -1 }[event.key];
    if (event.key === "Enter") take();
    else if (event.key === "Escape") restore();
    else if (direction !== undefined) {
      event.preventDefault();
      turn(direction * (event.shiftKey ? 10 : 1));
    } else return;
    event.stopPropagation();
  }
  return (
    <div className={bare ? "field field-bare" : "field"}>
      {!bare && <label htmlFor={id}>{label}</label>}
      <span className="field-box">
        <input
          id={id}
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          value={typed ?? shownNumber(value / factor)}
          data-setting={setting}
          data-clean={typed === null}
          aria-label={bare ? label : undefined}
          aria-invalid={refusal !== null}
          aria-describedby={refusal === null ? undefined : `${id}-refusal`}
          onChange={(event) => setTyped(event.target.value)}
          onFocus={(event) => event.target.select()}
          onBlur={() => {
            take();
            onStepsEnd();
          }}
          onKeyDown={onKeyDown}
          onKeyUp={(event) => event.key.startsWith("Arrow") && onStepsEnd()}
        />
        <span className="field-unit">{unit === "mm" ? lengthUnit : unit}</span>
        <span className="field-steps" aria-hidden="true">
          {([1, -1] as const).map((by) => (
            <button
              key={by}
              type="button"
              tabIndex={-1}
              title={by === 1 ? texts.layOut.fields.more : texts.layOut.fields.less}
              onPointerDown={(event) => event.preventDefault()}
              onClick={(event) => {
                turn(by * (event.shiftKey ? 10 : 1));
                onStepsEnd();
              }}
            >
              <svg viewBox="0 0 8 5" width="8" height="5" aria-hidden="true">
                <path d={by === 1 ? "M0.5 4.5 4 1l3.5 3.5" : "M0.5 0.5 4 4l3.5-3.5"} />
              </svg>
            </button>
          ))}
        </span>
      </span>
      {refusal !== null && (
        <p className="field-refusal" id={`${id}-refusal`} role="alert">
          {refusal}
        </p>
      )}
    </div>
  );
}

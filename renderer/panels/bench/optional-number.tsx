import { type KeyboardEvent, useId, useState } from "react";
import type { Problem } from "../../../shared-types/result";
import { texts } from "../../texts/texts";
import { readNumber, unitsFor } from "../read-number";

export interface OptionalNumberProps {
  readonly label: string;
  readonly unit: string;
  /** Undefined: nothing is stated, and `absent` says what stands in for it. */
  readonly value: number | undefined;
  readonly absent: string;
  /** Dotted path in the setup, by which a finding finds its field. */
  readonly setting: string;
  /** Takes a new number, undefined where the field was emptied. @returns why it was refused, empty when it was taken. */
  readonly onSet: (value: number | undefined) => readonly Problem[];
}

/** A number that need not be stated: emptied, it goes back to what stands in for it. Taken on Enter or on leaving. */
export function OptionalNumber({ label, unit, value, absent, setting, onSet }: OptionalNumberProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);

  function restore(): void {
    setTyped(null);
    setRefusal(null);
  }
  function take(): void {
    if (typed === null) return;
    const next = typed.trim() === "" ? undefined : readNumber(typed, unitsFor(unit));
    const problems = next === null ? [{ where: setting, message: texts.bench.optional.noNumber(typed) }] : onSet(next);
    if (problems.length === 0) restore();
    else setRefusal(problems[0].message);
  }
  function onKeyDown(event: KeyboardEvent<HTMLInputElement>): void {
    if (event.key === "Enter") take();
    else if (event.key === "Escape") restore();
    else return;
    event.stopPropagation();
  }
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      <span className="field-box">
        <input
          id={id}
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          value={typed ?? (value === undefined ? "" : String(value))}
          placeholder={absent}
          data-setting={setting}
          aria-invalid={refusal !== null}
          aria-describedby={refusal === null ? undefined : `${id}-refusal`}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={take}
          onKeyDown={onKeyDown}
        />
        <span className="field-unit">{unit}</span>
      </span>
      {refusal !== null && (
        <p className="field-refusal" id={`${id}-refusal`} role="alert">
          {refusal}
        </p>
      )}
    </div>
  );
}

import { type KeyboardEvent, useId, useState } from "react";
import type { Problem } from "../../shared-types/result";
import { NO_UNITS, readNumber, type Units } from "./read-number";

export interface NumberFieldProps {
  readonly label: string;
  readonly unit: string;
  readonly value: number;
  /** What one press of an arrow key changes; Shift makes it ten times that. */
  readonly step: number;
  readonly units?: Units;
  /** Takes a new number. @returns why it was refused, empty when it was taken. */
  readonly onSet: (value: number) => readonly Problem[];
  /** Dotted path in the setup, by which a finding finds its field. */
  readonly setting?: string;
}

const shownNumber = (value: number): string => String(Number(value.toFixed(6)));

/** A number of the setup: taken on Enter or on leaving, stepped by the arrow keys, put back by Escape; a refusal stands below it in words. */
export function NumberField({ label, unit, value, step, units = NO_UNITS, onSet, setting }: NumberFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);

  function give(next: number | null): void {
    const problems =
      next === null ? [{ where: "", message: `“${typed ?? ""}” is no number; a number or a sum such as 300/2 is` }] : onSet(next);
    setRefusal(problems.length === 0 ? null : problems[0].message);
    if (problems.length === 0) setTyped(null);
  }
  function take(): void {
    if (typed === null) return;
    if (typed.trim() === "") restore();
    else give(readNumber(typed, units));
  }
  function restore(): void {
    setTyped(null);
    setRefusal(null);
  }
  function onKeyDown(event: KeyboardEvent<HTMLInputElement>): void {
    const turn = { ArrowUp: 1, ArrowDown: -1 }[event.key];
    if (event.key === "Enter") take();
    else if (event.key === "Escape") restore();
    else if (turn !== undefined) {
      event.preventDefault();
      const from = typed === null ? value : (readNumber(typed, units) ?? value);
      give(Number((from + turn * step * (event.shiftKey ? 10 : 1)).toPrecision(10)));
    } else return;
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
          value={typed ?? shownNumber(value)}
          data-setting={setting}
          aria-invalid={refusal !== null}
          aria-describedby={refusal === null ? undefined : `${id}-refusal`}
          onChange={(event) => setTyped(event.target.value)}
          onFocus={(event) => event.target.select()}
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

export interface TextFieldProps {
  readonly label: string;
  readonly value: string;
  readonly onSet: (value: string) => readonly Problem[];
}

/** A text of the setup, taken on Enter or on leaving. */
export function TextField({ label, value, onSet }: TextFieldProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  function take(): void {
    if (typed === null || typed === value) {
      setTyped(null);
      return;
    }
    const problems = onSet(typed);
    setRefusal(problems.length === 0 ? null : problems[0].message);
    if (problems.length === 0) setTyped(null);
  }
  return (
    <div className="field field-text">
      <label htmlFor={id}>{label}</label>
      <span className="field-box">
        <input
          id={id}
          autoComplete="off"
          spellCheck={false}
          value={typed ?? value}
          aria-invalid={refusal !== null}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={take}
          onKeyDown={(event) => {
            if (event.key === "Enter") take();
            else if (event.key === "Escape") setTyped(null);
            else return;
            event.stopPropagation();
          }}
        />
      </span>
      {refusal !== null && (
        <p className="field-refusal" role="alert">
          {refusal}
        </p>
      )}
    </div>
  );
}

export interface ChoiceFieldProps<Value extends string> {
  readonly label: string;
  readonly value: Value;
  readonly choices: readonly (readonly [value: Value, text: string])[];
  readonly onSet: (value: Value) => void;
  readonly setting?: string;
}

/** A choice from a short list; a value that the list does not know stays and is shown. */
export function ChoiceField<Value extends string>({ label, value, choices, onSet, setting }: ChoiceFieldProps<Value>) {
  const id = useId();
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      <select
        id={id}
        value={value}
        data-setting={setting}
        onChange={(event) => {
          const chosen = choices.find(([choice]) => choice === event.target.value);
          if (chosen !== undefined) onSet(chosen[0]);
        }}
      >
        {!choices.some(([choice]) => choice === value) && <option value={value}>{value}</option>}
        {choices.map(([choice, text]) => (
          <option key={choice} value={choice}>
            {text}
          </option>
        ))}
      </select>
    </div>
  );
}

export interface SwitchProps {
  readonly label: string;
  readonly on: boolean;
  readonly onSet: (on: boolean) => void;
  readonly setting?: string;
}

/** Something that is on or off. */
export function Switch({ label, on, onSet, setting }: SwitchProps) {
  return (
    <label className="switch">
      <input type="checkbox" checked={on} data-setting={setting} onChange={(event) => onSet(event.target.checked)} />
      <span>{label}</span>
    </label>
  );
}

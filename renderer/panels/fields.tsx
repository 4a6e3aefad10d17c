import { useId, useState } from "react";
import type { Problem } from "../../shared-types/result";

export interface TextFieldProps {
  readonly label: string;
  readonly value: string;
  /** So many lines of text; 1 where absent. */
  readonly lines?: number;
  readonly onSet: (value: string) => readonly Problem[];
}

/** A text of the setup, taken on Enter (where it is one line) or on leaving. */
export function TextField({ label, value, lines = 1, onSet }: TextFieldProps) {
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
  const common = {
    id,
    autoComplete: "off",
    value: typed ?? value,
    "data-clean": typed === null,
    "aria-invalid": refusal !== null,
    onBlur: take,
  };
  return (
    <div className="field field-text">
      <label htmlFor={id}>{label}</label>
      <span className="field-box">
        {lines === 1 ? (
          <input
            {...common}
            spellCheck={false}
            onChange={(event) => setTyped(event.target.value)}
            onKeyDown={(event) => {
              if (event.key === "Enter") take();
              else if (event.key === "Escape") setTyped(null);
              else return;
              event.stopPropagation();
            }}
          />
        ) : (
          <textarea {...common} rows={lines} onChange={(event) => setTyped(event.target.value)} />
        )}
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

/** @returns a catalogue's entries as the choices of a list. */
export const choicesOf = <Value extends string>(names: Readonly<Record<Value, string>>): readonly (readonly [Value, string])[] =>
  Object.entries(names) as [Value, string][];

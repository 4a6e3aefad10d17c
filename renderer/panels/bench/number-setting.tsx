import { type KeyboardEvent, useId, useState } from "react";
import type { Problem } from "../../../shared-types/result";

export interface NumberSettingProps {
  readonly label: string;
  readonly unit: string;
  /** Undefined: the key is absent, the placeholder says what stands in for it. */
  readonly value: number | undefined;
  readonly step: number;
  /** Dotted path in the setup, by which a finding finds its field. */
  readonly setting: string;
  readonly placeholder?: string;
  /** Takes a new number (undefined where an optional field was emptied). @returns why it was refused, empty when it was taken. */
  readonly onSet: (value: number | undefined) => readonly Problem[];
  readonly optional?: boolean;
}

/** Reads what people type, with either decimal sign. */
const read = (text: string): number => Number(text.trim().replace(",", "."));

/** A number of the setup: taken on Enter or on leaving, stepped by the arrow keys, put back by Escape; a refusal stands below it in words. */
export function NumberSetting({ label, unit, value, step, setting, placeholder, onSet, optional = false }: NumberSettingProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const shown = typed ?? (value === undefined ? "" : String(value));

  const give = (next: number | undefined): void => {
    const problems = next !== undefined && !Number.isFinite(next) ? [{ where: setting, message: `${label} takes a number` }] : onSet(next);
    setRefusal(problems.length === 0 ? null : problems[0].message);
    if (problems.length === 0) setTyped(null);
  };
  const take = (): void => {
    if (typed === null) return;
    if (typed.trim() === "") {
      if (optional) give(undefined);
      else {
        setTyped(null);
        setRefusal(null);
      }
    } else give(read(typed));
  };
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>): void => {
    const turn = { ArrowUp: 1, ArrowDown: -1 }[event.key];
    if (event.key === "Enter") take();
    else if (event.key === "Escape") {
      setTyped(null);
      setRefusal(null);
    } else if (turn !== undefined) {
      event.preventDefault();
      const from = typed === null ? (value ?? 0) : read(typed);
      give(Number((from + turn * step * (event.shiftKey ? 10 : 1)).toPrecision(9)));
    } else return;
    event.stopPropagation();
  };

  return (
    <div className="bench-setting">
      <label htmlFor={id}>{label}</label>
      <span className="bench-setting-box">
        <input
          id={id}
          inputMode="decimal"
          autoComplete="off"
          spellCheck={false}
          value={shown}
          placeholder={placeholder}
          data-setting={setting}
          aria-invalid={refusal !== null}
          aria-describedby={refusal === null ? undefined : `${id}-refusal`}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={take}
          onKeyDown={onKeyDown}
        />
        <span className="bench-unit">{unit}</span>
      </span>
      {refusal !== null && (
        <p className="bench-refusal" id={`${id}-refusal`} role="alert">
          {refusal}
        </p>
      )}
    </div>
  );
}

export interface ChoiceSettingProps {
  readonly label: string;
  readonly value: string;
  readonly setting: string;
  readonly choices: readonly (readonly [value: string, text: string])[];
  readonly onSet: (value: string) => void;
}

/** A word of the setup from a list; a word that the list does not know stays, and is shown. */
export function ChoiceSetting({ label, value, setting, choices, onSet }: ChoiceSettingProps) {
  const id = useId();
  const known = choices.some(([choice]) => choice === value);
  return (
    <div className="bench-setting">
      <label htmlFor={id}>{label}</label>
      <select id={id} value={value} data-setting={setting} onChange={(event) => onSet(event.target.value)}>
        {!known && <option value={value}>{value}</option>}
        {choices.map(([choice, text]) => (
          <option key={choice} value={choice}>
            {text}
          </option>
        ))}
      </select>
    </div>
  );
}

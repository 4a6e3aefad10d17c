import { type ClipboardEvent, type KeyboardEvent, memo, useEffect, useState } from "react";
import type { ProbePoint } from "../../../shared-types/plan";
import { type JudgedReading, MOST_READ_VOLTS } from "../../../shared-types/readings";
import { fixed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import { readNumber, unitsFor } from "../read-number";

const words = texts.readings.table;

export interface ReadingRowProps {
  readonly point: ProbePoint;
  /** Id of the run on show: what was typed for another one goes. */
  readonly run: string | null;
  readonly judged: JudgedReading | null;
  readonly decimals: number;
  /** Takes a reading, null to clear it. */
  readonly onRead: (point: ProbePoint, volts: number | null) => void;
  readonly onMark: (n: number | null) => void;
  /** Pasted text that is a table and not one number. */
  readonly onPaste: (text: string, point: ProbePoint) => void;
}

/** Puts the cursor into the reading so many rows further on; at the end it stays. */
function goTo(field: HTMLInputElement, rows: number): void {
  const fields = [...(field.closest("table")?.querySelectorAll<HTMLInputElement>("input") ?? [])];
  const next = fields[fields.indexOf(field) + rows];
  next?.focus();
  next?.select();
}

/** @returns the number as it was read, at least with the meter's decimals. */
const shownReading = (volts: number, decimals: number): string => {
  const text = fixed(volts, decimals);
  return Math.abs(volts - Number(volts.toFixed(decimals))) < 1e-9 ? text : String(volts);
};

/** One point and its reading: taken on Enter (which goes on to the next) or on leaving, put back by Escape. */
export const ReadingRow = memo(function ReadingRow({ point, run, judged, decimals, onRead, onMark, onPaste }: ReadingRowProps) {
  const { n } = point;
  const [typed, setTyped] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);

  // biome-ignore lint/correctness/useExhaustiveDependencies: it is the change of the run that counts.
  useEffect(() => {
    setTyped(null);
    setRefusal(null);
  }, [run]);

  /** @returns whether the text was taken. */
  function take(): boolean {
    if (typed === null) return true;
    const text = typed.trim();
    const volts = text === "" ? null : readNumber(text, unitsFor("V"));
    if (text !== "" && volts === null) setRefusal(words.noNumber(text));
    else if (volts !== null && Math.abs(volts) > MOST_READ_VOLTS) setRefusal(words.outOfRange(MOST_READ_VOLTS));
    else {
      setRefusal(null);
      setTyped(null);
      if (volts !== (judged?.readVolts ?? null)) onRead(point, volts);
      return true;
    }
    return false;
  }
  function onKey(event: KeyboardEvent<HTMLInputElement>): void {
    const rows = { Enter: event.shiftKey ? -1 : 1, ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (event.key === "Escape") {
      setTyped(null);
      setRefusal(null);
    } else if (rows !== undefined) {
      if (take()) goTo(event.currentTarget, rows);
    } else return;
    event.preventDefault();
    event.stopPropagation();
  }
  function paste(event: ClipboardEvent<HTMLInputElement>): void {
    const text = event.clipboardData.getData("text/plain");
    if (!/[\t\r\n;]/.test(text.trim())) return;
    event.preventDefault();
    setTyped(null);
    onPaste(text, point);
  }
  const verdict = judged?.verdict ?? null;
  return (
    <tr
      className={verdict === null ? undefined : `reading-${verdict}`}
      onPointerEnter={() => onMark(n)}
      onPointerLeave={() => onMark(null)}
    >
      <th scope="row">{n}</th>
      <td>{fixed(point.volts, decimals)}</td>
      <td>{fixed(point.bandV, decimals)}</td>
      <td>
        <input
          inputMode="decimal"
          autoComplete="off"
          aria-label={words.reading(n)}
          aria-invalid={refusal !== null}
          value={typed ?? (judged === null ? "" : shownReading(judged.readVolts, decimals))}
          onChange={(event) => setTyped(event.target.value)}
          onFocus={() => onMark(n)}
          onBlur={() => {
            take();
            onMark(null);
          }}
          onKeyDown={onKey}
          onPaste={paste}
        />
        {refusal !== null && (
          <p className="field-refusal" role="alert">
            {refusal}
          </p>
        )}
      </td>
      <td>{judged === null ? "" : `${judged.residualVolts > 0 ? "+" : ""}${fixed(judged.residualVolts, decimals)}`}</td>
      <td>
        {verdict !== null && (
          <>
            <span aria-hidden="true">{texts.readings.signs[verdict]}</span>
            <span className="unseen">{texts.readings.verdict.words[verdict]}</span>
          </>
        )}
      </td>
    </tr>
  );
});

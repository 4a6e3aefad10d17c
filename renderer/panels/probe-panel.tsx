import { type KeyboardEvent, memo, useCallback, useState } from "react";
import { useStore } from "zustand";
import type { ProbePoint } from "../../shared-types/plan";
import type { Probing } from "../../shared-types/setup";
import { changeProbing } from "../document/commands/bench";
import type { Document } from "../document/document";
import { fixed, trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { texts } from "../texts/texts";
import type { DrawsClient } from "../worker/draws-client";
import { tried } from "./field-surroundings";
import { NumberField } from "./number-field";
import { CausesCard } from "./tolerance/causes-card";
import { DrawsCard } from "./tolerance/draws-card";
import { isFlat } from "./tolerance/flat-place";
import type { WindowStore } from "./window-state";

const words = texts.probe;

const SETTINGS: readonly (readonly [key: keyof Probing, unit: string, step: number])[] = [
  ["levels", "", 1],
  ["pointsPerLevel", "", 1],
  ["wallClearanceMm", "mm", 1],
  ["partClearanceMm", "mm", 1],
  ["probeTipMm", "mm", 0.1],
  ["placementMm", "mm", 0.1],
];

/** How many levels and points, and how far they keep clear. */
export function ProbeSettings({ document }: { readonly document: Document }) {
  const probing = useStore(document, (state) => state.setup.probing);
  return (
    <section className="probe-settings" aria-label={words.settingsLabel}>
      <h2>{words.title}</h2>
      {SETTINGS.map(([key, unit, step]) => (
        <NumberField
          key={key}
          label={words.settings[key]}
          unit={unit}
          value={probing[key]}
          step={step}
          setting={`probing.${key}`}
          onSet={(value, stepping) => tried(document, changeProbing({ [key]: value }), stepping)}
        />
      ))}
    </section>
  );
}

/** Digits that the meter shows on the range in use. */
const decimalsOf = (digitVolts: number): number => Math.max(0, Math.ceil(-Math.log10(digitVolts) - 1e-9));

const PointRow = memo(function PointRow(props: {
  readonly point: ProbePoint;
  readonly decimals: number;
  /** A misplaced probe goes unseen here. */
  readonly flat: boolean;
  /** The one stop of the Tab key in the list. */
  readonly stop: boolean;
  readonly onMark: (n: number | null) => void;
}) {
  const { point, decimals, flat, stop, onMark } = props;
  const { n } = point;
  return (
    <tr onPointerEnter={() => onMark(n)} onPointerLeave={() => onMark(null)}>
      <th scope="row">
        <button type="button" data-point={n} tabIndex={stop ? 0 : -1} onFocus={() => onMark(n)} onBlur={() => onMark(null)}>
          {n}
        </button>
      </th>
      <td>{trimmed(point.xMm, 1)}</td>
      <td>{trimmed(point.yMm, 1)}</td>
      <td>{fixed(point.volts, decimals)}</td>
      <td>{fixed(point.bandV, decimals)}</td>
      <td>
        {flat && (
          <span className="flat" title={words.flatLong}>
            {words.flat}
          </span>
        )}{" "}
        {fixed(point.voltsPerMm * 1000, 0)}
      </td>
    </tr>
  );
});

/** Up and down the list of points, Home and End to its ends. */
function moveAmongPoints(event: KeyboardEvent<HTMLTableElement>): void {
  const buttons = [...event.currentTarget.querySelectorAll<HTMLElement>("[data-point]")];
  const { activeElement } = globalThis.document;
  const at = activeElement instanceof HTMLElement ? buttons.indexOf(activeElement) : -1;
  const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: buttons.length - 1 }[event.key];
  if (to === undefined || at < 0) return;
  event.preventDefault();
  buttons[Math.min(buttons.length - 1, Math.max(0, to))]?.focus();
}

export interface ProbePanelProps {
  readonly document: Document;
  readonly draws: DrawsClient;
  readonly planning: Planning;
  readonly window: WindowStore;
  readonly onSaveTable: () => void;
}

/** The points of the probe plan by level, with what the meter should read at each. */
export function ProbePanel({ document, draws, planning, window, onSaveTable }: ProbePanelProps) {
  const plan = useStore(planning, (state) => state.plan);
  const refusal = useStore(planning, (state) => state.refusal);
  const [stopAt, setStopAt] = useState(1);
  const mark = useCallback(
    (n: number | null) => {
      window.set({ markedPoints: new Set(n === null ? [] : [n]) });
      if (n !== null) setStopAt(n);
    },
    [window],
  );
  if (refusal !== null || plan === null) {
    return (
      <section className="card" aria-label={words.points}>
        <h2>{words.points}</h2>
        <p className="hint">{refusal === null ? words.coming : words.noField(refusal.message)}</p>
      </section>
    );
  }
  const decimals = decimalsOf(plan.bench.meter.digitVolts);
  const groups = [
    ...plan.probing.levels.map(({ volts, note, points }) => ({ title: words.level(trimmed(volts, 3)), note, points })),
    ...(plan.probing.checks.length > 0 ? [{ title: words.checks, note: null, points: plan.probing.checks }] : []),
  ];
  const all = groups.flatMap(({ points }) => points);
  const stop = all.some(({ n }) => n === stopAt) ? stopAt : all[0]?.n;
  return (
    <>
      <CausesCard document={document} planning={planning} point={stop} decimals={decimals} />
      <section className="card points" aria-label={words.points}>
        <header className="card-head">
          <h2>
            {words.points} <span className="count">{words.count(all.length, plan.probing.levels.length)}</span>
          </h2>
          <button type="button" onClick={onSaveTable} disabled={all.length === 0}>
            {words.saveTable}
          </button>
        </header>
        <table onKeyDown={moveAmongPoints}>
          <thead>
            <tr>
              {words.columns.map((column, index) => (
                <th key={column} scope="col" title={words.columnsLong[index]}>
                  {column}
                </th>
              ))}
            </tr>
          </thead>
          {groups.map(({ title, note, points }) => (
            <tbody key={title}>
              <tr className="level">
                <th colSpan={6} scope="rowgroup">
                  <h3>{title}</h3>
                  {note !== null && <p className="hint">{note}</p>}
                </th>
              </tr>
              {points.map((point) => (
                <PointRow
                  key={point.n}
                  point={point}
                  decimals={decimals}
                  flat={isFlat(point, plan.bench.meter.digitVolts)}
                  stop={point.n === stop}
                  onMark={mark}
                />
              ))}
            </tbody>
          ))}
        </table>
      </section>
      <DrawsCard document={document} planning={planning} draws={draws} decimals={decimals} />
    </>
  );
}

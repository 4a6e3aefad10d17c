import { useStore } from "zustand";
import type { ProbePoint } from "../../shared-types/plan";
import type { Problem } from "../../shared-types/result";
import type { Probing } from "../../shared-types/setup";
import { changeProbing } from "../document/commands/bench";
import type { Document } from "../document/document";
import { fixed, trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { NumberField } from "./number-field";
import { LENGTHS_IN_MM } from "./read-number";
import type { WindowStore } from "./window-state";

const SETTINGS: readonly (readonly [keyof Probing, string, string, number])[] = [
  ["levels", "Levels", "", 1],
  ["pointsPerLevel", "Points a level", "", 1],
  ["wallClearanceMm", "Clear of walls", "mm", 1],
  ["partClearanceMm", "Clear of parts", "mm", 1],
  ["probeTipMm", "Probe tip", "mm", 0.1],
  ["placementMm", "Placement ±", "mm", 0.1],
];

/** Digits that the meter shows on the range in use. */
const decimalsOf = (digitVolts: number): number => Math.max(0, Math.ceil(-Math.log10(digitVolts) - 1e-9));

function PointRow(props: { readonly point: ProbePoint; readonly decimals: number; readonly window: WindowStore }) {
  const { point, decimals, window } = props;
  const mark = (on: boolean): void => window.set({ markedPoints: new Set(on ? [point.n] : []) });
  return (
    <tr onPointerEnter={() => mark(true)} onPointerLeave={() => mark(false)}>
      <th scope="row">{point.n}</th>
      <td>{trimmed(point.xMm, 1)}</td>
      <td>{trimmed(point.yMm, 1)}</td>
      <td>{fixed(point.volts, decimals)}</td>
      <td>± {fixed(point.bandV, decimals)}</td>
      <td>{fixed(point.voltsPerMm * 1000, 0)}</td>
    </tr>
  );
}

const HEAD = (
  <thead>
    <tr>
      <th scope="col">No.</th>
      <th scope="col">x mm</th>
      <th scope="col">y mm</th>
      <th scope="col">reads V</th>
      <th scope="col">band V</th>
      <th scope="col">mV/mm</th>
    </tr>
  </thead>
);

/** Levels and points of the probe plan: how many, how clear, and what the meter should read at each. */
export function ProbePanel({
  document,
  planning,
  window,
}: {
  readonly document: Document;
  readonly planning: Planning;
  readonly window: WindowStore;
}) {
  const probing = useStore(document, (state) => state.setup.probing);
  const plan = useStore(planning, (state) => state.plan);
  const refusal = useStore(planning, (state) => state.refusal);
  const tried = (change: Partial<Probing>): readonly Problem[] => {
    const result = document.run(changeProbing(change));
    return result.ok ? [] : result.problems;
  };
  const decimals = plan === null ? 2 : decimalsOf(plan.bench.meter.digitVolts);
  return (
    <>
      <section className="card" aria-label="Probe plan settings">
        <h2>Probe plan</h2>
        <div className="grid-2">
          {SETTINGS.map(([key, label, unit, step]) => (
            <NumberField
              key={key}
              label={label}
              unit={unit}
              {...(unit === "mm" ? { units: LENGTHS_IN_MM } : {})}
              value={probing[key]}
              step={step}
              setting={`probing.${key}`}
              onSet={(value) => tried({ [key]: value })}
            />
          ))}
        </div>
      </section>
      <section className="card points" aria-label="Points">
        <h2>Points</h2>
        {refusal !== null && <p className="hint">No points without a field: {refusal.message}</p>}
        {refusal === null && plan === null && <p className="hint">The points come with the field.</p>}
        {refusal === null &&
          plan?.probing.levels.map((level) => (
            <div key={level.volts} className="level">
              <h3>{trimmed(level.volts, 3)} V</h3>
              {level.note !== null && <p className="hint">{level.note}</p>}
              {level.points.length > 0 && (
                <table>
                  {HEAD}
                  <tbody>
                    {level.points.map((point) => (
                      <PointRow key={point.n} point={point} decimals={decimals} window={window} />
                    ))}
                  </tbody>
                </table>
              )}
            </div>
          ))}
        {refusal === null && (plan?.probing.checks.length ?? 0) > 0 && (
          <div className="level">
            <h3>Checks of loose conductors</h3>
            <table>
              {HEAD}
              <tbody>
                {plan?.probing.checks.map((point) => (
                  <PointRow key={point.n} point={point} decimals={decimals} window={window} />
                ))}
              </tbody>
            </table>
          </div>
        )}
      </section>
    </>
  );
}

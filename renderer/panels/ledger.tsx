import { useStore } from "zustand";
import type { Bounded, Finding, Severity } from "../../shared-types/plan";
import { applyRemedy } from "../document/commands/bench";
import type { Document } from "../document/document";
import { fixed, trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { FindingsList, SeveritySign } from "./bench/findings-list";
import { showFinding } from "./bench/show-finding";
import type { WindowStore } from "./window-state";

/** As many digits as the bound supports, at least three and at most six figures. */
function bounded({ value, error }: Bounded, unit: string): string {
  const figures = Math.min(6, Math.max(3, Math.floor(Math.log10(Math.abs(value) / Math.max(error, 1e-12 * Math.abs(value))))));
  const decimals = Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(value))));
  return `${fixed(value, Math.min(6, decimals))} ${unit}`;
}

function inUnits(bound: Bounded, unit: string): string {
  const size = Math.abs(bound.value);
  if (size === 0 || !Number.isFinite(size)) return Number.isFinite(size) ? `0 ${unit}` : "none flows";
  const [factor, prefix] =
    size >= 1e6 ? [1e-6, "M"] : size >= 1e4 ? [1e-3, "k"] : size >= 1 ? [1, ""] : size >= 1e-3 ? [1e3, "m"] : [1e6, "µ"];
  return bounded({ value: bound.value * factor, error: bound.error * factor }, `${prefix}${unit}`);
}

const WORDS: Readonly<Record<Severity, readonly [string, string]>> = {
  stop: ["stop", "stops"],
  caution: ["caution", "cautions"],
  note: ["note", "notes"],
};

function Entry({ name, value }: { readonly name: string; readonly value: string }) {
  return (
    <div className="ledger-entry">
      <dt>{name}</dt>
      <dd>{value}</dd>
    </div>
  );
}

/** The bottom line: what the present plan says, how sure it is, and what the rules found. */
export function Ledger({
  document,
  planning,
  window,
}: {
  readonly document: Document;
  readonly planning: Planning;
  readonly window: WindowStore;
}) {
  const { plan, refusal, busy, progress } = useStore(planning);
  const readout = useStore(window, (state) => state.readout);
  const findingsShown = useStore(window, (state) => state.findingsShown);
  const findings: readonly Finding[] = refusal?.findings ?? plan?.findings ?? [];
  const counts = (["stop", "caution", "note"] as const).map(
    (severity) => [severity, findings.filter((one) => one.severity === severity).length] as const,
  );
  const current = refusal === null ? plan : null;
  return (
    <footer className="ledger">
      <dl>
        <Entry
          name="Resistance"
          value={current === null ? "–" : current.resistanceOhm === null ? "several potentials" : inUnits(current.resistanceOhm, "Ω")}
        />
        <Entry name="Current" value={current === null ? "–" : inUnits(current.currentA, "A")} />
        <Entry name="Power" value={current === null ? "–" : inUnits({ value: current.powerW, error: current.powerW * 1e-3 }, "W")} />
        <Entry name="Span" value={current === null ? "–" : `${trimmed(current.spanV[0], 2)} to ${trimmed(current.spanV[1], 2)} V`} />
        <Entry
          name="Pitch, bound"
          value={
            current === null
              ? "–"
              : `${trimmed(current.numerics.pitchMm, 2)} mm, ${((100 * current.currentA.error) / Math.max(current.currentA.value, 1e-30)).toPrecision(1)} %`
          }
        />
      </dl>
      <p className="ledger-readout">
        {readout !== null &&
          `x ${fixed(readout.xMm, 1)}  y ${fixed(readout.yMm, 1)} mm${
            readout.volts === null ? "" : `   ${fixed(readout.volts, 3)} V   ${fixed(readout.fieldVPerCm, 3)} V/cm`
          }`}
      </p>
      {busy && (
        <p className="ledger-busy" role="status">
          solving {Math.round(progress * 100)} %
        </p>
      )}
      <button
        type="button"
        className="ledger-findings"
        aria-expanded={findingsShown}
        onClick={() => window.set({ findingsShown: !findingsShown })}
      >
        {findings.length === 0
          ? "No findings"
          : counts
              .filter(([, count]) => count > 0)
              .map(([severity, count]) => (
                <span key={severity}>
                  <SeveritySign severity={severity} /> {count} {WORDS[severity][count === 1 ? 0 : 1]}
                </span>
              ))}
      </button>
      {findingsShown && (
        <section className="findings-sheet" aria-label="Findings">
          <FindingsList
            findings={findings}
            onShow={(finding) => showFinding(document, finding, finding.partIds.length > 0 ? undefined : () => window.goTo("bench"))}
            onApply={(finding) => {
              if (finding.edit !== null) document.run(applyRemedy(finding.edit));
            }}
          />
        </section>
      )}
    </footer>
  );
}

import { memo, useDeferredValue, useMemo } from "react";
import { useStore } from "zustand";
import type { Finding, Plan } from "../../shared-types/plan";
import type { Stock } from "../../shared-types/stock";
import { applyRemedy } from "../document/commands/bench";
import type { Document } from "../document/document";
import { fixed, trimmed } from "../document/number-text";
import type { Planning } from "../document/planning";
import { stockFindings } from "../document/stock-findings";
import { texts } from "../texts/texts";
import { FindingsList, SeveritySign } from "./bench/findings-list";
import { showFinding } from "./bench/show-finding";
import { boundedText, percentText } from "./bounded-text";
import { IconButton } from "./icon-button";
import type { WindowStore } from "./window-state";

const words = texts.window.ledger;
/** Finer steps would only flicker, %. */
const PERCENT_STEP = 10;
const NO_FINDINGS: readonly Finding[] = [];
/** Power follows from volts, exactly given, and the current. */
const powerOf = ({ powerW, currentA }: Plan) => ({
  value: powerW,
  error: (powerW * currentA.error) / Math.max(Math.abs(currentA.value), 1e-30),
});

function Entry({ name, value, hint }: { readonly name: string; readonly value: string; readonly hint?: string }) {
  return (
    <div className="ledger-entry" title={hint}>
      <dt>{name}</dt>
      <dd>{value}</dd>
    </div>
  );
}

const Numbers = memo(function Numbers({ plan }: { readonly plan: Plan | null }) {
  const { nothing } = words;
  const resistance = plan === null ? nothing : plan.resistanceOhm === null ? words.severalPotentials : boundedText(plan.resistanceOhm, "Ω");
  return (
    <dl>
      <Entry name={words.resistance} value={resistance} />
      <Entry name={words.current} value={plan === null ? nothing : boundedText(plan.currentA, "A")} />
      <Entry name={words.power} value={plan === null ? nothing : boundedText(powerOf(plan), "W")} />
      <Entry name={words.span} value={plan === null ? nothing : words.spanText(trimmed(plan.spanV[0], 2), trimmed(plan.spanV[1], 2))} />
      <Entry
        name={words.picture}
        hint={words.pictureLong}
        value={plan === null ? nothing : words.pictureText(trimmed(plan.numerics.pitchMm, 2), percentText(plan.currentA))}
      />
    </dl>
  );
});

/** What a probe would read under the pointer. */
function UnderPointer({ window }: { readonly window: WindowStore }) {
  const readout = useStore(window, (state) => state.readout);
  return (
    <p className="ledger-readout">
      {readout !== null &&
        words.place(fixed(readout.xMm, 1), fixed(readout.yMm, 1)) +
          (readout.volts === null ? "" : words.reading(fixed(readout.volts, 3), fixed(readout.fieldVPerCm, 3)))}
    </p>
  );
}

interface LedgerProps {
  readonly document: Document;
  readonly planning: Planning;
  readonly window: WindowStore;
}

function FindingsCard({
  document,
  window,
  findings,
}: Pick<LedgerProps, "document" | "window"> & { readonly findings: readonly Finding[] }) {
  return (
    <section
      className="float-card findings-sheet"
      aria-label={texts.window.findings.title}
      onKeyDown={(event) => event.key === "Escape" && window.set({ findingsShown: false })}
    >
      <header className="card-head">
        <h2>{texts.window.findings.title}</h2>
        <IconButton icon="close" name={texts.window.findings.close} onPress={() => window.set({ findingsShown: false })} />
      </header>
      <FindingsList
        findings={findings}
        onShow={(finding) => showFinding(document, finding, finding.partIds.length > 0 ? undefined : () => window.goTo("bench"))}
        onApply={(finding) => {
          if (finding.edit !== null) document.run(applyRemedy(finding.edit));
        }}
      />
    </section>
  );
}

/** The bottom line: what the present plan says, how sure it is, and what the rules found. */
export function Ledger({ document, planning, window, stock }: LedgerProps & { readonly stock: Stock }) {
  const plan = useStore(planning, (state) => state.plan);
  const refusal = useStore(planning, (state) => state.refusal);
  const busy = useStore(planning, (state) => state.busy);
  const percent = useStore(planning, (state) => PERCENT_STEP * Math.round((100 / PERCENT_STEP) * state.progress));
  const findingsShown = useStore(window, (state) => state.findingsShown);
  const setup = useDeferredValue(useStore(document, (state) => state.setup));
  const lacking = useMemo(() => stockFindings(setup, stock), [setup, stock]);
  const planned = refusal?.findings ?? plan?.findings ?? NO_FINDINGS;
  const findings = lacking.length === 0 ? planned : [...planned, ...lacking];
  const counts = (["stop", "caution", "note"] as const).map(
    (severity) => [severity, findings.filter((one) => one.severity === severity).length] as const,
  );
  return (
    <footer className="ledger" data-quality={refusal === null ? plan?.quality : undefined}>
      <Numbers plan={refusal === null ? plan : null} />
      <UnderPointer window={window} />
      <p className="ledger-busy" role="status">
        {busy ? words.solving(percent) : ""}
      </p>
      <button
        type="button"
        className="ledger-findings"
        aria-expanded={findingsShown}
        onClick={() => window.set({ findingsShown: !findingsShown, keysShown: false, settingsShown: false })}
      >
        {findings.length === 0
          ? texts.window.findings.none
          : counts
              .filter(([, count]) => count > 0)
              .map(([severity, count]) => (
                <span key={severity}>
                  <SeveritySign severity={severity} /> {texts.window.findings.count(severity, count)}
                </span>
              ))}
      </button>
      {findingsShown && <FindingsCard document={document} window={window} findings={findings} />}
    </footer>
  );
}

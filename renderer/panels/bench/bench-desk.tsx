import "./bench.css";
import { useStore } from "zustand";
import type { Finding } from "../../../shared-types/plan";
import { applyRemedy } from "../../document/commands/bench";
import type { Document } from "../../document/document";
import type { Planning } from "../../document/planning";
import { texts } from "../../texts/texts";
import { ChartCard } from "./chart-card";
import { remedyWords } from "./dot";
import { FindingsList } from "./findings-list";
import { MeterCard, SessionCard, SupplyCard, SurfaceCard, WaterCard } from "./setting-cards";
import { showFinding } from "./show-finding";

const words = texts.bench;

export interface BenchDeskProps {
  readonly document: Document;
  readonly planning: Planning;
}

/** The Bench desk: the depth–voltage chart, what the rules found, and the cards of water, supply, surfaces, meter, heat and gas. */
export function BenchDesk({ document, planning }: BenchDeskProps) {
  const setup = useStore(document, (state) => state.setup);
  const plan = useStore(planning, (state) => state.plan);
  const refusal = useStore(planning, (state) => state.refusal);
  const bench = refusal === null ? (plan?.bench ?? null) : null;
  const findings = refusal?.findings ?? plan?.findings ?? [];

  const apply = (finding: Finding): void => {
    if (finding.edit === null) return;
    const words = remedyWords(finding.edit);
    document.run({ ...applyRemedy(finding.edit), label: words.charAt(0).toLowerCase() + words.slice(1) });
  };

  const cards = { document, setup, bench };
  return (
    <div className="bench-desk">
      {bench === null ? (
        <section className="card">
          <h2>{words.chart.title}</h2>
          <p className="hint">{refusal === null ? words.chart.solving : words.chart.noField(refusal.message)}</p>
        </section>
      ) : (
        <ChartCard document={document} setup={setup} bench={bench} />
      )}
      <section className="card" aria-labelledby="bench-findings-title">
        <h2 id="bench-findings-title">{words.findings.title}</h2>
        <FindingsList findings={findings} onShow={(finding) => showFinding(document, finding)} onApply={apply} />
      </section>
      <WaterCard {...cards} />
      <SupplyCard {...cards} />
      <SurfaceCard {...cards} />
      <MeterCard {...cards} />
      <SessionCard {...cards} />
    </div>
  );
}

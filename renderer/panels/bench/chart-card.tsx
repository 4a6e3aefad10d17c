import type { BenchNumbers } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { changeSupply } from "../../document/commands/bench";
import type { Document } from "../../document/document";
import { texts } from "../../texts/texts";
import { moveDot } from "./dot";
import { FrequencyChart } from "./frequency-chart";
import { shownNumber } from "./numbers";
import { type Gesture, RegionChart } from "./region-chart";
import { allowsSetting, breaks } from "./region-geometry";

const words = texts.bench;

interface ChartCardProps {
  readonly document: Document;
  readonly setup: Setup;
  readonly bench: BenchNumbers;
}

/** Sends a gesture on the chart to the document: a drag is one step, a held key is one step. */
function useGestures(document: Document, drag: string) {
  return (edit: Parameters<Document["run"]>[0], gesture: Gesture): void => {
    if (gesture === "start") document.startDrag(drag);
    else if (gesture === "key") document.run(edit);
    else {
      document.dragTo(edit);
      if (gesture === "end") document.finishDrag();
    }
  };
}

/** In words: whether the present setting is allowed, or which rules it breaks. */
function Verdict({ setup, bench }: Omit<ChartCardProps, "document">) {
  const { region } = bench;
  const [depthMm, volts] = [setup.water.depthMm, setup.supply.volts];
  const broken = region.boundaries.filter((boundary) => breaks(boundary, depthMm, volts)).map((boundary) => words.rules[boundary.rule]);
  const coarse = region.unreadableVolts.some(([low, high]) => low > 0 && volts > low && volts < high);
  const reasons = coarse ? [...broken, words.chart.coarseDigit] : broken;
  const allowed = reasons.length === 0 && allowsSetting(region, depthMm, volts);
  return (
    <p className="bench-verdict" role="status">
      <strong>{words.chart.setting(shownNumber(depthMm), shownNumber(volts), setup.supply.waveform)}</strong>{" "}
      {allowed ? words.chart.kept : words.chart.broken(reasons)}
    </p>
  );
}

/** The depth–voltage chart with its suggestion, and the share lost along frequency below it. */
export function ChartCard({ document, setup, bench }: ChartCardProps) {
  const { region } = bench;
  const { suggestion, clash } = region;
  const onRegion = useGestures(document, words.chart.dragStep);
  const onFrequency = useGestures(document, words.frequency.dragStep);
  const taken = suggestion !== null && suggestion[0] === setup.water.depthMm && suggestion[1] === setup.supply.volts;
  return (
    <section className="card" aria-labelledby="bench-chart-title">
      <h2 id="bench-chart-title">{words.chart.title}</h2>
      <RegionChart
        region={region}
        depthMm={setup.water.depthMm}
        volts={setup.supply.volts}
        waveform={setup.supply.waveform}
        onChoose={(depthMm, volts, gesture) => onRegion(moveDot(depthMm, volts, gesture === "key" ? "chart's dot" : undefined), gesture)}
      />
      <Verdict setup={setup} bench={bench} />
      {suggestion !== null && (
        <button type="button" className="strong" disabled={taken} onClick={() => document.run(moveDot(...suggestion))}>
          {taken ? words.chart.taken : words.chart.take(shownNumber(suggestion[0]), shownNumber(suggestion[1]))}
        </button>
      )}
      {clash !== null && (
        <p className="bench-clash">
          <strong>{words.chart.clash}</strong> {clash.message} {words.chart.opensWith(clash.opensWith)}
        </p>
      )}
      {!region.exact && <p className="hint">{words.chart.estimate}</p>}
      {bench.interface.waveform === "ac" && (
        <>
          <h3>{words.frequency.title}</h3>
          <FrequencyChart
            surface={bench.interface}
            meterLowHz={setup.meter.acLowHz}
            meterHighHz={setup.meter.acHighHz}
            onChoose={(frequencyHz, gesture) =>
              onFrequency(
                { ...changeSupply({ frequencyHz }), label: words.frequency.dotStep(frequencyHz), joins: "chart's frequency" },
                gesture,
              )
            }
          />
        </>
      )}
    </section>
  );
}

import { useEffect, useRef, useState } from "react";
import { useStore } from "zustand";
import { DRAW_COUNTS, type DrawnBands } from "../../../shared-types/tolerance";
import type { Document } from "../../document/document";
import { fixed } from "../../document/number-text";
import { isCurrent, type Planning } from "../../document/planning";
import { texts } from "../../texts/texts";
import type { DrawsClient } from "../../worker/draws-client";
import { NumberField } from "../number-field";
import { DrawnStrip } from "./drawn-strip";

const words = texts.probe.draws;
const USUAL_DRAWS = 1000;
/** Every check of a plan draws the same trays, so that two people get the same answer. */
const SEED = 1;

interface Run {
  readonly setupId: string;
  readonly bands: DrawnBands | null;
  readonly done: number;
  readonly fault: string | null;
}

/** Draws trays within the stated tolerances as a check of the bands, and shows both side by side for every point. */
export function DrawsCard(props: {
  readonly document: Document;
  readonly planning: Planning;
  readonly draws: DrawsClient;
  readonly decimals: number;
}) {
  const { document, planning, draws, decimals } = props;
  const setup = useStore(document, (state) => state.setup);
  const plan = useStore(planning, (state) => (isCurrent(state, setup) ? state.plan : null));
  const [count, setCount] = useState(USUAL_DRAWS);
  const [run, setRun] = useState<Run | null>(null);
  const running = useRef<AbortController | null>(null);
  const setupId = plan?.setupId;
  const tolerance = plan?.probing.tolerance;
  // A run belongs to the setup that it was begun on.
  // biome-ignore lint/correctness/useExhaustiveDependencies: another setup ends the run.
  useEffect(() => () => running.current?.abort(), [setupId]);

  async function start(): Promise<void> {
    if (plan === null) return;
    const mine = new AbortController();
    running.current = mine;
    setRun({ setupId: plan.setupId, bands: null, done: 0, fault: null });
    // The number moves by whole percents: a thousand messages are not a thousand pictures.
    const onProgress = (done: number): void => {
      if (Math.floor((100 * done) / count) > Math.floor((100 * (done - 1)) / count)) setRun((now) => now && { ...now, done });
    };
    try {
      const bands = await draws.draw(setup, plan, { draws: count, seed: SEED, signal: mine.signal, onProgress });
      setRun(bands === null ? null : { setupId: plan.setupId, bands, done: count, fault: null });
    } catch (error) {
      setRun({ setupId: plan.setupId, bands: null, done: 0, fault: error instanceof Error ? error.message : String(error) });
    }
    if (running.current === mine) running.current = null;
  }

  const shown = run !== null && run.setupId === setupId ? run : null;
  const busy = shown !== null && shown.bands === null && shown.fault === null;
  const points = plan === null ? [] : [...plan.probing.levels.flatMap((level) => level.points), ...plan.probing.checks];
  const bands = shown?.bands ?? null;
  const agreeing = bands?.points.filter(({ reason }) => reason === null).length ?? 0;
  return (
    <section className="card draws" aria-label={words.title}>
      <h2>{words.title}</h2>
      <p className="hint">{words.purpose}</p>
      <div className="draws-start">
        <NumberField
          label={words.count}
          unit=""
          value={count}
          step={100}
          onSet={(value) => {
            if (!Number.isInteger(value) || value < DRAW_COUNTS[0] || value > DRAW_COUNTS[1])
              return [{ where: "", message: words.range(DRAW_COUNTS[0], DRAW_COUNTS[1]) }];
            setCount(value);
            return [];
          }}
        />
        {busy ? (
          <button type="button" onClick={() => running.current?.abort()}>
            {words.cancel}
          </button>
        ) : (
          <button type="button" onClick={() => void start()} disabled={tolerance === undefined}>
            {words.start}
          </button>
        )}
      </div>
      {busy && <progress value={shown.done} max={count} aria-label={words.progress(shown.done, count)} />}
      <p role="status">
        {shown?.fault != null && words.fault(shown.fault)}
        {bands !== null && words.result(agreeing, bands.points.length, bands.draws, (bands.elapsedMs / 1000).toFixed(0))}
      </p>
      {bands !== null && tolerance !== undefined && (
        <ol className="strips">
          {bands.points.map((drawn, index) => (
            <li key={points[index].n}>
              <b>{points[index].n}</b>
              <DrawnStrip band={tolerance.points[index]} drawn={drawn} />
              <span>
                {words.point(
                  fixed(tolerance.points[index].bandV, decimals + 1),
                  fixed(2 * drawn.standardVolts, decimals + 1),
                  `${drawn.departure < 0 ? "−" : "+"}${Math.abs(100 * drawn.departure).toFixed(0)}`,
                )}
                {drawn.reason !== null && ` ${words.reasons[drawn.reason]}`}
              </span>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}

import { useEffect, useRef, useState } from "react";
import type { Plan } from "../../../shared-types/plan";
import type { Diagnosis, Explanation, JudgedRun } from "../../../shared-types/readings";
import type { Setup } from "../../../shared-types/setup";
import { fixed, trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import type { ReadingsCheck } from "./readings-check";

const words = texts.readings.diagnosis;

/** What one explanation says, with its size and the k = 2 uncertainty of it. */
function inWords(setup: Setup, { kind, partId, points, values, swappedDigitsVolts }: Explanation): string {
  const part = setup.parts.find(({ id }) => id === partId);
  const name = part === undefined || part.name === "" ? (partId ?? "") : part.name;
  const size = (index: number, factor: number, decimals: number): string => {
    const one = values[index];
    const sign = one.value > 0 ? "+" : "";
    return words.plusMinus(`${sign}${fixed(factor * one.value, decimals)}`, fixed(2 * factor * one.uncertainty, decimals));
  };
  switch (kind) {
    case "none":
      return words.none;
    case "scale":
      return words.scale(size(0, 100, 1));
    case "electrode":
      return words.electrode(name, size(0, 1, 2));
    case "tilt-x":
      return words.tilt("x", size(0, 1, 1));
    case "tilt-y":
      return words.tilt("y", size(0, 1, 1));
    case "displaced":
      return words.displaced(name, size(0, 1, 1), size(1, 1, 1));
    case "drift":
      return words.drift(size(0, 1, 2));
    case "swapped-points":
      return words.swappedPoints(points[0], points[1]);
    case "wrong-reading":
      return swappedDigitsVolts === null
        ? words.wrongReading(points[0], size(0, 1, 2))
        : words.swappedDigits(points[0], trimmed(swappedDigitsVolts, 4));
  }
}

function Found({ setup, diagnosis }: { readonly setup: Setup; readonly diagnosis: Diagnosis }) {
  const { best, runnerUp, inseparable, clearness, leavesChance, untried } = diagnosis;
  if (best === null) return <p>{words.tooFew(diagnosis.used)}</p>;
  return (
    <>
      <p className="diagnosis-best">{inWords(setup, best)}</p>
      {inseparable.length > 0 && <p>{words.inseparable(inseparable.map((one) => inWords(setup, one)))}</p>}
      {runnerUp !== null && <p>{words.runnerUp(inWords(setup, runnerUp), words.clearness[clearness])}</p>}
      {!leavesChance && <p>{words.leavesMore}</p>}
      {untried.length > 0 && <p className="hint">{words.untried(untried.length)}</p>}
    </>
  );
}

export interface DiagnosisCardProps {
  readonly setup: Setup;
  readonly plan: Plan;
  readonly judged: JudgedRun | null;
  readonly check: ReadingsCheck;
}

/** What a diagnosis belongs to: this layout and these readings, whatever the quality of the plan. */
const markOf = ({ setupId }: Plan, { readings }: JudgedRun): string =>
  `${setupId} ${readings.map(({ n, readVolts }) => `${n}:${readVolts}`).join(" ")}`;

/** Looks for the single fault that explains a run best, on demand: the tray is solved anew with every fault put in. */
export function DiagnosisCard({ setup, plan, judged, check }: DiagnosisCardProps) {
  const [found, setFound] = useState<{ readonly of: string; readonly diagnosis: Diagnosis } | null>(null);
  const [share, setShare] = useState<number | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const stop = useRef<AbortController | null>(null);
  useEffect(() => () => stop.current?.abort(), []);

  async function look(run: JudgedRun): Promise<void> {
    const controller = new AbortController();
    stop.current = controller;
    setShare(0);
    setFault(null);
    try {
      const diagnosis = await check.diagnose(setup, plan, run, setShare, controller.signal);
      if (diagnosis !== null) setFound({ of: markOf(plan, run), diagnosis });
    } catch (error) {
      setFault(error instanceof Error ? error.message : String(error));
    }
    setShare(null);
  }
  const same = found !== null && judged !== null && found.of === markOf(plan, judged);
  return (
    <section className="card readings-diagnosis" aria-label={words.title}>
      <h2>{words.title}</h2>
      <p className="hint">{words.hint}</p>
      {share === null ? (
        <button
          type="button"
          disabled={judged === null || judged.readings.length === 0}
          onClick={() => judged !== null && void look(judged)}
        >
          {words.look}
        </button>
      ) : (
        <div className="choices">
          <progress aria-label={words.looking} value={share} max={1} />
          <button type="button" onClick={() => stop.current?.abort()}>
            {words.stop}
          </button>
        </div>
      )}
      <div role="status">{same && share === null && <Found setup={setup} diagnosis={found.diagnosis} />}</div>
      {fault !== null && <p role="alert">{words.failed(fault)}</p>}
    </section>
  );
}

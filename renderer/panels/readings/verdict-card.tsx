import type { JudgedRun } from "../../../shared-types/readings";
import { fixed } from "../../document/number-text";
import { texts } from "../../texts/texts";

const words = texts.readings.verdict;
/** Chances below this are not told apart. */
const LEAST_CHANCE = 0.001;

const chanceText = (chance: number): string => (chance < LEAST_CHANCE ? words.lessThan(fixed(LEAST_CHANCE, 3)) : fixed(chance, 3));

/** One verdict for the tray, its reason, and what it rests on. */
export function VerdictCard({ judged }: { readonly judged: JudgedRun | null }) {
  const verdict = judged?.verdict ?? null;
  return (
    <section className="card readings-verdict" aria-label={words.title}>
      <h2>{words.title}</h2>
      <div role="status">
        <p className={`verdict verdict-${verdict ?? "none"}`}>
          {verdict !== null && <span aria-hidden="true">{texts.readings.signs[verdict]} </span>}
          {verdict === null ? words.nothing : words.words[verdict]}
        </p>
        <p>{words.reasons[judged?.reason ?? "none-read"]}</p>
      </div>
      {judged !== null && verdict !== null && (
        <dl>
          <dt>{words.read}</dt>
          <dd>{words.readOf(judged.readings.length, judged.planned)}</dd>
          <dt>{words.counts}</dt>
          <dd>{words.countsOf(judged.counts.pass, judged.counts.doubtful, judged.counts.fail)}</dd>
          <dt>{words.chiSquared}</dt>
          <dd>{words.chiSquaredOf(fixed(judged.chiSquared, 1), judged.degrees, chanceText(judged.chance))}</dd>
          {judged.worst !== null && (
            <>
              <dt>{words.worst}</dt>
              <dd>{words.worstOf(judged.worst.n, fixed(judged.worst.inBands, 2))}</dd>
            </>
          )}
        </dl>
      )}
    </section>
  );
}

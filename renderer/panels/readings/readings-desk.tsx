import { useCallback, useEffect, useMemo, useState } from "react";
import { useStore } from "zustand";
import type { Host } from "../../../shared-types/host";
import type { Plan, ProbePoint } from "../../../shared-types/plan";
import type { ReadTable } from "../../../shared-types/readings";
import { clearReading, enterReading, removeFound, takeReadings } from "../../document/commands/readings";
import type { Document } from "../../document/document";
import type { Planning } from "../../document/planning";
import { texts } from "../../texts/texts";
import type { WindowStore } from "../window-state";
import { DiagnosisCard } from "./diagnosis-card";
import { FoundCard } from "./found-card";
import { ReadingRow } from "./reading-row";
import { decimalsOf, type ReadingsCheck, shownRun } from "./readings-check";
import { beginRun } from "./runs-card";
import { exportTable, importedText } from "./table-files";
import { VerdictCard } from "./verdict-card";

const words = texts.readings.table;
/** So many wrong rows are listed. */
const LISTED_ROWS = 12;

export interface ReadingsDeskProps {
  readonly host: Host;
  readonly document: Document;
  readonly planning: Planning;
  readonly window: WindowStore;
  readonly check: ReadingsCheck;
}

/** What came of a table that was pasted or imported: how much was taken, and each wrong row with its reason. */
function TableOutcome({ table, onClose }: { readonly table: ReadTable; readonly onClose: () => void }) {
  return (
    <div className="table-outcome" role="status">
      <p>{words.taken(table.readings.length + table.found.length)}</p>
      {table.wrong.length > 0 && (
        <>
          <h3>{words.notTaken(table.wrong.length)}</h3>
          <ul>
            {table.wrong.slice(0, LISTED_ROWS).map(({ line, fault, text }) => (
              <li key={line}>{words.row(line, words.faults[fault], text)}</li>
            ))}
          </ul>
        </>
      )}
      <button type="button" onClick={onClose}>
        {words.close}
      </button>
    </div>
  );
}

/** The Readings desk, right of the tray: verdict, readings beside their points, found places. */
export function ReadingsDesk(props: ReadingsDeskProps) {
  const plan = useStore(props.planning, (state) => state.plan);
  const refusal = useStore(props.planning, (state) => state.refusal);
  if (plan !== null && refusal === null) return <Readings {...props} plan={plan} />;
  return (
    <section className="card" aria-label={texts.readings.title}>
      <h2>{texts.readings.title}</h2>
      <p className="hint">{refusal === null ? texts.readings.coming : texts.readings.noField(refusal.message)}</p>
    </section>
  );
}

function Readings({ host, document, window, check, plan }: ReadingsDeskProps & { readonly plan: Plan }) {
  const setup = useStore(document, (state) => state.setup);
  const chosen = useStore(window, (state) => state.run);
  const run = shownRun(setup, chosen);
  const points = useMemo(() => check.pointsOf(plan.probing), [check, plan]);
  const judged = useMemo(() => (run === null ? null : check.judge(run, plan)), [check, run, plan]);
  const byPoint = useMemo(() => new Map(judged?.readings.map((one) => [one.n, one])), [judged]);
  const [outcome, setOutcome] = useState<ReadTable | null>(null);
  useEffect(() => {
    window.set({ judged });
    return () => window.set({ judged: null });
  }, [window, judged]);

  const mark = useCallback((n: number | null) => window.set({ markedPoints: new Set(n === null ? [] : [n]) }), [window]);
  /** The shown run, begun where there is none yet. */
  const runId = useCallback(
    () => shownRun(document.getState().setup, window.getState().run)?.id ?? beginRun(document, window),
    [document, window],
  );
  const read = useCallback(
    ({ n, xMm, yMm }: ProbePoint, volts: number | null) => {
      document.run(volts === null ? clearReading(runId(), { n, xMm, yMm }) : enterReading(runId(), { n, xMm, yMm, volts }));
    },
    [document, runId],
  );
  const take = useCallback(
    (text: string, from: number) => {
      const table = check.readTable(text, points, from);
      if (table.readings.length + table.found.length > 0) document.run(takeReadings(runId(), table.readings, table.found));
      setOutcome(table);
    },
    [check, points, document, runId],
  );
  const paste = useCallback((text: string, at: ProbePoint) => take(text, points.indexOf(at)), [take, points]);
  const decimals = decimalsOf(plan.bench.meter.digitVolts);
  const title = setup.title === "" ? words.untitled : setup.title;
  const name = run === null || run.name === "" ? (run?.id ?? "") : run.name;
  return (
    <>
      <VerdictCard judged={judged} />
      <DiagnosisCard key={run?.id ?? ""} setup={setup} plan={plan} judged={judged} check={check} />
      <section className="card points readings-table" aria-label={words.title}>
        <h2>{words.title}</h2>
        <div className="choices">
          <button type="button" onClick={() => void importedText(host, window).then((text) => text !== null && take(text, 0))}>
            {words.import}
          </button>
          <button
            type="button"
            disabled={judged === null || judged.readings.length === 0}
            onClick={() => judged !== null && void exportTable(host, window, words.fileName(title, name), check.readingsCsv(judged))}
          >
            {words.export}
          </button>
        </div>
        <p className="hint">{words.hint}</p>
        {judged !== null && judged.strays.length > 0 && <p className="hint">{words.strays(judged.strays.length)}</p>}
        {outcome !== null && <TableOutcome table={outcome} onClose={() => setOutcome(null)} />}
        <table>
          <thead>
            <tr>
              {words.columns.map((column, index) => (
                <th key={column} scope="col" title={words.columnsLong[index]}>
                  {column}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {points.map((point) => (
              <ReadingRow
                key={point.n}
                run={run?.id ?? null}
                point={point}
                judged={byPoint.get(point.n) ?? null}
                decimals={decimals}
                onRead={read}
                onMark={mark}
                onPaste={paste}
              />
            ))}
          </tbody>
        </table>
      </section>
      <FoundCard
        plan={plan}
        judged={judged}
        onAdd={(volts, xMm, yMm) => document.run(takeReadings(runId(), [], [{ volts, xMm, yMm }]))}
        onRemove={(index) => run !== null && document.run(removeFound(run.id, index))}
        onExport={() => judged !== null && void exportTable(host, window, words.foundFileName(title, name), check.foundPlacesCsv(judged))}
      />
    </>
  );
}

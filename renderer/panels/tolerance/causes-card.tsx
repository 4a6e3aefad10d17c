import { useStore } from "zustand";
import type { Document } from "../../document/document";
import { fixed } from "../../document/number-text";
import type { Planning } from "../../document/planning";
import { texts } from "../../texts/texts";
import { type CauseRow, causeRows } from "./cause-rows";
import "./tolerance.css";

const words = texts.probe.tolerance;
const BARS_OF_TRAY = 6;
const BARS_OF_POINT = 4;

function Bars({ title, rows }: { readonly title: string; readonly rows: readonly CauseRow[] }) {
  return (
    <>
      <h3>{title}</h3>
      <ul className="cause-bars">
        {rows.map(({ key, share, text }) => (
          <li key={key}>
            <span>{text}</span>
            <span className="cause-bar" aria-hidden="true" style={{ width: `${100 * share}%` }} />
          </li>
        ))}
      </ul>
    </>
  );
}

/** Which causes the bands come from: over the whole tray, and at the point that is looked at. */
export function CausesCard(props: {
  readonly document: Document;
  readonly planning: Planning;
  /** Number of the point that is looked at. */
  readonly point: number | undefined;
  readonly decimals: number;
}) {
  const { document, planning, point, decimals } = props;
  const parts = useStore(document, (state) => state.setup.parts);
  const probing = useStore(planning, (state) => state.plan?.probing);
  const coming = useStore(planning, (state) => state.bandsPending || state.pending);
  const tolerance = probing?.tolerance;
  const all = probing === undefined ? [] : [...probing.levels.flatMap(({ points }) => points), ...probing.checks];
  const index = all.findIndex(({ n }) => n === point);
  const own = tolerance?.points[index];
  if (all.length === 0) return null;
  return (
    <section className="card causes" aria-label={words.title}>
      <h2>{words.title}</h2>
      {tolerance === undefined ? (
        <p className="hint">{coming ? words.coming : words.failed}</p>
      ) : (
        <>
          <Bars title={words.wholeTray} rows={causeRows(tolerance.ranking, parts, BARS_OF_TRAY)} />
          {own !== undefined && (
            <Bars title={words.point(all[index].n, fixed(own.bandV, decimals))} rows={causeRows(own.causes, parts, BARS_OF_POINT)} />
          )}
        </>
      )}
    </section>
  );
}

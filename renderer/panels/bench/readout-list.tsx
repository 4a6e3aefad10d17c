import type { Readout } from "./readouts";

/** Lines of a card: term, value, and in softer ink what to know of it. */
export function ReadoutList({ lines }: { readonly lines: readonly Readout[] }) {
  return (
    <dl className="bench-readouts">
      {lines.map(({ term, value, note }) => (
        <div key={term}>
          <dt>{term}</dt>
          <dd>
            <span className="bench-value">{value}</span>
            {note !== undefined && <span className="bench-note">{note}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}

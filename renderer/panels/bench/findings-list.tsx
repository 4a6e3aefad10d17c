import type { Finding, Severity } from "../../../shared-types/plan";
import { remedyWords } from "./dot";

/** Octagon, triangle, circle: shapes that speak without colour (after ISO 3864). */
const SIGNS: Record<Severity, { readonly path: string; readonly word: string }> = {
  stop: { path: "M5.2 1H10.8L15 5.2V10.8L10.8 15H5.2L1 10.8V5.2Z", word: "Stop" },
  caution: { path: "M8 1.5L15.2 14.5H0.8Z", word: "Caution" },
  note: { path: "M8 1A7 7 0 1 1 7.99 1Z", word: "Note" },
};

/** @returns the sign of a severity, drawn with its word for those who do not see it. */
export function SeveritySign({ severity }: { readonly severity: Severity }) {
  const { path, word } = SIGNS[severity];
  return (
    <svg className={`bench-sign bench-sign-${severity}`} viewBox="0 0 16 16" width="16" height="16" role="img" aria-label={word}>
      <path d={path} />
    </svg>
  );
}

export interface FindingsListProps {
  readonly findings: readonly Finding[];
  /** Shows what a finding is about: its parts on the tray, or the field of its setting. */
  readonly onShow: (finding: Finding) => void;
  readonly onApply: (finding: Finding) => void;
}

/** What the rules found, gravest first: a click shows what it is about, a button applies the remedy where it is one value. */
export function FindingsList({ findings, onShow, onApply }: FindingsListProps) {
  if (findings.length === 0) return <p className="hint">Nothing found: the setup keeps every rule.</p>;
  return (
    <ul className="bench-findings">
      {findings.map((finding) => (
        <li key={`${finding.code} ${finding.partIds.join(" ")} ${finding.measured}`} data-finding={finding.code}>
          <SeveritySign severity={finding.severity} />
          <div>
            <button type="button" className="bench-finding" onClick={() => onShow(finding)}>
              <strong>{SIGNS[finding.severity].word}.</strong> {finding.message}
            </button>
            <p className="bench-measured">
              {finding.measured} <span className="bench-note">against {finding.limit}</span>
            </p>
            <details>
              <summary>What to do, and why</summary>
              <p>{finding.remedy}</p>
              <p className="bench-note">Source: {finding.source}</p>
            </details>
            {finding.edit !== null && (
              <button type="button" className="bench-remedy" onClick={() => onApply(finding)}>
                {remedyWords(finding.edit)}
              </button>
            )}
          </div>
        </li>
      ))}
    </ul>
  );
}

import type { Finding, Severity } from "../../../shared-types/plan";
import { texts } from "../../texts/texts";
import { remedyWords } from "./dot";

const words = texts.bench.findings;

/** Octagon, triangle, circle: shapes that speak without colour (after ISO 3864). */
const SIGNS: Readonly<Record<Severity, string>> = {
  stop: "M5.2 1H10.8L15 5.2V10.8L10.8 15H5.2L1 10.8V5.2Z",
  caution: "M8 1.5L15.2 14.5H0.8Z",
  note: "M8 1A7 7 0 1 1 7.99 1Z",
};

/** @returns the sign of a severity, drawn with its word for those who do not see it. */
export function SeveritySign({ severity }: { readonly severity: Severity }) {
  return (
    <svg
      className={`bench-sign bench-sign-${severity}`}
      viewBox="0 0 16 16"
      width="16"
      height="16"
      role="img"
      aria-label={words.severities[severity]}
    >
      <path d={SIGNS[severity]} />
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
  if (findings.length === 0) return <p className="hint">{words.none}</p>;
  return (
    <ul className="bench-findings">
      {findings.map((finding) => (
        <li key={`${finding.code} ${finding.partIds.join(" ")} ${finding.measured}`} data-finding={finding.code}>
          <SeveritySign severity={finding.severity} />
          <div>
            <button type="button" className="bench-finding" onClick={() => onShow(finding)}>
              <strong>{words.severities[finding.severity]}.</strong> {finding.message}
            </button>
            <p className="bench-measured">
              {finding.measured} <span className="bench-note">{words.against(finding.limit)}</span>
            </p>
            <details>
              <summary>{words.more}</summary>
              <p>{finding.remedy}</p>
              <p className="bench-note">{words.source(finding.source)}</p>
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

import type { Finding, Severity } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { thingById } from "../document/edit";
import { texts } from "../texts/texts";
import { outlinedThing } from "./hit";
import { toScreen, type View } from "./view";

const WORST_FIRST: readonly Severity[] = ["stop", "caution", "note"];
const NOTE_WIDTH_PX = 250;
/** Clear of a part's tag and handles, px. */
const BELOW_PX = 34;

/** More words than this would hide the tray; the rest stand in the list of findings. */
const MOST_NOTES = 4;

const sameParts = (a: readonly string[], b: readonly string[]): boolean => a.length === b.length && a.every((id) => b.includes(id));

/** The shapes that stand for a severity (as in ISO 3864: octagon, triangle, circle), the word beside them. */
export function SeverityMark({ severity }: { readonly severity: Severity }) {
  return (
    <svg className={`severity-mark severity-${severity}`} viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
      {severity === "stop" && <path d="M5 .8h6l4.2 4.2v6L11 15.2H5L.8 11V5z" />}
      {severity === "caution" && <path d="M8 1 15.6 14.6H.4z" />}
      {severity === "note" && <circle cx="8" cy="8" r="7.2" />}
      <path
        className="severity-sign"
        d={severity === "note" ? "M8 7v4.5M8 4.4v.2" : severity === "stop" ? "M8 4v5M8 11.6v.2" : "M8 5.6v4.4M8 12v.2"}
      />
    </svg>
  );
}

/** The findings that are about parts, with where on the stage their words stand: below the parts, kept in sight. */
function placedNotes(findings: readonly Finding[], setup: Setup, view: View, attended: ReadonlySet<string>) {
  let nextFree = 0;
  return (
    findings
      .filter(({ severity, partIds }) => partIds.length > 0 && (severity === "stop" || partIds.some((id) => attended.has(id))))
      .sort((a, b) => WORST_FIRST.indexOf(a.severity) - WORST_FIRST.indexOf(b.severity))
      // Of several findings about the same parts the first says it: an overlap also touches.
      .filter(({ partIds }, index, all) => all.findIndex((other) => sameParts(other.partIds, partIds)) === index)
      .slice(0, MOST_NOTES)
      .flatMap((finding) => {
        const boxes = finding.partIds.flatMap((id) => {
          const thing = thingById(setup, id);
          return thing === undefined ? [] : [outlinedThing(thing).box];
        });
        if (boxes.length === 0) return [];
        const middleMm = boxes.reduce((sum, box) => sum + (box[0] + box[2]) / 2, 0) / boxes.length;
        const [x, y] = toScreen(view, middleMm, Math.min(...boxes.map((box) => box[1])));
        const left = Math.round(Math.min(view.widthPx - NOTE_WIDTH_PX - 8, Math.max(8, x - NOTE_WIDTH_PX / 2)));
        const top = Math.round(Math.max(nextFree, Math.min(view.heightPx - 96, y + BELOW_PX)));
        nextFree = top + 72;
        return [{ finding, left, top }];
      })
  );
}

/** What is wrong, in words, where it is: "stop" findings always, the others while their part is selected or under the pointer. */
export function PartNotes(props: {
  readonly findings: readonly Finding[];
  readonly setup: Setup;
  readonly view: View;
  readonly attended: ReadonlySet<string>;
}) {
  return (
    <div className="part-notes">
      {placedNotes(props.findings, props.setup, props.view, props.attended).map(({ finding, left, top }) => (
        <p
          key={`${finding.code} ${finding.partIds.join(" ")}`}
          className={`part-note part-note-${finding.severity}`}
          style={{ left, top, maxWidth: NOTE_WIDTH_PX }}
        >
          <SeverityMark severity={finding.severity} />
          <span>
            <strong>{texts.canvas.severities[finding.severity]}</strong> {finding.message}
          </span>
        </p>
      ))}
    </div>
  );
}

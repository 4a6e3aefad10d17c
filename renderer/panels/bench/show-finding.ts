import type { Finding } from "../../../shared-types/plan";
import type { Document } from "../../document/document";

/** The field on the page that sets a key of the setup. */
const fieldOf = (path: string): HTMLElement | null =>
  globalThis.document.querySelector<HTMLElement>(`[data-setting="${CSS.escape(path)}"]`);

/**
 * Shows what a finding is about: its parts are selected on the tray, the field of its setting takes the focus.
 * @param goToFields brings fields onto the page that are not on it; absent where they all are.
 */
export function showFinding(document: Document, finding: Finding, goToFields?: () => void): void {
  if (finding.partIds.length > 0) document.select(finding.partIds);
  const { about } = finding;
  if (about === null) return;
  if (fieldOf(about) === null) goToFields?.();
  // The desk is drawn before the next frame.
  requestAnimationFrame(() => {
    const field = fieldOf(about);
    field?.focus();
    field?.scrollIntoView({ block: "nearest" });
  });
}

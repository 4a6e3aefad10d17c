import { useEffect, useState } from "react";
import type { Host, KeptDraft, RecentFile } from "../../shared-types/host";
import type { Setup } from "../../shared-types/setup";
import { chainOf, outlineOf } from "../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../engine/geometry/tray-outline";
import type { Files } from "./files";

/** A ready setup with a picture of its own. */
export interface StartExample {
  readonly id: string;
  readonly title: string;
  readonly purpose: string;
  readonly setup: Setup;
}

const pathOf = (loops: readonly (readonly (readonly [number, number])[])[], top: number): string =>
  loops.map((chain) => `M${chain.map(([x, y]) => `${x.toFixed(2)} ${(top - y).toFixed(2)}`).join("L")}Z`).join("");

/** A small picture of a tray, drawn from its setup. */
export function TrayPicture({ setup, heightPx = 120 }: { readonly setup: Setup; readonly heightPx?: number }) {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const margin = 0.05 * Math.max(lengthMm, widthMm);
  const outlineFor = (thing: Setup["parts"][number] | Setup["water"]["slabs"][number]): string =>
    pathOf(
      outlineOf(thing).map((loop) => chainOf(loop, lengthMm / 400)),
      widthMm,
    );
  return (
    <svg
      className="tray-picture"
      viewBox={`${-margin} ${-margin} ${lengthMm + 2 * margin} ${widthMm + 2 * margin}`}
      height={heightPx}
      aria-hidden="true"
      preserveAspectRatio="xMidYMid meet"
    >
      <path className="picture-water" d={pathOf([chainOf(trayOutline(setup.tray), lengthMm / 400)], widthMm)} />
      {setup.water.slabs.map((slab) => (
        <path key={slab.id} className="picture-slab" d={outlineFor(slab)} />
      ))}
      {setup.parts.map((part) => (
        <path key={part.id} className={`picture-${part.role}`} fillRule="evenodd" d={outlineFor(part)} />
      ))}
    </svg>
  );
}

const when = (ms: number): string => new Date(ms).toLocaleString(undefined, { dateStyle: "medium", timeStyle: "short" });

export interface StartPageProps {
  readonly host: Host;
  readonly files: Files;
  readonly examples: readonly StartExample[];
  readonly onBack: (() => void) | null;
}

/** Examples, recent setups, and work that was left behind unsaved. */
export function StartPage({ host, files, examples, onBack }: StartPageProps) {
  const [recent, setRecent] = useState<readonly RecentFile[]>([]);
  const [drafts, setDrafts] = useState<readonly KeptDraft[]>([]);
  useEffect(() => {
    host.recentFiles().then(setRecent, () => setRecent([]));
    host.keptDrafts().then(setDrafts, () => setDrafts([]));
  }, [host]);
  function drop(draft: KeptDraft): void {
    setDrafts(drafts.filter(({ id }) => id !== draft.id));
    void host.discardDraft(draft.id);
  }
  return (
    <main className="start-page">
      <header>
        <div>
          <h1>Plan a tray before any water is poured</h1>
          <p>Begin with an empty tray, a setup of yours, or one of the ready ones from the prep room of Saltmarsh College.</p>
        </div>
        <div className="choices">
          <button type="button" className="strong" onClick={files.newSetup}>
            Empty tray
          </button>
          <button type="button" onClick={() => void files.open()}>
            Open a setup…
          </button>
          {onBack !== null && (
            <button type="button" onClick={onBack}>
              Back to the tray
            </button>
          )}
        </div>
      </header>
      {drafts.length > 0 && (
        <section aria-label="Unsaved work" className="kept">
          <h2>Left behind unsaved</h2>
          <ul>
            {drafts.map((draft) => (
              <li key={draft.id}>
                <span>
                  <strong>{draft.title === "" ? "Untitled tray" : draft.title}</strong> kept {when(draft.keptAtMs)}
                  {draft.file === null ? ", never saved" : `, from ${draft.file.name}`}
                </span>
                <button
                  type="button"
                  onClick={() => {
                    files.bringBack(draft);
                    drop(draft);
                  }}
                >
                  Bring back
                </button>
                <button type="button" onClick={() => drop(draft)}>
                  Not wanted
                </button>
              </li>
            ))}
          </ul>
        </section>
      )}
      {recent.length > 0 && (
        <section aria-label="Recent setups">
          <h2>Recent</h2>
          <ul className="recent">
            {recent.map(({ file, openedAtMs }) => (
              <li key={file.handle}>
                <button type="button" onClick={() => void files.openRecent(file.handle)}>
                  <strong>{file.name}</strong> <span>{file.place}</span> <span>{when(openedAtMs)}</span>
                </button>
              </li>
            ))}
          </ul>
        </section>
      )}
      <section aria-label="Examples">
        <h2>Ready setups</h2>
        <ul className="examples">
          {examples.map(({ id, title, purpose, setup }) => (
            <li key={id}>
              <button type="button" onClick={() => files.showExample(title, setup)}>
                <TrayPicture setup={setup} />
                <strong>{title}</strong>
                <span>{purpose}</span>
              </button>
            </li>
          ))}
        </ul>
      </section>
    </main>
  );
}

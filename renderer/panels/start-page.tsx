import { type ReactNode, useEffect, useState } from "react";
import type { Host, KeptDraft, RecentFile, Settings } from "../../shared-types/host";
import { parseSetupText } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";
import { texts } from "../texts/texts";
import type { Files } from "./files";
import { IconButton } from "./icon-button";
import { pictureOf } from "./recent-pictures";
import { type Pictured, picturedOf, TrayPicture } from "./tray-picture";

const words = texts.files.start;

/** A ready setup with a picture of its own. */
export interface StartExample {
  readonly id: string;
  readonly title: string;
  readonly purpose: string;
  readonly setup: Setup;
}

const when = (ms: number): string => new Date(ms).toLocaleString(undefined, { dateStyle: "medium", timeStyle: "short" });

function Tile(props: {
  readonly pictured: Pictured | null;
  readonly title: string;
  readonly children: ReactNode;
  readonly onPress: () => void;
}) {
  return (
    <button type="button" className="tile" onClick={props.onPress}>
      <span className="tile-picture">{props.pictured !== null && <TrayPicture {...props.pictured} />}</span>
      <strong>{props.title}</strong>
      {props.children}
    </button>
  );
}

function KeptWork({ host, files }: { readonly host: Host; readonly files: Files }) {
  const [drafts, setDrafts] = useState<readonly KeptDraft[]>([]);
  useEffect(() => {
    host.keptDrafts().then(setDrafts, () => setDrafts([]));
  }, [host]);
  function drop(draft: KeptDraft): void {
    setDrafts(drafts.filter(({ id }) => id !== draft.id));
    void host.discardDraft(draft.id);
  }
  if (drafts.length === 0) return null;
  return (
    <section aria-label={words.keptLabel}>
      <h2>{words.kept}</h2>
      <ul className="tiles">
        {drafts.map((draft) => {
          const parsed = parseSetupText(draft.text);
          return (
            <li key={draft.id} className="kept">
              <Tile
                pictured={parsed.ok ? picturedOf(parsed.value) : null}
                title={draft.title === "" ? texts.files.untitled : draft.title}
                onPress={() => {
                  files.bringBack(draft);
                  drop(draft);
                }}
              >
                <span>{texts.files.keptAt(when(draft.keptAtMs), draft.file?.name ?? null)}</span>
                <span className="tile-action">{words.bringBack}</span>
              </Tile>
              <button type="button" onClick={() => drop(draft)}>
                {words.notWanted}
              </button>
            </li>
          );
        })}
      </ul>
    </section>
  );
}

function RecentSetups({ host, files, settings }: { readonly host: Host; readonly files: Files; readonly settings: Settings }) {
  const [recent, setRecent] = useState<readonly RecentFile[]>([]);
  useEffect(() => {
    host.recentFiles().then(setRecent, () => setRecent([]));
  }, [host]);
  if (recent.length === 0) return null;
  return (
    <section aria-label={words.recentLabel}>
      <h2>{words.recent}</h2>
      <ul className="tiles tiles-small">
        {recent.map(({ file, openedAtMs }) => (
          <li key={file.handle} className="recent">
            <Tile
              pictured={pictureOf(settings.preferences, file.handle)}
              title={file.name.replace(/\.fieldtray\.json$/, "")}
              onPress={() => void files.openRecent(file.handle)}
            >
              <span className="tile-place" title={file.place}>
                {file.place}
              </span>
              <span>{when(openedAtMs)}</span>
            </Tile>
            <IconButton
              icon="close"
              name={words.forget(file.name)}
              onPress={() => {
                setRecent(recent.filter((other) => other.file.handle !== file.handle));
                void host.forgetRecent(file.handle);
              }}
            />
          </li>
        ))}
      </ul>
    </section>
  );
}

export interface StartPageProps {
  readonly host: Host;
  readonly files: Files;
  readonly examples: readonly StartExample[];
  readonly settings: Settings;
  readonly onBack: () => void;
}

/** Examples, recent setups, and work that was left behind unsaved. */
export function StartPage({ host, files, examples, settings, onBack }: StartPageProps) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling area must be reachable by keyboard (WCAG 2.1.1)
    <main className="start-page" tabIndex={0}>
      <header>
        <div>
          <h1>{words.title}</h1>
          <p>{words.line}</p>
        </div>
        <div className="choices">
          <button type="button" className="strong" onClick={files.newSetup}>
            {words.empty}
          </button>
          <button type="button" onClick={() => void files.open()}>
            {words.open}
          </button>
          <button type="button" onClick={onBack}>
            {words.back}
          </button>
        </div>
      </header>
      <KeptWork host={host} files={files} />
      <RecentSetups host={host} files={files} settings={settings} />
      <section aria-label={words.examplesLabel}>
        <h2>{words.examples}</h2>
        <ul className="tiles">
          {examples.map(({ id, title, purpose, setup }) => (
            <li key={id}>
              <Tile pictured={picturedOf(setup)} title={title} onPress={() => files.showExample(title, setup)}>
                <span>{purpose}</span>
              </Tile>
            </li>
          ))}
        </ul>
      </section>
    </main>
  );
}

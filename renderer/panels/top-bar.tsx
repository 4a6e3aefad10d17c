import { useStore } from "zustand";
import { type Document, isDirty, redoLabel, undoLabel } from "../document/document";
import { texts } from "../texts/texts";
import type { Files } from "./files";
import { IconButton } from "./icon-button";
import { Icon } from "./icons";
import { DESKS, type WindowStore } from "./window-state";

const words = texts.window;

export interface TopBarProps {
  readonly document: Document;
  readonly window: WindowStore;
  readonly files: Files;
  readonly theme: string;
  readonly onTheme: () => void;
  readonly onPrint: () => void;
}

/** Title, undo and redo, files and printing. */
export function TopBar({ document, window, files, theme, onTheme, onPrint }: TopBarProps) {
  const title = useStore(document, (state) => state.setup.title);
  const dirty = useStore(document, isDirty);
  const fileName = useStore(document, (state) => state.file?.name ?? "");
  const undo = useStore(document, undoLabel);
  const redo = useStore(document, redoLabel);
  const keysShown = useStore(window, (state) => state.keysShown);
  const settingsShown = useStore(window, (state) => state.settingsShown);
  return (
    <header className="top-bar">
      <h1 title={title}>
        {title === "" ? words.untitled : title}
        <span className="unsaved">{dirty ? words.notSaved : fileName}</span>
      </h1>
      <div className="group">
        <IconButton icon="undo" name={words.top.undo(undo)} disabled={undo === null} onPress={document.undo} />
        <IconButton icon="redo" name={words.top.redo(redo)} disabled={redo === null} onPress={document.redo} />
      </div>
      <div className="group">
        <IconButton icon="new" word={words.top.fresh} name={words.top.freshLong} onPress={files.newSetup} />
        <IconButton icon="open" word={words.top.open} name={words.top.openLong} onPress={() => void files.open()} />
        <IconButton icon="save" word={words.top.save} name={words.top.saveLong} onPress={() => void files.save()} />
        <IconButton icon="print" word={words.top.print} name={words.top.printLong} onPress={onPrint} />
      </div>
      <div className="group">
        <IconButton icon="theme" name={words.top.colours(theme)} onPress={onTheme} />
        <IconButton
          icon="settings"
          name={words.top.window}
          pressed={settingsShown}
          onPress={() =>
            window.set({ settingsShown: !settingsShown, keysShown: false, findingsShown: false, closerShown: false, stockShown: false })
          }
        />
        <IconButton
          icon="keys"
          name={words.top.keys}
          pressed={keysShown}
          onPress={() =>
            window.set({ keysShown: !keysShown, settingsShown: false, findingsShown: false, closerShown: false, stockShown: false })
          }
        />
      </div>
    </header>
  );
}

/** The rail of desks at the left, under the way to the start page. */
export function Rail({ window }: { readonly window: WindowStore }) {
  const desk = useStore(window, (state) => state.desk);
  const startPage = useStore(window, (state) => state.startPage);
  return (
    <div className="rail">
      <button
        type="button"
        className="rail-start"
        aria-label={words.startPageLong}
        title={words.startPageLong}
        aria-current={startPage ? "page" : undefined}
        onClick={() => window.set({ startPage: true })}
      >
        <Icon name="home" />
        <span>{words.startPage}</span>
      </button>
      <nav aria-label={words.desks.label}>
        {DESKS.map((one) => (
          <button key={one} type="button" aria-current={!startPage && desk === one ? "page" : undefined} onClick={() => window.goTo(one)}>
            <Icon name={one} />
            <span>{words.desks[one]}</span>
          </button>
        ))}
      </nav>
    </div>
  );
}

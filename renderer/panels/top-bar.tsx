import { useStore } from "zustand";
import { type Document, isDirty, redoLabel, undoLabel } from "../document/document";
import type { Files } from "./files";
import { Icon, type IconName } from "./icons";
import { DESKS, type WindowStore } from "./window-state";

/** A button with a drawing and a name for those who do not see it. */
export function IconButton(props: {
  readonly icon: IconName;
  readonly name: string;
  readonly disabled?: boolean;
  readonly onPress: () => void;
}) {
  return (
    <button
      type="button"
      className="quiet"
      aria-label={props.name}
      title={props.name}
      disabled={props.disabled ?? false}
      onClick={props.onPress}
    >
      <Icon name={props.icon} />
    </button>
  );
}

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
  const state = useStore(document);
  const [undo, redo] = [undoLabel(state), redoLabel(state)];
  return (
    <header className="top-bar">
      <IconButton icon="home" name="Start page: examples and recent setups" onPress={() => window.set({ startPage: true })} />
      <h1>
        {state.setup.title === "" ? "Untitled tray" : state.setup.title}
        <span className="unsaved">{isDirty(state) ? "not saved" : (state.file?.name ?? "")}</span>
      </h1>
      <div className="group">
        <IconButton
          icon="undo"
          name={undo === null ? "Nothing to undo" : `Undo ${undo} (Ctrl+Z)`}
          disabled={undo === null}
          onPress={document.undo}
        />
        <IconButton
          icon="redo"
          name={redo === null ? "Nothing to redo" : `Redo ${redo} (Ctrl+Shift+Z)`}
          disabled={redo === null}
          onPress={document.redo}
        />
      </div>
      <div className="group">
        <IconButton icon="new" name="New tray (Ctrl+N)" onPress={files.newSetup} />
        <IconButton icon="open" name="Open a setup (Ctrl+O)" onPress={() => void files.open()} />
        <IconButton icon="save" name="Save (Ctrl+S)" onPress={() => void files.save()} />
        <IconButton icon="print" name="Print the sheets (Ctrl+P)" onPress={onPrint} />
      </div>
      <div className="group">
        <IconButton icon="theme" name={`Colours: ${theme}`} onPress={onTheme} />
        <IconButton icon="keys" name="Keys (F1)" onPress={() => window.set({ keysShown: !window.getState().keysShown })} />
      </div>
    </header>
  );
}

/** The rail of desks at the left. */
export function Rail({ window }: { readonly window: WindowStore }) {
  const { desk, startPage } = useStore(window);
  return (
    <nav className="rail" aria-label="Desks">
      {DESKS.map(({ desk: one, name }) => (
        <button key={one} type="button" aria-current={!startPage && desk === one ? "page" : undefined} onClick={() => window.goTo(one)}>
          <Icon name={one} />
          <span>{name}</span>
        </button>
      ))}
    </nav>
  );
}

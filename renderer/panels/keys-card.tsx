import { useEffect, useId, useRef, useState } from "react";
import { useStore } from "zustand";
import { COMMAND_MENUS, type CommandEntry } from "../../shared-types/host-commands";
import { texts } from "../texts/texts";
import type { Act } from "./commands";
import { IconButton } from "./icon-button";
import type { WindowStore } from "./window-state";

const words = texts.window.keys;
const keyText = (keys: string | null): string => (keys ?? "").replace("Mod", "Ctrl").replace("Plus", "+");
const nameOf = ({ label }: CommandEntry): string => label.replace("…", "");
/** Cut, copy and paste are the tray's own keys: here they have nothing to act on, for the focus is in this card. */
const HEARD_ONLY: ReadonlySet<string> = new Set(["cut", "copy", "paste", "keys"]);

/** Every action with its key: a list to look at, and to run from by a word of its name. */
export function KeysCard({ window, act }: { readonly window: WindowStore; readonly act: Act }) {
  const shown = useStore(window, (state) => state.keysShown);
  return shown ? <OpenKeysCard window={window} act={act} /> : null;
}

function OpenKeysCard({ window, act }: { readonly window: WindowStore; readonly act: Act }) {
  const id = useId();
  const [wanted, setWanted] = useState("");
  const card = useRef<HTMLElement>(null);
  const cameFrom = useRef<Element | null>(null);
  const close = (): void => {
    window.set({ keysShown: false });
    if (cameFrom.current instanceof HTMLElement) cameFrom.current.focus();
  };
  useEffect(() => {
    cameFrom.current = globalThis.document.activeElement;
    card.current?.querySelector("input")?.focus();
  }, []);
  const fits = (entry: CommandEntry): boolean => nameOf(entry).toLowerCase().includes(wanted.trim().toLowerCase());
  const menus = COMMAND_MENUS.map(({ label, groups }) => ({
    label,
    entries: groups.flat().filter((entry) => fits(entry) && (wanted === "" || !HEARD_ONLY.has(entry.command))),
  }));
  const runnable = menus.flatMap(({ entries }) => entries.filter(({ command }) => !HEARD_ONLY.has(command)));
  const run = (entry: CommandEntry): void => {
    close();
    act(entry.command);
  };
  return (
    <section
      ref={card}
      className="float-card keys-card"
      aria-label={words.title}
      onKeyDown={(event) => {
        if (event.key !== "Escape") return;
        event.stopPropagation();
        close();
      }}
    >
      <header className="card-head">
        <h2>{words.title}</h2>
        <IconButton icon="close" name={words.close} onPress={close} />
      </header>
      <div className="field field-text">
        <label htmlFor={id}>{words.find}</label>
        <span className="field-box">
          <input
            id={id}
            value={wanted}
            autoComplete="off"
            onChange={(event) => setWanted(event.target.value)}
            onKeyDown={(event) => event.key === "Enter" && runnable.length > 0 && run(runnable[0])}
          />
        </span>
      </div>
      {wanted !== "" && runnable.length === 0 && <p className="hint">{words.nothingFits}</p>}
      {menus
        .filter(({ entries }) => entries.length > 0)
        .map(({ label, entries }) => (
          <div key={label}>
            <h3>{label}</h3>
            <ul className="key-list">
              {entries.map((entry) => (
                <li key={entry.command}>
                  {HEARD_ONLY.has(entry.command) ? (
                    <span className="key-name">{nameOf(entry)}</span>
                  ) : (
                    <button type="button" className="key-name" onClick={() => run(entry)}>
                      {nameOf(entry)}
                    </button>
                  )}
                  {entry.keys !== null && <kbd>{keyText(entry.keys)}</kbd>}
                </li>
              ))}
            </ul>
          </div>
        ))}
      {wanted === "" && (
        <>
          <h3>{words.onTheTray}</h3>
          <ul className="key-list">
            {words.tray.map(([keys, what]) => (
              <li key={keys}>
                <span className="key-name">{what}</span>
                <kbd>{keys}</kbd>
              </li>
            ))}
          </ul>
        </>
      )}
    </section>
  );
}

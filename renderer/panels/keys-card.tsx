import { useStore } from "zustand";
import { COMMAND_MENUS } from "../../shared-types/host-commands";
import { Icon } from "./icons";
import type { WindowStore } from "./window-state";

const ON_THE_TRAY: readonly (readonly [string, string])[] = [
  ["Arrow keys", "move by 1 mm (Shift 10 mm, Alt 0.1 mm)"],
  ["L, R", "turn left and right by 5° (Shift 45°)"],
  ["Delete", "take away"],
  ["Ctrl+D", "duplicate"],
  ["Ctrl+A, Escape", "select all, select nothing"],
  ["+ − 0", "closer, further away, whole tray"],
];

/** All keys in one place. */
export function KeysCard({ window }: { readonly window: WindowStore }) {
  const shown = useStore(window, (state) => state.keysShown);
  if (!shown) return null;
  return (
    <section className="keys-card" aria-label="Keys">
      <header className="card-head">
        <h2>Keys</h2>
        <button type="button" className="quiet" aria-label="Close" onClick={() => window.set({ keysShown: false })}>
          <Icon name="close" />
        </button>
      </header>
      <h3>On the tray</h3>
      <dl>
        {ON_THE_TRAY.map(([keys, what]) => (
          <div key={keys}>
            <dt>{keys}</dt>
            <dd>{what}</dd>
          </div>
        ))}
      </dl>
      {COMMAND_MENUS.map(({ label, groups }) => (
        <div key={label}>
          <h3>{label}</h3>
          <dl>
            {groups
              .flat()
              .filter(({ keys }) => keys !== null)
              .map(({ command, label: what, keys }) => (
                <div key={command}>
                  <dt>{keys?.replace("Mod", "Ctrl")}</dt>
                  <dd>{what.replace("…", "")}</dd>
                </div>
              ))}
          </dl>
        </div>
      ))}
    </section>
  );
}

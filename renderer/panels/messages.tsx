import { useStore } from "zustand";
import { texts } from "../texts/texts";
import { Icon } from "./icons";
import type { WindowStore } from "./window-state";

/** Cards that tell what went wrong or ask what to do; the tray stays usable behind them. */
export function Messages({ window }: { readonly window: WindowStore }) {
  const messages = useStore(window, (state) => state.messages);
  return (
    <div className="messages" aria-live="assertive">
      {messages.map(({ id, tone, title, lines, choices, progress }) => (
        <section
          key={id}
          className={`message message-${tone}`}
          role={tone === "done" || tone === "working" ? "status" : "alertdialog"}
          aria-label={title}
        >
          <header>
            <h2>{title}</h2>
            <button type="button" className="quiet" aria-label={texts.window.messages.close} onClick={() => window.dismiss(id)}>
              <Icon name="close" />
            </button>
          </header>
          {lines.map((line) => (
            <p key={line}>{line}</p>
          ))}
          {progress !== undefined && <progress value={progress} aria-label={title} />}
          {choices.length > 0 && (
            <div className="choices">
              {choices.map(({ label, choose }) => (
                <button
                  key={label}
                  type="button"
                  onClick={() => {
                    choose();
                    window.dismiss(id);
                  }}
                >
                  {label}
                </button>
              ))}
            </div>
          )}
        </section>
      ))}
    </div>
  );
}

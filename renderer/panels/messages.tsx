import { useState } from "react";
import { useStore } from "zustand";
import type { Host } from "../../shared-types/host";
import { texts } from "../texts/texts";
import { Icon } from "./icons";
import { TrayPicture } from "./tray-picture";
import type { Message, WindowStore } from "./window-state";

/** Puts what was told on the clipboard, with what a report of it should carry. */
function CopyDetails({ host, message: { title, lines } }: { readonly host: Host; readonly message: Message }) {
  const words = texts.window.fault;
  const [copied, setCopied] = useState(false);
  const copy = async (): Promise<void> => setCopied(await host.copyText([title, ...lines, await host.details()].join("\n")));
  return (
    <button type="button" onClick={() => void copy()}>
      {copied ? words.copied : words.copy}
    </button>
  );
}

/** Cards that tell what went wrong or ask what to do; the tray stays usable behind them. */
export function Messages({ host, window }: { readonly host: Host; readonly window: WindowStore }) {
  const messages = useStore(window, (state) => state.messages);
  return (
    <div className="messages" aria-live="assertive">
      {messages.map((message) => (
        <MessageCard key={message.id} host={host} window={window} message={message} />
      ))}
    </div>
  );
}

function MessageCard({ host, window, message }: { readonly host: Host; readonly window: WindowStore; readonly message: Message }) {
  const { id, tone, title, lines, choices, pictures, progress } = message;
  return (
    <section
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
      {pictures !== undefined && (
        <div className="message-pictures">
          {pictures.map(({ caption, pictured }) => (
            <figure key={caption}>
              <TrayPicture {...pictured} />
              <figcaption>{caption}</figcaption>
            </figure>
          ))}
        </div>
      )}
      {progress !== undefined && <progress value={progress} aria-label={title} />}
      {(choices.length > 0 || tone === "problem") && (
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
          {tone === "problem" && <CopyDetails host={host} message={message} />}
        </div>
      )}
    </section>
  );
}

import { useEffect } from "react";
import type { Host, HostEvent } from "../../shared-types/host";
import { keepDraft } from "../document/autosave";
import { type Document, isDirty } from "../document/document";
import { texts } from "../texts/texts";
import { type Act, actOnKey } from "./commands";
import type { Files } from "./files";
import type { WindowStore } from "./window-state";

const words = texts.files;
const reasonOf = (reason: unknown): string => (reason instanceof Error ? reason.message : String(reason));

/** Follows what the surroundings tell: menus and keys, files that arrive, files that change behind the window. */
export function useHostEvents(host: Host, window: WindowStore, files: Files, act: Act): void {
  useEffect(() => {
    const take = (event: HostEvent): void => {
      switch (event.kind) {
        case "command":
          act(event.command);
          return;
        case "file-arrived":
          files.take(event.file, event.text);
          return;
        case "file-refused":
          window.tell({ tone: "problem", title: words.noFileOpened, lines: [event.message], choices: [] });
          return;
        case "save-and-close":
          void files.save().then((saved) => saved && host.closeWindow());
          return;
        case "changed-on-disk":
          window.tell({
            tone: "question",
            title: event.gone ? words.takenAway(event.file.name) : words.changedOutside(event.file.name),
            lines: [words.hereUnchanged],
            choices: event.gone ? [] : [{ label: words.readAgain, choose: () => void files.openRecent(event.file.handle) }],
          });
      }
    };
    return host.listen(take);
  }, [host, act, files, window]);
  useEffect(() => {
    const onKey = (event: KeyboardEvent): void => actOnKey(event, act);
    globalThis.addEventListener("keydown", onKey);
    return () => globalThis.removeEventListener("keydown", onKey);
  }, [act]);
}

/** Keeps unsaved work against a crash, and offers what an earlier window left behind. */
export function useDrafts(host: Host, document: Document, window: WindowStore, files: Files): void {
  useEffect(() => {
    host.keptDrafts().then(
      (drafts) => {
        if (drafts.length > 0) window.tell(files.offerKept(drafts[0], drafts.length));
      },
      () => {},
    );
  }, [host, window, files]);
  useEffect(() => {
    const stop = keepDraft(document, host, (reason) =>
      window.tell({ tone: "problem", title: words.draftFails, lines: [reasonOf(reason)], choices: [] }),
    );
    return () => void stop();
  }, [document, host, window]);
}

/** Shows name and unsaved mark in the window's title. */
export function useWindowTitle(host: Host, document: Document): void {
  useEffect(() => {
    const show = (): void => {
      const state = document.getState();
      host.setTitle({ name: state.setup.title, handle: state.file?.handle ?? null, unsaved: isDirty(state) });
    };
    show();
    return document.subscribe(show);
  }, [document, host]);
}

/** Tells the faults of ours that no desk caught, with a way to hand on the details. */
export function useFaultMessages(host: Host, window: WindowStore): void {
  useEffect(() => {
    const tell = (reason: unknown): void => {
      const message = reasonOf(reason);
      host.log({ level: "error", message: (reason instanceof Error ? `${message}\n${reason.stack ?? ""}` : message).slice(0, 8000) });
      const { fault } = texts.window;
      window.tell({ tone: "problem", title: fault.window, lines: [message, fault.windowLine], choices: [] });
    };
    const onError = (event: ErrorEvent): void => tell(event.error ?? event.message);
    const onRejection = (event: PromiseRejectionEvent): void => tell(event.reason);
    globalThis.addEventListener("error", onError);
    globalThis.addEventListener("unhandledrejection", onRejection);
    return () => {
      globalThis.removeEventListener("error", onError);
      globalThis.removeEventListener("unhandledrejection", onRejection);
    };
  }, [host, window]);
}

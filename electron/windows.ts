import { randomUUID } from "node:crypto";
import { join } from "node:path";
import { BrowserWindow, nativeTheme, screen } from "electron";
import type { HostEvent, WindowTitle } from "../shared-types/host";
import { EVENT_CHANNEL } from "../shared-types/host-channel-names";
import { askBeforeClosing } from "./dialogs";
import type { OwnFile } from "./own-files";
import { WINDOW_ADDRESS } from "./protocol";
import { placeOnScreen, SMALLEST, type WindowPlace } from "./window-place";

/** An open window and what the process knows of the setup in it. */
export interface OpenWindow {
  readonly browserWindow: BrowserWindow;
  /** Names this window's draft; a page that was loaded anew gets a new one, so that the old draft is offered to it. */
  draftId: string;
  shown: WindowTitle;
  /** Events wait here until the page listens. */
  waiting: HostEvent[] | null;
  /** The page has died or does not answer: closing must not wait for it. */
  isDead: boolean;
}

export interface Windows {
  readonly open: () => Promise<OpenWindow>;
  readonly all: () => readonly OpenWindow[];
  readonly ofContents: (id: number) => OpenWindow | null;
  readonly send: (window: OpenWindow, event: HostEvent) => void;
  /** The page listens now: what came earlier follows. */
  readonly ready: (window: OpenWindow) => void;
  readonly show: (window: OpenWindow, title: WindowTitle) => void;
}

export interface WindowsParts {
  readonly preload: string;
  readonly place: OwnFile<WindowPlace | null>;
  readonly clearDraft: (draftId: string) => Promise<void>;
  /** Tells that a page has died. @returns whether it should be loaded again. */
  readonly onDied: (reason: string) => Promise<boolean>;
  readonly onClosed: () => void;
}

const NOTHING_SHOWN: WindowTitle = { name: "", handle: null, unsaved: false };

/** Colours under the page until it is painted: those of its own light and dark look. */
const background = (): string => (nativeTheme.shouldUseDarkColors ? "#15191e" : "#f5f6f7");

export function openWindows({ preload, place, clearDraft, onDied, onClosed }: WindowsParts): Windows {
  const windows = new Map<number, OpenWindow>();

  const current = (browserWindow: BrowserWindow): WindowPlace => ({
    ...browserWindow.getNormalBounds(),
    maximized: browserWindow.isMaximized(),
  });

  function send(window: OpenWindow, event: HostEvent): void {
    if (window.waiting !== null) window.waiting.push(event);
    else if (!window.browserWindow.isDestroyed()) window.browserWindow.webContents.send(EVENT_CHANNEL, event);
  }

  async function askAndClose(window: OpenWindow): Promise<void> {
    const answer = await askBeforeClosing(window.browserWindow, window.shown.name || "The setup");
    if (answer === "save") send(window, { kind: "save-and-close" });
    if (answer !== "discard") return;
    await clearDraft(window.draftId).catch(() => {});
    window.browserWindow.destroy();
  }

  function follow(window: OpenWindow): void {
    const { browserWindow } = window;
    const { webContents } = browserWindow;
    let loaded = false;
    browserWindow.once("ready-to-show", () => browserWindow.show());
    browserWindow.on("page-title-updated", (event) => event.preventDefault());
    browserWindow.on("close", (event) => {
      void place.write(current(browserWindow)).catch(() => {});
      if (!window.shown.unsaved || window.isDead) return;
      event.preventDefault();
      void askAndClose(window);
    });
    browserWindow.on("closed", () => {
      windows.delete(id);
      onClosed();
    });
    const { id } = webContents;
    webContents.on("did-start-loading", () => {
      if (loaded) Object.assign(window, { draftId: randomUUID(), waiting: [], shown: NOTHING_SHOWN, isDead: false });
      loaded = true;
    });
    webContents.on("render-process-gone", (_event, { reason }) => {
      if (reason === "clean-exit") return;
      window.isDead = true;
      void onDied(reason).then((again) => {
        if (browserWindow.isDestroyed()) return;
        if (again) void browserWindow.loadURL(WINDOW_ADDRESS);
        else browserWindow.destroy();
      });
    });
  }

  async function open(): Promise<OpenWindow> {
    const areas = [screen.getPrimaryDisplay(), ...screen.getAllDisplays()].map(({ workArea }) => workArea);
    const { maximized, ...bounds } = placeOnScreen(await place.read(), areas);
    const shift = 28 * windows.size;
    const browserWindow = new BrowserWindow({
      ...bounds,
      x: bounds.x + shift,
      y: bounds.y + shift,
      minWidth: SMALLEST.width,
      minHeight: SMALLEST.height,
      show: false,
      title: "Fieldtray",
      backgroundColor: background(),
      webPreferences: {
        preload,
        contextIsolation: true,
        sandbox: true,
        nodeIntegration: false,
        webSecurity: true,
        spellcheck: false,
      },
    });
    if (maximized) browserWindow.maximize();
    const window: OpenWindow = { browserWindow, draftId: randomUUID(), shown: NOTHING_SHOWN, waiting: [], isDead: false };
    windows.set(browserWindow.webContents.id, window);
    follow(window);
    await browserWindow.loadURL(WINDOW_ADDRESS);
    return window;
  }

  return {
    open,
    all: () => [...windows.values()],
    ofContents: (id) => windows.get(id) ?? null,
    send,
    ready: (window) => {
      const waiting = window.waiting ?? [];
      window.waiting = null;
      for (const event of waiting) send(window, event);
    },
    show: (window, title) => {
      window.shown = title;
      const { browserWindow } = window;
      browserWindow.setTitle(`${title.unsaved ? "• " : ""}${title.name === "" ? "" : `${title.name} – `}Fieldtray`);
      browserWindow.setDocumentEdited(title.unsaved);
    },
  };
}

/** @returns the path of the compiled preload beside the compiled main file. */
export const preloadPath = (): string => join(__dirname, "preload.cjs");

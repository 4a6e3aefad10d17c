import { join } from "node:path";
import { app, BrowserWindow, clipboard, session, shell } from "electron";
import { type RecentFile, settingsSchema } from "../shared-types/host";
import type { Command } from "../shared-types/host-commands";
import { openDoors } from "./channels";
import { showAbout, tellOfFault } from "./dialogs";
import { doorsOf, followTheme } from "./doors";
import { drafts as keepDrafts } from "./drafts";
import { fileArguments } from "./file-arguments";
import { denyPermissions, guardPages } from "./guards";
import { knownFiles } from "./known-files";
import { openLog } from "./log";
import { showMenu } from "./menu";
import { ownFile } from "./own-files";
import { announceScheme, servePages } from "./protocol";
import { recentSchema, recent as recentSetups } from "./recent";
import { watchOpenFiles } from "./watch-open-files";
import { windowPlaceSchema } from "./window-place";
import { type OpenWindow, openWindows, preloadPath } from "./windows";

/** The desktop process: composition only. Each concern has its own file. */

announceScheme();
if (process.env.FIELDTRAY_USER_DATA) app.setPath("userData", process.env.FIELDTRAY_USER_DATA);

const inUserData = (...parts: readonly string[]): string => join(app.getPath("userData"), ...parts);
const log = openLog(inUserData("logs", "fieldtray.log"), () => new Date());
const note = (message: string): void => log.write({ level: "warning", message });
const onMac = process.platform === "darwin";

const details = (): string =>
  [
    `Fieldtray ${app.getVersion()}, Electron ${process.versions.electron}, Chromium ${process.versions.chrome}, Node ${process.versions.node}`,
    `${process.platform} ${process.getSystemVersion()} ${process.arch}`,
    ...log.newest(),
  ].join("\n");

const files = knownFiles();
const settings = ownFile(inUserData("settings.json"), settingsSchema, settingsSchema.parse({}), note);
const drafts = keepDrafts(inUserData("drafts"), files, Date.now, note);
const recentList = ownFile(inUserData("recent.json"), recentSchema, [], note);
const recent = recentSetups(recentList, files, Date.now, (list, opened) => {
  refreshMenu(list);
  if (opened !== null) app.addRecentDocument(opened);
});
const place = ownFile(inUserData("window.json"), windowPlaceSchema.nullable(), null, note);
const windows = openWindows({
  preload: preloadPath(),
  place,
  clearDraft: drafts.clear,
  onDied: (reason) => {
    log.write({ level: "error", message: `the window's page stopped: ${reason}` });
    return tellOfFault("The window has stopped working.", details, "Start it again");
  },
  onClosed: () => {
    if (quitting && windows.all().length === 0) app.quit();
  },
});

let quitting = false;
let settled = false;
/** Files that the system asked for before the first window could be opened. */
let early: string[] | null = [];

const inFront = (): OpenWindow | undefined => {
  const focused = BrowserWindow.getFocusedWindow();
  return windows.all().find(({ browserWindow }) => browserWindow === focused) ?? windows.all().at(-1);
};

function refreshMenu(list: readonly RecentFile[]): void {
  const act = {
    command: (command: Command) => {
      const window = inFront();
      if (window !== undefined) windows.send(window, { kind: "command", command });
    },
    openRecent: (handle: string) => void arrive(files.pathOf(handle)),
    newWindow: () => void windows.open(),
    copyDetails: () => clipboard.writeText(details()),
    showLog: () => shell.showItemInFolder(log.path),
    about: () => void showAbout(app.getVersion()),
  };
  showMenu(list, act, onMac);
}

/** Shows a file that came from outside: in the window in front if nothing is open there yet, else in one of its own. */
async function arrive(path: string | null, into?: OpenWindow): Promise<void> {
  if (path === null) return;
  if (early !== null) {
    early.push(path);
    return;
  }
  const front = inFront();
  const isFree = front !== undefined && front.shown.handle === null && !front.shown.unsaved;
  const window = into ?? (isFree ? front : await windows.open());
  const outcome = await files.read(path);
  if (outcome.kind === "opened") {
    await recent.note(path).catch((error: unknown) => note(String(error)));
    windows.send(window, { kind: "file-arrived", file: outcome.file, text: outcome.text });
  } else if (outcome.kind === "failed") windows.send(window, { kind: "file-refused", message: outcome.message });
  window.browserWindow.show();
  window.browserWindow.focus();
}

async function start(): Promise<void> {
  denyPermissions(session.defaultSession);
  servePages(session.defaultSession, join(__dirname, "..", "renderer"));
  openDoors(
    doorsOf({ files, recent, drafts, settings, windows, log, details }),
    windows,
    (window, path) => void arrive(path, window),
    note,
  );
  followTheme((await settings.read()).theme);
  refreshMenu(await recent.list());
  watchOpenFiles(files, windows);
  const named = [...fileArguments(process.argv, app.isPackaged, process.cwd()), ...(early ?? [])];
  early = null;
  await windows.open();
  for (const path of named) await arrive(path);
}

let tellingOfFault = false;

/** A fault of ours is written down and told of, one at a time: the telling itself may fail too. */
function fault(error: unknown): void {
  log.write({ level: "error", message: error instanceof Error ? (error.stack ?? error.message) : String(error) });
  if (tellingOfFault) return;
  if (!app.isReady()) {
    app.exit(1);
    return;
  }
  tellingOfFault = true;
  tellOfFault("Fieldtray has met a fault of its own.", details, "Go on").then(
    (goOn) => {
      tellingOfFault = false;
      if (!goOn) app.exit(1);
    },
    (reason: unknown) => log.write({ level: "error", message: `the fault could not be told of: ${String(reason)}` }),
  );
}

guardPages(note);
process.on("uncaughtException", fault);
process.on("unhandledRejection", fault);
app.on("open-file", (event, path) => {
  event.preventDefault();
  void arrive(path);
});
app.on("before-quit", () => {
  quitting = true;
});
// What was set going in the last moment still gets to the disk.
app.on("will-quit", (event) => {
  if (settled) return;
  event.preventDefault();
  void Promise.all([settings, recentList, place].map((file) => file.settled())).then(() => {
    settled = true;
    app.quit();
  });
});
app.on("window-all-closed", () => {
  if (!onMac) app.quit();
});
app.on("activate", () => {
  if (windows.all().length === 0 && early === null) void windows.open();
});

const named = [...fileArguments(process.argv, app.isPackaged, process.cwd())];
if (app.requestSingleInstanceLock({ files: named })) {
  app.on("second-instance", (_event, argv, folder, data) => {
    const given = typeof data === "object" && data !== null && "files" in data && Array.isArray(data.files) ? data.files.map(String) : null;
    const paths = given ?? fileArguments(argv, app.isPackaged, folder);
    if (paths.length === 0) inFront()?.browserWindow.focus();
    for (const path of paths) void arrive(path);
  });
  app.whenReady().then(start).catch(fault);
} else app.quit();

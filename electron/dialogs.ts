import { type BrowserWindow, clipboard, dialog, type FileFilter } from "electron";
import type { DocumentKind } from "../shared-types/host";

/** The questions that the system's own dialogs ask. */

const SETUP_FILTERS: FileFilter[] = [
  { name: "Fieldtray setup", extensions: ["fieldtray.json", "json"] },
  { name: "All files", extensions: ["*"] },
];
const NAMES: Readonly<Record<DocumentKind, string>> = {
  pdf: "PDF document",
  csv: "Table (CSV)",
  svg: "SVG drawing",
  dxf: "DXF drawing",
  png: "PNG picture",
  json: "JSON file",
};
const filtersOf = (kind: DocumentKind): FileFilter[] => [
  { name: NAMES[kind], extensions: [kind] },
  { name: "All files", extensions: ["*"] },
];

async function askForFile(window: BrowserWindow, title: string, filters: FileFilter[]): Promise<string | null> {
  const { canceled, filePaths } = await dialog.showOpenDialog(window, { title, filters, properties: ["openFile"] });
  return canceled ? null : (filePaths[0] ?? null);
}

async function askForTarget(window: BrowserWindow, title: string, defaultPath: string, filters: FileFilter[]): Promise<string | null> {
  const properties = ["createDirectory" as const, "showOverwriteConfirmation" as const];
  const { canceled, filePath } = await dialog.showSaveDialog(window, { title, defaultPath, filters, properties });
  return canceled || !filePath ? null : filePath;
}

/** @returns the path that the user picked, null when they changed their mind. */
export const askForSetup = (window: BrowserWindow): Promise<string | null> => askForFile(window, "Open a setup", SETUP_FILTERS);
export const askForDocument = (window: BrowserWindow, kind: DocumentKind): Promise<string | null> =>
  askForFile(window, "Read a file", filtersOf(kind));

/** @returns where the setup is to be saved, with the setups' own ending when the user gave none. */
export async function askForSetupTarget(window: BrowserWindow, suggestedName: string): Promise<string | null> {
  const path = await askForTarget(window, "Save the setup", suggestedName, SETUP_FILTERS);
  return path === null || /\.json$/i.test(path) ? path : `${path}.fieldtray.json`;
}

export async function askForDocumentTarget(window: BrowserWindow, suggestedName: string, kind: DocumentKind): Promise<string | null> {
  const path = await askForTarget(window, "Save", suggestedName, filtersOf(kind));
  return path === null || path.toLowerCase().endsWith(`.${kind}`) ? path : `${path}.${kind}`;
}

/** Asks what is to become of unsaved work. */
export async function askBeforeClosing(window: BrowserWindow, name: string): Promise<"save" | "discard" | "stay"> {
  const { response } = await dialog.showMessageBox(window, {
    type: "question",
    message: `${name} has changes that are not saved.`,
    detail: "Closing without saving gives them up.",
    buttons: ["Save", "Close without saving", "Stay"],
    defaultId: 0,
    cancelId: 2,
    noLink: true,
  });
  return response === 0 ? "save" : response === 1 ? "discard" : "stay";
}

/** Tells of a fault of ours; the details can be copied. @returns whether the user wants to go on. */
export async function tellOfFault(message: string, details: () => string, goOn: string): Promise<boolean> {
  for (;;) {
    const { response } = await dialog.showMessageBox({
      type: "error",
      message,
      detail: "Unsaved work is kept as a draft and offered at the next start.",
      buttons: [goOn, "Copy details", "Close"],
      defaultId: 0,
      cancelId: 2,
      noLink: true,
    });
    if (response !== 1) return response === 0;
    clipboard.writeText(details());
  }
}

/** Says what this program is. */
export async function showAbout(version: string): Promise<void> {
  await dialog.showMessageBox({
    type: "info",
    message: `Fieldtray ${version}`,
    detail: "Plans an electrolytic-tank session before any water is poured. MIT licence; the licences of its parts lie beside the program.",
    buttons: ["Close"],
  });
}

import { randomUUID } from "node:crypto";
import { BrowserWindow, session } from "electron";
import type { PrintOutcome, PrintRequest } from "../shared-types/host";
import { denyPermissions } from "./guards";
import { servePdf } from "./protocol";

/** How long the PDF viewer is given to lay out its pages after it has loaded, ms; an estimate on the safe side, not measured. */
const SETTLE_MS = 600;

const settled = (): Promise<void> => new Promise((resolve) => setTimeout(resolve, SETTLE_MS));

/**
 * Prints a finished PDF through the system's dialog. The PDF is loaded into a window that nobody sees, in a session that knows nothing but
 * this PDF; the file itself says that it must not be scaled, and the print job says so again.
 */
export async function printPdf(parent: BrowserWindow, { title, bytes }: PrintRequest): Promise<PrintOutcome> {
  const own = session.fromPartition(`print-${randomUUID()}`);
  denyPermissions(own);
  const window = new BrowserWindow({
    show: false,
    parent,
    title,
    webPreferences: { session: own, sandbox: true, contextIsolation: true, nodeIntegration: false },
  });
  try {
    await window.loadURL(servePdf(own, bytes));
    await settled();
    return await new Promise<PrintOutcome>((resolve) => {
      const job = { silent: false, printBackground: true, scaleFactor: 100, margins: { marginType: "none" as const } };
      window.webContents.print(job, (success, reason) => {
        if (success) resolve({ kind: "printed" });
        else if (/cancel/i.test(reason)) resolve({ kind: "cancelled" });
        else
          resolve({ kind: "failed", message: `${title} could not be printed: ${reason}. Save the sheets as PDF and print that at 100 %.` });
      });
    });
  } catch (error) {
    return { kind: "failed", message: `${title} could not be printed: ${error instanceof Error ? error.message : String(error)}` };
  } finally {
    if (!window.isDestroyed()) window.destroy();
  }
}

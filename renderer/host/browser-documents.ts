import type { DocumentKind, ExportOutcome, ExportRequest, OpenOutcome, PrintOutcome, PrintRequest } from "../../shared-types/host";
import { download, type FileType, inPlainWords, pickFile, pickTarget, textOf, writeThrough } from "./browser-files";

const MIME: Readonly<Record<DocumentKind, string>> = {
  pdf: "application/pdf",
  svg: "image/svg+xml",
  dxf: "image/vnd.dxf",
  csv: "text/csv",
  png: "image/png",
  json: "application/json",
};
const NAMES: Readonly<Record<DocumentKind, string>> = {
  pdf: "PDF document",
  svg: "SVG drawing",
  dxf: "DXF drawing",
  csv: "Table (CSV)",
  png: "PNG picture",
  json: "JSON file",
};

const typeOf = (kind: DocumentKind): FileType => ({ description: NAMES[kind], accept: { [MIME[kind]]: [`.${kind}`] } });
const asBlob = (bytes: Uint8Array, kind: DocumentKind): Blob => new Blob([bytes.slice()], { type: MIME[kind] });

/** Saves a finished document where the user says, or offers it as a download. */
export async function exportDocument(page: Window, { suggestedName, kind, bytes }: ExportRequest): Promise<ExportOutcome> {
  const content = asBlob(bytes, kind);
  try {
    const target = await pickTarget(page, suggestedName, typeOf(kind)).catch((error: unknown) => {
      // Making a long pack can outlast the moment in which the browser lets a page ask: then it becomes a download.
      if (error instanceof DOMException && error.name === "SecurityError") return undefined;
      throw error;
    });
    if (target === null) return { kind: "cancelled" };
    if (target === undefined) download(page, suggestedName, content);
    else await writeThrough(target, content);
    return { kind: "saved", name: target?.name ?? suggestedName };
  } catch (error) {
    return { kind: "failed", message: inPlainWords(error, suggestedName, "written") };
  }
}

/** Reads a text file that the user picks; it gets a handle of its own that nothing else knows. */
export async function importDocument(page: Window, kind: "csv" | "json"): Promise<OpenOutcome> {
  const picked = await pickFile(page, typeOf(kind));
  if (picked === null) return { kind: "cancelled" };
  const { file } = picked;
  try {
    return { kind: "opened", file: { handle: page.crypto.randomUUID(), name: file.name, place: "" }, text: await textOf(file) };
  } catch (error) {
    return { kind: "failed", message: inPlainWords(error, file.name, "read") };
  }
}

/**
 * Shows a PDF in the browser's own viewer, which prints it at actual size (the file asks for that); a frame inside this page would be
 * fitted to the paper. Where no window may be opened, the PDF is offered for saving.
 * @param serverAddress of the local window server's store, beside which it can show the file under its own name; null without one.
 */
export async function printDocument(page: Window, { title, bytes }: PrintRequest, serverAddress: string | null): Promise<PrintOutcome> {
  const address =
    (serverAddress === null ? null : await shownByServer(page, title, bytes, serverAddress)) ?? URL.createObjectURL(asBlob(bytes, "pdf"));
  const opened = page.open(address, "_blank", "popup,width=1000,height=800");
  if (address.startsWith("blob:")) page.setTimeout(() => URL.revokeObjectURL(address), 600_000);
  if (opened !== null) return { kind: "shown" };
  const saved = await exportDocument(page, { suggestedName: `${title}.pdf`, kind: "pdf", bytes });
  return saved.kind === "saved" ? { kind: "shown" } : saved;
}

async function shownByServer(page: Window, title: string, bytes: Uint8Array, serverAddress: string): Promise<string | null> {
  const name = `${title.replace(/[^\p{L}\p{N} ._-]+/gu, " ").trim() || "sheets"}.pdf`;
  const address = new URL(`../print/${encodeURIComponent(name)}`, serverAddress).href;
  const kept = await page.fetch(address, { method: "PUT", body: asBlob(bytes, "pdf") }).catch(() => null);
  return kept?.ok === true ? address : null;
}

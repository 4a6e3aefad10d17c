import type { jsPDF } from "jspdf";
import type { Item, TextItem } from "./page";

/**
 * What makes a PDF readable to a screen reader: every piece of a page belongs to a heading, a line of text, a figure with words in its place,
 * or to nothing (ISO 32000-1, 14.7 and 14.8). The pieces follow each other as the page's items do, which is the order of reading.
 */

/** jsPDF's own ways to write into the file, which its type declarations leave out. */
interface Writing {
  readonly write: (line: string) => void;
  readonly newObjectDeferred: () => number;
  readonly newObjectDeferredBegin: (id: number, remember: boolean) => void;
  readonly getPageInfo: (pageNumber: number) => { readonly objId: number };
}

type Role = "H1" | "H2" | "P" | "Figure";

interface Piece {
  readonly role: Role;
  /** Words in place of a figure. */
  readonly instead: string | null;
}

/** Type of this size and more, set bold, is a heading. */
const HEADING_MM = 3.6;

/** Text as PDF keeps any script: UTF-16, big end first, in hexadecimal digits. */
const unicode = (words: string): string =>
  `<FEFF${Array.from({ length: words.length }, (_, k) => words.charCodeAt(k).toString(16).padStart(4, "0")).join("")}>`;

const roleOf = ({ bold, sizeMm }: TextItem): Role => (bold === true && sizeMm >= HEADING_MM ? "H2" : "P");

/** Texts on one line, such as the cells of a row, are read as one. */
const sameLine = (a: TextItem, b: Item | undefined): boolean =>
  b?.kind === "text" && b.y === a.y && b.backdrop === a.backdrop && a.turnDeg === undefined && b.turnDeg === undefined;

/** @returns the items of a page as they are read: lines of text together, everything else one by one. */
export function readingRuns(items: readonly Item[]): Item[][] {
  const runs: Item[][] = [];
  for (const item of items) {
    const last = runs.at(-1);
    const before = last?.at(-1);
    if (last !== undefined && before?.kind === "text" && sameLine(before, item)) last.push(item);
    else if (last !== undefined && before?.kind === "path" && item.kind === "path") last.push(item);
    else runs.push([item]);
  }
  return runs;
}

/** Marks the pieces of a document's pages while they are drawn, and writes their tree when the file is put together. */
export class PdfTags {
  private readonly pages: { readonly title: string; readonly pieces: Piece[] }[] = [];
  private readonly file: Writing;

  constructor(document: jsPDF) {
    this.file = document.internal as typeof document.internal & Writing;
    const { events } = document.internal;
    let tree = 0;
    events.subscribe("putPage", ({ pageNumber }: { readonly pageNumber: number }) =>
      this.file.write(`/StructParents ${pageNumber - 1} /Tabs /S`),
    );
    events.subscribe("putAdditionalObjects", () => {
      tree = this.writeTree();
    });
    events.subscribe("putCatalog", () => this.file.write(`/Version /1.7 /MarkInfo << /Marked true >> /StructTreeRoot ${tree} 0 R`));
  }

  beginPage(title: string): void {
    this.pages.push({ title, pieces: [] });
  }

  /** Draws a run of items as one piece of the page that was begun last. */
  mark(run: readonly Item[], draw: () => void): void {
    const page = this.pages.at(-1);
    const [first] = run;
    if (page === undefined) throw new Error("a piece needs a page");
    const isText = first.kind === "text" && first.backdrop !== true;
    if (!isText && first.kind !== "clipped") this.file.write("/Artifact BMC");
    else {
      const role = first.kind === "clipped" ? "Figure" : page.pieces.length === 0 ? "H1" : isText ? roleOf(first) : "P";
      this.file.write(`/${role} << /MCID ${page.pieces.length} >> BDC`);
      page.pieces.push({ role, instead: first.kind === "clipped" ? `Drawing: ${page.title}` : null });
    }
    draw();
    this.file.write("EMC");
  }

  private writeObject(id: number, content: string): void {
    this.file.newObjectDeferredBegin(id, true);
    this.file.write(`<< ${content} >>`);
    this.file.write("endobj");
  }

  /** @returns the object number of the tree's root. */
  private writeTree(): number {
    const reserve = (): number => this.file.newObjectDeferred();
    const [root, whole, parents] = [reserve(), reserve(), reserve()];
    const sections = this.pages.map(({ title, pieces }, index) => {
      const section = reserve();
      const page = this.file.getPageInfo(index + 1).objId;
      const parts = pieces.map(({ role, instead }, number) => {
        const part = reserve();
        const alternative = instead === null ? "" : ` /Alt ${unicode(instead)}`;
        this.writeObject(part, `/Type /StructElem /S /${role} /P ${section} 0 R /Pg ${page} 0 R /K ${number}${alternative}`);
        return `${part} 0 R`;
      });
      this.writeObject(section, `/Type /StructElem /S /Sect /T ${unicode(title)} /P ${whole} 0 R /K [${parts.join(" ")}]`);
      return { section, parts };
    });
    this.writeObject(
      whole,
      `/Type /StructElem /S /Document /P ${root} 0 R /K [${sections.map(({ section }) => `${section} 0 R`).join(" ")}]`,
    );
    this.writeObject(parents, `/Nums [${sections.map(({ parts }, index) => `${index} [${parts.join(" ")}]`).join(" ")}]`);
    this.writeObject(root, `/Type /StructTreeRoot /K ${whole} 0 R /ParentTree ${parents} 0 R /ParentTreeNextKey ${sections.length}`);
    return root;
  }
}

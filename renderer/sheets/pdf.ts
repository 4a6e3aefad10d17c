import { jsPDF } from "jspdf";
import { type ClippedItem, type ImageItem, type Ink, type Item, type Pack, type Page, type PathItem, plateOf, type TextItem } from "./page";
import { PdfTags, readingRuns } from "./pdf-tags";

/** The font files that are embedded, as bytes of TrueType. */
export interface FontFiles {
  readonly regular: Uint8Array;
  readonly bold: Uint8Array;
}

const FAMILY = "SheetSans";
const POINTS_PER_MM = 72 / 25.4;

/** Bytes as a text of their values, which jsPDF takes for a font as it is; in base64 it would only decode it again. */
function binaryText(bytes: Uint8Array): string {
  let text = "";
  for (let start = 0; start < bytes.length; start += 0x8000) text += String.fromCharCode(...bytes.subarray(start, start + 0x8000));
  return text;
}

const rgb = (ink: Ink): readonly [number, number, number] => {
  if (typeof ink !== "number") return ink;
  const grey = Math.round(255 * ink);
  return [grey, grey, grey];
};

/** Draws the items of one page; places are turned into the PDF's millimetres from the upper left corner. */
class PagePen {
  constructor(
    private readonly document: jsPDF,
    private readonly heightMm: number,
    private readonly scaleX: number,
    private readonly scaleY: number,
    private readonly offset: readonly [number, number] = [0, 0],
  ) {}

  private x(value: number): number {
    return (value + this.offset[0]) / this.scaleX;
  }
  private y(value: number): number {
    return (this.heightMm - value - this.offset[1]) / this.scaleY;
  }

  draw(item: Item): void {
    if (item.kind === "path") this.path(item);
    else if (item.kind === "text") this.text(item);
    else if (item.kind === "image") this.image(item);
    else this.clipped(item);
  }

  private path({ chains, closed, stroke, fill, lineMm, dashMm }: PathItem): void {
    const { document } = this;
    if (stroke !== null) document.setDrawColor(...rgb(stroke));
    if (fill !== null) document.setFillColor(...rgb(fill));
    document.setLineWidth(lineMm);
    document.setLineDashPattern(dashMm === undefined ? [] : [...dashMm], 0);
    for (const chain of chains) {
      chain.forEach(([x, y], index) => {
        if (index === 0) document.moveTo(this.x(x), this.y(y));
        else document.lineTo(this.x(x), this.y(y));
      });
      if (closed) document.close();
    }
    if (fill !== null && stroke !== null) document.fillStrokeEvenOdd();
    else if (fill !== null) document.fillEvenOdd();
    else document.stroke();
  }

  private text(item: TextItem): void {
    const { document } = this;
    const { x, y, text: words, sizeMm, anchor, bold, turnDeg, ink } = item;
    const plate = plateOf(item);
    if (plate !== null) {
      const [left, bottom, width, height] = plate;
      document.setFillColor(255, 255, 255);
      document.rect(this.x(left), this.y(bottom + height), width / this.scaleX, height / this.scaleY, "F");
    }
    document.setFont(FAMILY, bold ? "bold" : "normal");
    // Type keeps its shape; the larger of the two corrections keeps it within its room.
    document.setFontSize((sizeMm * POINTS_PER_MM) / Math.max(this.scaleX, this.scaleY));
    document.setTextColor(...rgb(ink ?? 0));
    let [left, base] = [this.x(x), this.y(y)];
    if (anchor !== "start") {
      const width = document.getTextWidth(words) * (anchor === "middle" ? 0.5 : 1);
      const angle = ((turnDeg ?? 0) * Math.PI) / 180;
      left -= width * Math.cos(angle);
      base += width * Math.sin(angle);
    }
    // The space parts neighbouring texts for whoever has the page read aloud.
    document.text(`${words} `, left, base, turnDeg === undefined ? {} : { angle: turnDeg });
  }

  private image({ x, y, widthMm, heightMm, columns, rows, rgb }: ImageItem): void {
    const data = new Uint8ClampedArray(4 * columns * rows).fill(255);
    for (let dot = 0; dot < columns * rows; dot++) data.set(rgb.subarray(3 * dot, 3 * dot + 3), 4 * dot);
    const [left, top] = [this.x(x), this.y(y + heightMm)];
    this.document.addImage(
      { data, width: columns, height: rows },
      "RGBA",
      left,
      top,
      widthMm / this.scaleX,
      heightMm / this.scaleY,
      undefined,
      "MEDIUM",
    );
  }

  private clipped({ window: [left, bottom, right, top], offset, items }: ClippedItem): void {
    const { document } = this;
    document.saveGraphicsState();
    document.moveTo(this.x(left), this.y(bottom));
    document.lineTo(this.x(right), this.y(bottom));
    document.lineTo(this.x(right), this.y(top));
    document.lineTo(this.x(left), this.y(top));
    document.close();
    document.clip();
    document.discardPath();
    const pen = new PagePen(document, this.heightMm, this.scaleX, this.scaleY, offset);
    for (const item of items) pen.draw(item);
    document.restoreGraphicsState();
  }
}

/** A file id of 32 hexadecimal digits that belongs to the content: the same setup and date give the same bytes. */
function fileIdOf({ setupId, date, title }: Pack): string {
  let id = "";
  for (let round = 0; id.length < 32; round++) {
    let hash = 0x811c9dc5 ^ round;
    for (const character of `${setupId} ${date} ${title}`) hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193);
    id += (hash >>> 0).toString(16).toUpperCase().padStart(8, "0");
  }
  return id.slice(0, 32);
}

/**
 * @param createdOn the day that the file says it was made on, ISO 8601: no clock is read.
 * @returns the pack as PDF: true to scale, fonts embedded, asking viewers not to scale it.
 */
export function packPdf(pack: Pack, fonts: FontFiles, createdOn: string): Uint8Array<ArrayBuffer> {
  const steps = packPdfSteps(pack, fonts, createdOn);
  for (;;) {
    const step = steps.next();
    if (step.done === true) return step.value;
  }
}

/**
 * The same, page by page, for whoever shows progress, lets the window breathe between pages, or gives up half way.
 * @returns yields the number of pages done, then returns the bytes.
 */
export function* packPdfSteps(pack: Pack, fonts: FontFiles, createdOn: string): Generator<number, Uint8Array<ArrayBuffer>> {
  const [first] = pack.pages;
  if (first === undefined) throw new RangeError("a pack without pages cannot be printed; choose at least one sheet");
  const sizeOf = ({ widthMm, heightMm, printerScale: [x, y] }: Page): [number, number] => [widthMm / x, heightMm / y];
  const orientation = ([width, height]: readonly [number, number]): "portrait" | "landscape" => (width > height ? "landscape" : "portrait");
  const document = new jsPDF({
    unit: "mm",
    format: sizeOf(first),
    orientation: orientation(sizeOf(first)),
    compress: true,
    putOnlyUsedFonts: true,
  });
  document.addFileToVFS("regular.ttf", binaryText(fonts.regular));
  document.addFont("regular.ttf", FAMILY, "normal");
  document.addFileToVFS("bold.ttf", binaryText(fonts.bold));
  document.addFont("bold.ttf", FAMILY, "bold");
  document.setCreationDate(new Date(`${createdOn}T12:00:00Z`));
  document.setFileId(fileIdOf(pack));
  document.setDocumentProperties({
    title: `${pack.title} (${pack.setupId})`,
    subject: `Setup ${pack.setupId}, ${pack.date}`,
    creator: `Fieldtray ${pack.version}`,
  });
  document.setLanguage("en-GB");
  document.viewerPreferences({ PrintScaling: "None", DisplayDocTitle: true });
  const tags = new PdfTags(document);
  for (const [index, page] of pack.pages.entries()) {
    if (index > 0) document.addPage(sizeOf(page), orientation(sizeOf(page)));
    const pen = new PagePen(document, page.heightMm, ...page.printerScale);
    tags.beginPage(page.title);
    for (const run of readingRuns(page.items))
      tags.mark(run, () => {
        for (const item of run) pen.draw(item);
      });
    yield index + 1;
  }
  return new Uint8Array(document.output("arraybuffer"));
}

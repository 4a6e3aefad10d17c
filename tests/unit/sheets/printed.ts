import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/**
 * What a printer would make of a PDF: pages as dots of 300 an inch, measured like paper with a ruler. Poppler's programs read
 * the file (Debian package poppler-utils): readers that know nothing of what wrote it.
 */

export const DOTS_PER_MM = 300 / 25.4;

export interface Print {
  readonly widthMm: number;
  readonly heightMm: number;
  /** @returns how dark the paper is (0 white to 1 black) at a place in mm from the lower left corner. */
  readonly darkness: (x: number, y: number) => number;
}

/** Runs a reader over PDF bytes in a folder of its own. @returns whatever `read` makes of the file. */
export function withPdf<Result>(pdf: Uint8Array, read: (file: string, folder: string) => Result): Result {
  const folder = mkdtempSync(join(tmpdir(), "fieldtray-print-"));
  try {
    const file = join(folder, "pack.pdf");
    writeFileSync(file, pdf);
    return read(file, folder);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function readGreyMap(bytes: Uint8Array): Print {
  // The header: P5, width, height, largest value, each ended by white space.
  const header = new TextDecoder("latin1").decode(bytes.subarray(0, 64));
  const match = /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(header);
  if (match === null) throw new Error("the renderer made no grey map");
  const [columns, rows] = [Number(match[1]), Number(match[2])];
  const start = match[0].length;
  return {
    widthMm: columns / DOTS_PER_MM,
    heightMm: rows / DOTS_PER_MM,
    darkness: (x, y) => {
      const column = Math.floor(x * DOTS_PER_MM);
      const row = rows - 1 - Math.floor(y * DOTS_PER_MM);
      if (column < 0 || row < 0 || column >= columns || row >= rows) return 0;
      return 1 - bytes[start + row * columns + column] / 255;
    },
  };
}

/** @returns the pages of a PDF at 300 dots an inch, in grey. */
export const printed = (pdf: Uint8Array): Print[] =>
  withPdf(pdf, (file, folder) => {
    execFileSync("pdftoppm", ["-r", "300", "-gray", file, join(folder, "page")]);
    return readdirSync(folder)
      .filter((name) => name.endsWith(".pgm"))
      .sort()
      .map((name) => readGreyMap(readFileSync(join(folder, name))));
  });

/** @returns the paper of a printer that makes 100 mm too long or too short by these scales along its short and its long side. */
export function onFaultyPrinter(print: Print, [short, long]: readonly [number, number]): Print {
  const [x, y] = print.widthMm > print.heightMm ? [long, short] : [short, long];
  return { widthMm: print.widthMm * x, heightMm: print.heightMm * y, darkness: (atX, atY) => print.darkness(atX / x, atY / y) };
}

/** @returns what one of Poppler's readers (pdftotext, pdffonts, pdfinfo) says of a PDF. */
export const readPdf = (reader: "pdftotext" | "pdffonts" | "pdfinfo", pdf: Uint8Array, options: readonly string[] = []): string =>
  withPdf(pdf, (file) => execFileSync(reader, [...options, file, ...(reader === "pdftotext" ? ["-"] : [])], { encoding: "utf8" }));

/**
 * Where a dark line crosses a short way over the paper.
 * @returns the distance (mm) along the way from its middle to the middle of the nearest dark run; null when there is none.
 */
export function lineAcross(
  print: Print,
  [x, y]: readonly [number, number],
  [dx, dy]: readonly [number, number],
  reachMm: number,
): number | null {
  const step = 0.02;
  const runs: { from: number; to: number }[] = [];
  for (let at = -reachMm; at <= reachMm; at += step) {
    if (print.darkness(x + at * dx, y + at * dy) < 0.7) continue;
    const last = runs.at(-1);
    if (last !== undefined && at - last.to < 1.5 * step) last.to = at;
    else runs.push({ from: at, to: at });
  }
  const middles = runs.map(({ from, to }) => (from + to) / 2);
  return middles.reduce<number | null>((best, one) => (best === null || Math.abs(one) < Math.abs(best) ? one : best), null);
}

/** @returns the middle (mm) of what is dark within a square round a place; null when nothing is. */
export function dotNear(print: Print, [x, y]: readonly [number, number], halfMm: number): readonly [number, number] | null {
  let [sum, sumX, sumY] = [0, 0, 0];
  const dot = 1 / DOTS_PER_MM;
  for (let px = (Math.floor((x - halfMm) / dot) + 0.5) * dot; px <= x + halfMm; px += dot) {
    for (let py = (Math.floor((y - halfMm) / dot) + 0.5) * dot; py <= y + halfMm; py += dot) {
      const dark = print.darkness(px, py);
      if (dark < 0.5) continue;
      sum += dark;
      sumX += dark * px;
      sumY += dark * py;
    }
  }
  return sum === 0 ? null : [sumX / sum, sumY / sum];
}

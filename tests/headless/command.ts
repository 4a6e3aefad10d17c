import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../..", import.meta.url));

/** How the command ended. */
export interface Ended {
  readonly exitCode: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

const ended = (command: string, args: readonly string[], cwd: string): Ended => {
  const { status, stdout, stderr } = spawnSync(command, args, { encoding: "utf8", cwd, maxBuffer: 64 * 1024 * 1024, env: process.env });
  return { exitCode: status, stdout, stderr };
};

/** Runs the command as people type it, through npm. */
export const headlessByNpm = (...args: string[]): Ended => ended("npm", ["run", "--silent", "headless", "--", ...args], root);

/** Runs the built command itself: what the npm script ends in, without npm's half second. */
export const headless = (...args: string[]): Ended =>
  ended(process.execPath, [join(root, "dist", "headless", "headless.mjs"), ...args], root);

/** A folder of a test's own. */
export interface Bench {
  readonly folder: string;
  /** Writes a file into the folder. @returns its path. */
  readonly file: (name: string, content: unknown) => string;
  readonly clear: () => void;
}

export function bench(): Bench {
  const folder = mkdtempSync(join(tmpdir(), "fieldtray-headless-"));
  return {
    folder,
    file: (name, content) => {
      const path = join(folder, name);
      writeFileSync(path, typeof content === "string" || content instanceof Uint8Array ? content : JSON.stringify(content));
      return path;
    },
    clear: () => rmSync(folder, { recursive: true, force: true }),
  };
}

/** Two bars and a loose ring, every key written out: the setup of the file contract. */
export const barsWithLooseRing = {
  format: "fieldtray.setup",
  version: 1,
  title: "Two bars and a loose ring",
  notes: "",
  tray: { shape: "rectangle", lengthMm: 300, widthMm: 200, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" },
  water: { depthMm: 12, tiltXDeg: 0, tiltYDeg: 0, conductivityUsPerCm: 500, temperatureC: 25, salt: "none", slabs: [] },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6, currentLimitA: 1, source: "safety-isolated" },
  meter: { inputMegohm: 10, counts: 2000, accuracyPercent: 1, accuracyDigits: 3 },
  parts: [
    bar("A", "Left bar", 0, 65),
    bar("B", "Right bar", 1, 235),
    { id: "C", name: "Loose ring", role: "floating", ...at(150, 100), shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
  ],
  probing: { levels: 7, pointsPerLevel: 7, probeTipMm: 1, wallClearanceMm: 5, partClearanceMm: 5, placementMm: 0.5 },
  session: { minutes: 40, trays: 1 },
};

function at(xMm: number, yMm: number) {
  return { xMm, yMm, turnDeg: 0, heightMm: 24, material: "brass" };
}

function bar(id: string, name: string, tap: number, xMm: number) {
  return { id, name, role: "electrode", tap, ...at(xMm, 100), turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } };
}

/** Two bars, an insulating block between them. */
export const barsWithBlock = {
  ...barsWithLooseRing,
  title: "Two bars and a block",
  parts: [
    ...barsWithLooseRing.parts.slice(0, 2),
    { id: "D", role: "insulator", ...at(150, 100), material: "acrylic", shape: { kind: "bar", lengthMm: 30, widthMm: 30 } },
  ],
};

/**
 * What a report leaves to be desired against the contract's own sample: every key of the sample must be there with the
 * sample's type (`null` in the sample stands for "anything or null"). Lists are compared element by element with the sample's first.
 * @returns one line for each difference.
 */
export function differences(report: unknown, sample: unknown, where = "report"): readonly string[] {
  if (sample === null) return report === undefined ? [`${where} is missing`] : [];
  if (Array.isArray(sample)) {
    if (!Array.isArray(report)) return [`${where} is no list`];
    return sample.length === 0 ? [] : report.flatMap((item, index) => differences(item, sample[0], `${where}[${index}]`));
  }
  if (typeof sample === "object") {
    if (typeof report !== "object" || report === null) return [`${where} is no object`];
    return Object.entries(sample).flatMap(([key, value]) => differences(Reflect.get(report, key), value, `${where}.${key}`));
  }
  return typeof report === typeof sample ? [] : [`${where} is a ${typeof report}, not a ${typeof sample}`];
}

import { gapMm, wallGapMm } from "../../renderer/engine/geometry/clearance";
import { boundsOf, outlineOf } from "../../renderer/engine/geometry/outline";
import { outlined } from "../../renderer/engine/geometry/overlap";
import { covers, distanceToOutline } from "../../renderer/engine/geometry/signed-distance";
import { depthFromWallMm, traySizeMm } from "../../renderer/engine/geometry/tray-outline";
import type { PlacedShape, Setup } from "../../shared-types/setup";
import { soundSetup } from "./solved";

/** A repeatable source of numbers in [0, 1) (mulberry32, a public-domain generator). */
export function seededNumbers(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

const apart = (a: PlacedShape, b: PlacedShape, leastMm: number): boolean => gapMm(outlined(a), outlined(b)) >= leastMm;

export interface RandomSetupOptions {
  readonly insulators: boolean;
  readonly slabs: boolean;
  readonly tilt: boolean;
}

/** @returns a random sound setup: all shapes, turns and roles, rectangular and round trays, at least two electrodes at different taps. */
export function randomSetup(seed: number, { insulators, slabs, tilt }: RandomSetupOptions): Setup {
  const random = seededNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  const pick = <Item>(items: readonly Item[]): Item => items[Math.floor(random() * items.length)];
  const tray =
    random() < 0.7
      ? { shape: "rectangle", lengthMm: between(150, 400), widthMm: between(120, 300) }
      : { shape: "circle", diameterMm: between(160, 300) };
  const base = soundSetup({
    format: "fieldtray.setup",
    version: 1,
    tray,
    water: { depthMm: 12, conductivityUsPerCm: 500 },
    supply: { waveform: "ac", volts: 6 },
    parts: [],
  });
  const [lengthMm, widthMm] = traySizeMm(base.tray);
  const shape = (): object => {
    const size = between(12, 60);
    switch (pick(["bar", "disc", "ring", "arc", "frame", "polygon", "bar", "disc"])) {
      case "bar":
        return { kind: "bar", lengthMm: size * 1.3, widthMm: between(1.5, 14) };
      case "disc":
        return { kind: "disc", diameterMm: size * 0.7 };
      case "ring":
        return { kind: "ring", outerMm: size + 8, innerMm: size + 8 - 2 * between(1.5, 4) };
      case "arc":
        return { kind: "arc", outerMm: size + 14, innerMm: size + 14 - 2 * between(1.5, 4), sweepDeg: between(40, 300) };
      case "frame":
        return { kind: "frame", lengthMm: size + 14, widthMm: size + 10, wallMm: between(1.5, 4) };
      default: {
        const corners = 3 + Math.floor(random() * 4);
        const points = Array.from({ length: corners }, (_, index) => {
          const angle = ((index + between(0.1, 0.9)) / corners) * 2 * Math.PI;
          const radius = size * between(0.35, 0.6);
          return [radius * Math.cos(angle), radius * Math.sin(angle)];
        });
        return { kind: "polygon", pointsMm: points };
      }
    }
  };
  const parts: object[] = [];
  const placed: PlacedShape[] = [];
  const wanted = 2 + Math.floor(random() * 4);
  for (let attempt = 0; attempt < 400 && parts.length < wanted; attempt++) {
    const number = parts.length;
    const role =
      number < 2
        ? "electrode"
        : pick(insulators ? ["electrode", "floating", "insulator", "insulator"] : ["electrode", "floating", "floating"]);
    const part = {
      id: `P${number}`,
      role,
      ...(role === "electrode" ? { tap: number < 2 ? number : pick([0, 1, 0.4]) } : {}),
      xMm: between(0, lengthMm),
      yMm: between(0, widthMm),
      turnDeg: random() < 0.3 ? 90 * Math.floor(random() * 4) : between(0, 360),
      shape: shape(),
    };
    let one: PlacedShape;
    try {
      one = soundSetup({ ...base, parts: [part] }).parts[0];
    } catch {
      continue;
    }
    if (wallGapMm(outlined(one), base.tray) < 3 || !placed.every((other) => apart(one, other, 3))) continue;
    parts.push(part);
    placed.push(one);
  }
  const slabList = slabs
    ? [
        {
          id: "S1",
          xMm: between(0.3, 0.7) * lengthMm,
          yMm: between(0.3, 0.7) * widthMm,
          turnDeg: random() < 0.4 ? 0 : between(0, 180),
          thicknessMm: between(2, 7),
          shape:
            random() < 0.5
              ? { kind: "bar", lengthMm: between(40, 120), widthMm: between(30, 90) }
              : { kind: "disc", diameterMm: between(40, 100) },
        },
      ]
    : [];
  return soundSetup({
    ...base,
    water: { ...base.water, tiltXDeg: tilt ? between(-1, 1) : 0, tiltYDeg: tilt ? between(-1, 1) : 0, slabs: slabList },
    parts: parts.length >= 2 ? parts : fallbackParts(lengthMm, widthMm),
  });
}

const fallbackParts = (lengthMm: number, widthMm: number): object[] =>
  [0.25, 0.75].map((share, tap) => ({
    id: `P${tap}`,
    role: "electrode",
    tap,
    xMm: share * lengthMm,
    yMm: widthMm / 2,
    shape: { kind: "disc", diameterMm: 20 },
  }));

/** @returns `count` places in open water of a setup, at least `gapMm` from parts and wall. */
export function randomPlaces(setup: Setup, seed: number, count: number, gapMm: number): readonly (readonly [number, number])[] {
  const random = seededNumbers(seed);
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const loops = setup.parts.map((part) => outlineOf(part));
  const boxes = loops.map(boundsOf);
  const places: [number, number][] = [];
  for (let attempt = 0; attempt < 200 * count && places.length < count; attempt++) {
    const x = random() * lengthMm;
    const y = random() * widthMm;
    if (depthFromWallMm(setup.tray, x, y) < gapMm) continue;
    const free = setup.parts.every((part, index) => {
      const [left, bottom, right, top] = boxes[index];
      if (x < left - gapMm || x > right + gapMm || y < bottom - gapMm || y > top + gapMm) return true;
      return !covers(part, x, y) && distanceToOutline(loops[index], x, y) >= gapMm;
    });
    if (free) places.push([x, y]);
  }
  return places;
}

import { seededNumbers } from "../../reference/random-setups";

/**
 * A repeatable setup file such as nobody wishes for: parts anywhere, on top of and inside each other, across walls and waterlines,
 * shapes with edges of no length, outlines that cross themselves, sizes from hairs to more than the tray, trays on their side.
 */
export function hostileSetup(seed: number): object {
  const random = seededNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  const pick = <Item>(items: readonly Item[]): Item => items[Math.floor(random() * items.length)];
  const chance = (share: number): boolean => random() < share;
  const size = (): number => (chance(0.04) ? between(100, 900) : pick([between(0.05, 2), between(2, 30), between(2, 40), 10]));
  const lengthMm = between(30, 500);
  const widthMm = chance(0.03) ? lengthMm / 20 : between(30, 400);
  const round = chance(0.25);

  const star = (): number[][] => {
    const count = 3 + Math.floor(random() * 9);
    const inOrder = chance(0.85);
    const points = Array.from({ length: count }, (_, index) => {
      const angle = ((inOrder ? index + random() : count * random()) / count) * 2 * Math.PI;
      const radius = size() / 2;
      return [radius * Math.cos(angle), radius * Math.sin(angle)];
    });
    if (chance(0.15)) points.splice(1, 0, [...points[0]]);
    if (chance(0.1)) points.push(points.map(([x]) => x).slice(0, 2));
    return points;
  };
  const shape = (): object => {
    const outerMm = size();
    switch (pick(["bar", "disc", "ring", "arc", "frame", "polygon"])) {
      case "bar":
        return { kind: "bar", lengthMm: size(), widthMm: size() };
      case "disc":
        return { kind: "disc", diameterMm: size() };
      case "ring":
        return { kind: "ring", outerMm, innerMm: outerMm * pick(chance(0.1) ? [1, 1.1] : [0.999, between(0.1, 0.99), 0.9]) };
      case "arc":
        return {
          kind: "arc",
          outerMm,
          innerMm: outerMm * pick([0.995, 0.8, between(0.1, 0.99)]),
          sweepDeg: pick(chance(0.1) ? [0.5, 400] : [180, 350, between(10, 340)]),
        };
      case "frame": {
        const otherMm = size();
        const half = Math.min(outerMm, otherMm) / 2;
        return { kind: "frame", lengthMm: outerMm, widthMm: otherMm, wallMm: chance(0.1) ? half : half * between(0.02, 0.95) };
      }
      default:
        return { kind: "polygon", pointsMm: star() };
    }
  };
  // Grid lines, walls, the centre and other parts' places attract, so that edges fall exactly on each other.
  const at = (whole: number): number =>
    pick([between(0, whole), between(0, whole), between(-0.2 * whole, 1.2 * whole), whole / 2, 0, whole, Math.round(between(0, whole))]);
  const places: number[][] = [];
  // Most parts keep some way off the others, or hardly any layout would be planned.
  const place = (): number[] => {
    let here = [0, 0];
    for (let attempt = 0; attempt < 8; attempt++) {
      here = chance(0.02) && places.length > 0 ? pick(places) : [at(lengthMm), at(round ? lengthMm : widthMm)];
      if (places.every(([x, y]) => Math.hypot(x - here[0], y - here[1]) > lengthMm / 6)) break;
    }
    places.push(here);
    return here;
  };
  const placed = (id: string): object => {
    const [xMm, yMm] = place();
    return { id, xMm, yMm, turnDeg: pick([0, 90, 45, between(-400, 400)]), shape: shape() };
  };
  const parts = Array.from({ length: 2 + Math.floor(random() * 5) }, (_, index) => {
    const role = index < 2 ? "electrode" : pick(["electrode", "floating", "floating", "insulator"]);
    return { ...placed(`P${index}`), role, ...(role === "electrode" ? { tap: index < 2 && chance(0.9) ? index : pick([0, 0.5, 1]) } : {}) };
  });
  const depthMm = pick([between(1, 30), 10, 10, 0.5]);
  return {
    format: "fieldtray.setup",
    version: 1,
    tray: round ? { shape: "circle", diameterMm: lengthMm } : { shape: "rectangle", lengthMm, widthMm },
    water: {
      depthMm,
      conductivityUsPerCm: 500,
      ...(chance(0.25) ? { tiltXDeg: pick([between(-3, 3), between(-45, 45)]), tiltYDeg: between(-2, 2) } : {}),
      ...(chance(0.25) ? { slabs: [{ ...placed("S1"), thicknessMm: pick([depthMm, between(0.1, 40)]) }] } : {}),
    },
    supply: { waveform: pick(["ac", "dc"]), volts: 6 },
    parts,
  };
}

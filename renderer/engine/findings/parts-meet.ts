import type { Finding } from "../../../shared-types/plan";
import type { Electrode, Part, Setup } from "../../../shared-types/setup";
import { gapMm } from "../geometry/clearance";
import { boxGapMm, type OutlinedShape, outlined, overlaps } from "../geometry/overlap";
import type { SetupRule } from "./rule";
import { finding, partLabel, shown } from "./wording";

/** Metal closer than this touches, as far as any hand can tell, mm. */
export const TOUCHING_MM = 0.01;

interface Pair {
  readonly a: Part;
  readonly b: Part;
  /** 0 where they touch or overlap. */
  readonly gapMm: number;
  readonly overlap: boolean;
}

/** Pairs of parts that overlap or lie within `reachMm` of each other. */
function pairsWithin(setup: Setup, reachMm: number): readonly Pair[] {
  const shapes = setup.parts.map((part): { part: Part; shape: OutlinedShape } => ({ part, shape: outlined(part) }));
  const pairs: Pair[] = [];
  shapes.forEach((first, index) => {
    for (const second of shapes.slice(index + 1)) {
      if (boxGapMm(first.shape.box, second.shape.box) > reachMm) continue;
      const overlap = overlaps(first.shape, second.shape);
      const gap = overlap ? 0 : gapMm(first.shape, second.shape);
      if (overlap || gap <= reachMm) pairs.push({ a: first.part, b: second.part, gapMm: gap, overlap });
    }
  });
  return pairs;
}

const isMetal = (part: Part): boolean => part.role !== "insulator";
const atDifferentTaps = (a: Part, b: Part): boolean => a.role === "electrode" && b.role === "electrode" && a.tap !== b.tap;

function overlapFound({ a, b }: Pair): Finding {
  return finding({
    code: "overlap",
    severity: "stop",
    partIds: [a.id, b.id],
    message: `${partLabel(a)} and ${partLabel(b)} overlap: two parts cannot stand in one place.`,
    measured: "overlapping",
    limit: { text: "apart or touching", source: "solid bodies" },
    remedy: "Move one of them until they are clear of each other.",
  });
}

function shortCircuitFound({ a, b }: Pair): Finding {
  return finding({
    code: "short-circuit",
    severity: "stop",
    partIds: [a.id, b.id],
    message: `${partLabel(a)} and ${partLabel(b)} touch while their leads are at different volts: the supply is short-circuited.`,
    measured: "touching",
    limit: { text: "a gap between electrodes at different taps", source: "Ohm's law" },
    remedy: "Move one of them away, or wire both to the same tap.",
    safety: true,
  });
}

function floatingTouchFound({ a, b }: Pair): Finding {
  const [loose, other] = a.role === "floating" ? [a, b] : [b, a];
  const wired = other.role === "electrode";
  return finding({
    code: "floating-touches",
    severity: "stop",
    partIds: [a.id, b.id],
    message: wired
      ? `${partLabel(loose)} touches ${partLabel(other)} and takes its potential: it no longer floats.`
      : `${partLabel(loose)} and ${partLabel(other)} touch and take one potential; the plan holds them apart.`,
    measured: "touching",
    limit: { text: "a gap round a floating conductor", source: "a floating conductor has no lead: its net current is zero" },
    remedy: wired ? "Move it away, or make it an electrode at the same tap." : "Move them apart, or draw them as one part.",
  });
}

function nearTouchFound({ a, b, gapMm: gap }: Pair, placementMm: number): Finding {
  return finding({
    code: "gap-too-narrow",
    severity: "caution",
    partIds: [a.id, b.id],
    about: "probing.placementMm",
    message: `Only ${shown(gap, 2)} mm lie between ${partLabel(a)} and ${partLabel(b)} at different volts; placed by hand they may touch.`,
    measured: `${shown(gap, 2)} mm`,
    limit: { text: `${shown(2 * placementMm)} mm`, source: "twice the stated accuracy of placing (a margin of ours)" },
    remedy: "Leave a wider gap, or hold both in a jig.",
  });
}

/** Electrodes at different taps that touch one another through loose metal. */
function shortsThroughLoose(touching: readonly Pair[]): Finding[] {
  const neighbours = new Map<Part, Part[]>();
  for (const { a, b } of touching) {
    neighbours.set(a, [...(neighbours.get(a) ?? []), b]);
    neighbours.set(b, [...(neighbours.get(b) ?? []), a]);
  }
  const seen = new Set<Part>();
  const found: Finding[] = [];
  for (const start of neighbours.keys()) {
    if (seen.has(start)) continue;
    const group: Part[] = [start];
    seen.add(start);
    for (const part of group) {
      for (const next of neighbours.get(part) ?? []) {
        if (seen.has(next)) continue;
        seen.add(next);
        group.push(next);
      }
    }
    const electrodes = group.filter((part): part is Electrode => part.role === "electrode");
    const other = electrodes.find(({ tap }) => tap !== electrodes[0].tap);
    const direct = touching.some(({ a, b }) => atDifferentTaps(a, b) && group.includes(a));
    if (other === undefined || direct) continue;
    const loose = group.filter(({ role }) => role === "floating");
    found.push({
      ...shortCircuitFound({ a: electrodes[0], b: other, gapMm: 0, overlap: false }),
      partIds: group.map(({ id }) => id),
      message: `${partLabel(electrodes[0])} and ${partLabel(other)}, at different volts, are joined by ${loose.map(partLabel).join(" and ")}: the supply is short-circuited.`,
    });
  }
  return found;
}

/** Parts that overlap, short the supply, or touch though one of them should float. */
export const partsMeet: SetupRule = (setup) => {
  const narrowMm = 2 * setup.probing.placementMm;
  const pairs = pairsWithin(setup, Math.max(TOUCHING_MM, narrowMm));
  const touching = pairs.filter((pair) => isMetal(pair.a) && isMetal(pair.b) && (pair.overlap || pair.gapMm <= TOUCHING_MM));
  const found = pairs.flatMap((pair) => {
    const { a, b } = pair;
    const metal = isMetal(a) && isMetal(b);
    const touching = pair.overlap || pair.gapMm <= TOUCHING_MM;
    const found: Finding[] = pair.overlap ? [overlapFound(pair)] : [];
    if (!metal) return found;
    if (touching && atDifferentTaps(a, b)) found.push(shortCircuitFound(pair));
    else if (touching && (a.role === "floating" || b.role === "floating")) found.push(floatingTouchFound(pair));
    else if (!touching && pair.gapMm < narrowMm && atDifferentTaps(a, b)) found.push(nearTouchFound(pair, setup.probing.placementMm));
    return found;
  });
  return [...found, ...shortsThroughLoose(touching)];
};

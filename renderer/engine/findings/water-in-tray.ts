import type { Finding } from "../../../shared-types/plan";
import { radians } from "../../../shared-types/units";
import { depthRangeMm, leastDepthForTiltMm, tiltBaseMm, tiltReadingShare, UNNOTICED_TILT_DEG } from "../bench/water-geometry";
import { FREEBOARD, sourceOf, TILT_READING_SHARE } from "./limits";
import type { SetupRule } from "./rule";
import { finding, percent, roundedUp, shown } from "./wording";

const LEAST_DEPTH_MM = 0.5;
const MOST_DEPTH_MM = 200;

/** Water against the wall's height: it must not spill. */
export const freeboard: SetupRule = (setup) => {
  const [, deepestMm] = depthRangeMm(setup);
  const freeboardMm = setup.tray.wallHeightMm - deepestMm;
  if (freeboardMm >= FREEBOARD.value) return [];
  const spills = freeboardMm <= 0;
  const depthMm = Math.floor((setup.water.depthMm + freeboardMm - FREEBOARD.value) * 2) / 2;
  return [
    finding({
      code: spills ? "water-spills" : "freeboard",
      severity: spills ? "stop" : "caution",
      about: "water.depthMm",
      message: spills
        ? `The water stands ${shown(deepestMm)} mm deep at a wall of ${shown(setup.tray.wallHeightMm)} mm: it runs over.`
        : `Only ${shown(freeboardMm, 2)} mm of wall stand above the water at its deepest side; a nudge spills it.`,
      measured: `${shown(freeboardMm, 2)} mm`,
      limit: spills ? { text: "water lower than the wall", source: "the tray's wall" } : FREEBOARD,
      remedy:
        depthMm >= LEAST_DEPTH_MM
          ? `Fill to ${shown(depthMm)} mm, or take a tray with a higher wall.`
          : "Take a tray with a higher wall, or tilt it less.",
      edit: depthMm >= LEAST_DEPTH_MM ? { path: "water.depthMm", value: depthMm } : null,
      safety: true,
    }),
  ];
};

/** Water so shallow that a tilt nobody notices bends the field. */
export const tooShallowForTilt: SetupRule = (setup) => {
  const baseMm = tiltBaseMm(setup);
  const depthShare = (Math.tan(radians(UNNOTICED_TILT_DEG)) * baseMm) / 2 / setup.water.depthMm;
  const share = tiltReadingShare(depthShare);
  if (share <= TILT_READING_SHARE.value) return [];
  const depthMm = roundedUp(leastDepthForTiltMm(baseMm, TILT_READING_SHARE.value), 0.5);
  return [
    finding({
      code: "too-shallow-for-tilt",
      severity: "caution",
      about: "water.depthMm",
      message: `A tilt of ${UNNOTICED_TILT_DEG}° that nobody notices changes this depth by ${percent(depthShare)} and shifts readings by up to ${percent(share)} of the span.`,
      measured: percent(share, 3),
      limit: { text: percent(TILT_READING_SHARE.value), source: sourceOf(TILT_READING_SHARE) },
      remedy: `Fill to ${shown(depthMm)} mm or more, or level the tray more finely.`,
      edit: depthMm <= MOST_DEPTH_MM ? { path: "water.depthMm", value: depthMm } : null,
    }),
  ];
};

/** A bed that runs dry on one side: meant for a wedge, a surprise otherwise. */
export const bedRunsDry: SetupRule = (setup) => {
  const { depthMm, tiltXDeg } = setup.water;
  const [shallowestMm, deepestMm] = depthRangeMm(setup);
  if (shallowestMm > 0) return [];
  return [
    finding({
      code: "bed-dry",
      severity: "note",
      about: tiltXDeg !== 0 ? "water.tiltXDeg" : "water.tiltYDeg",
      message: `The tilted bed runs dry on one side and is ${shown(deepestMm)} mm deep on the other; no current flows in the dry part.`,
      measured: `${shown(depthMm)} mm at the centre, 0 mm at the shallow side`,
      limit: { text: "wet everywhere, unless a wedge is meant", source: "depth over a plane bed" },
      remedy: "Tilt less or fill more, unless the waterline is meant to be an axis.",
    }),
  ];
};

/** A slab's edge is a step in depth: within one or two depths of it the flow is not two-dimensional. */
export const depthStep: SetupRule = (setup) => {
  const { slabs, depthMm } = setup.water;
  const found: Finding[] = [];
  if (slabs.length > 0) {
    found.push(
      finding({
        code: "depth-step",
        severity: "note",
        about: "water.slabs",
        message: `Within about ${shown(2 * depthMm)} mm of a slab's edge the current also runs up and down, and readings depart from the two-dimensional plan.`,
        measured: `${slabs.length} slab${slabs.length === 1 ? "" : "s"}`,
        limit: { text: "one to two depths from a step", source: "Maxwell, Treatise, vol. 1, near art. 310, for the plane law (derived)" },
        remedy: "Judge the plan by points farther from the edge.",
      }),
    );
  }
  return found;
};

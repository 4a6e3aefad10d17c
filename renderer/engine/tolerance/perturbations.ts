import type { Part, Setup } from "../../../shared-types/setup";
import type { CauseKey } from "../../../shared-types/tolerance";
import { degrees } from "../../../shared-types/units";
import { pitchFor } from "../field/grid";
import { isEvenlyDeep } from "../field/layout";
import { boundsOf, outlineOf } from "../geometry/outline";
import { traySizeMm } from "../geometry/tray-outline";

/** One way in which the geometry of a tray can differ from the plan. */
export interface Perturbation {
  readonly key: Extract<CauseKey, "part-x" | "part-y" | "part-turn" | "depth" | "tilt-x" | "tilt-y">;
  readonly partId: string | null;
  /** A step (mm or degrees) over which the change of the potentials is well above the grid's noise and still a straight line. */
  readonly step: number;
  /** The setup with this much of it, in mm or degrees, added. */
  readonly applied: (setup: Setup, amount: number) => Setup;
}

/** Share of the depth by which a step of tilt or depth changes the water's depth at the tray's edge. */
const DEPTH_STEP_SHARE = 0.04;

const changedPart = (setup: Setup, id: string, change: (part: Part) => Part): Setup => ({
  ...setup,
  parts: setup.parts.map((part) => (part.id === id ? change(part) : part)),
});

/** Half the diagonal of a part's box, mm: how far its ends swing per radian, at most. */
function swingMm(part: Part): number {
  const [left, bottom, right, top] = boundsOf(outlineOf({ ...part, xMm: 0, yMm: 0 }));
  return Math.hypot(right - left, top - bottom) / 2;
}

const looksTheSameTurned = ({ shape }: Part): boolean => shape.kind === "disc" || shape.kind === "ring";

function ofPart(part: Part, pitchMm: number): Perturbation[] {
  const { id } = part;
  const moves: Perturbation[] = [
    {
      key: "part-x",
      partId: id,
      step: pitchMm,
      applied: (setup, mm) => changedPart(setup, id, (one) => ({ ...one, xMm: one.xMm + mm })),
    },
    {
      key: "part-y",
      partId: id,
      step: pitchMm,
      applied: (setup, mm) => changedPart(setup, id, (one) => ({ ...one, yMm: one.yMm + mm })),
    },
  ];
  if (looksTheSameTurned(part)) return moves;
  const turn: Perturbation = {
    key: "part-turn",
    partId: id,
    step: Math.min(3, degrees(pitchMm / swingMm(part))),
    applied: (setup, deg) => changedPart(setup, id, (one) => ({ ...one, turnDeg: one.turnDeg + deg })),
  };
  return [...moves, turn];
}

/**
 * Everything that can move the field of this setup: place and turn of every part, tilt, and the depth where it is not even
 * (an evenly deep tray has the same potentials at any depth, since the equation's depth cancels).
 */
export function perturbationsOf(setup: Setup): readonly Perturbation[] {
  const { tray, water } = setup;
  const [lengthMm, widthMm] = traySizeMm(tray);
  const tiltStep = (sizeMm: number): number => degrees(Math.atan((DEPTH_STEP_SHARE * water.depthMm) / (sizeMm / 2)));
  const tilts: Perturbation[] = [
    {
      key: "tilt-x",
      partId: null,
      step: tiltStep(lengthMm),
      applied: (one, deg) => ({ ...one, water: { ...one.water, tiltXDeg: one.water.tiltXDeg + deg } }),
    },
    {
      key: "tilt-y",
      partId: null,
      step: tiltStep(widthMm),
      applied: (one, deg) => ({ ...one, water: { ...one.water, tiltYDeg: one.water.tiltYDeg + deg } }),
    },
  ];
  const depth: Perturbation = {
    key: "depth",
    partId: null,
    step: DEPTH_STEP_SHARE * water.depthMm,
    applied: (one, mm) => ({ ...one, water: { ...one.water, depthMm: one.water.depthMm + mm } }),
  };
  const pitchMm = pitchFor(tray, "live");
  return [...setup.parts.flatMap((part) => ofPart(part, pitchMm)), ...tilts, ...(isEvenlyDeep(setup) ? [] : [depth])];
}

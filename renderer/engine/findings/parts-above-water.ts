import { depthAtPartMm } from "../bench/water-geometry";
import { IMMERSION, LEAST_PROUD, sourceOf } from "./limits";
import type { SetupRule } from "./rule";
import { finding, partLabel, partPath, roundedUp, shown } from "./wording";

const KIND = { electrode: "electrode", floating: "loose conductor", insulator: "insulator" } as const;

/** The plan is one of two dimensions: it holds where every part reaches from the bed to above the water. */
export const partsAboveWater: SetupRule = (setup) =>
  setup.parts.flatMap((part) => {
    const depthMm = depthAtPartMm(setup, part);
    const proudMm = part.heightMm - depthMm;
    if (proudMm >= LEAST_PROUD.value) return [];
    const covered = proudMm <= 0;
    const height = roundedUp(2 * depthMm, 1);
    return [
      finding({
        code: part.role === "electrode" ? "electrode-too-short" : "part-too-short",
        severity: covered && part.role === "electrode" ? "stop" : "caution",
        partIds: [part.id],
        about: partPath(setup, part.id, "heightMm"),
        message: covered
          ? `The ${KIND[part.role]} ${partLabel(part)} is ${shown(part.heightMm)} mm high in ${shown(depthMm)} mm of water: current passes over it, and the two-dimensional plan does not hold.`
          : `The ${KIND[part.role]} ${partLabel(part)} stands only ${shown(proudMm, 2)} mm proud of the water, which may creep over it.`,
        measured: `${shown(part.heightMm)} mm high in ${shown(depthMm)} mm of water`,
        limit: covered ? { text: "higher than the water", source: `the two-dimensional plan; ${sourceOf(IMMERSION)}` } : LEAST_PROUD,
        remedy: `Use a part ${shown(height)} mm high (about half immersed), or less water.`,
        edit: height <= 500 ? { path: partPath(setup, part.id, "heightMm"), value: height } : null,
      }),
    ];
  });

import { reachBeyondWallMm } from "../geometry/clearance";
import { outlined } from "../geometry/overlap";
import { OUTSIDE_TOLERANCE_MM } from "./limits";
import type { SetupRule } from "./rule";
import { finding, partLabel, shown } from "./wording";

/** A part may touch the wall or reach from wall to wall, but not beyond. */
export const partOutside: SetupRule = (setup) =>
  setup.parts.flatMap((part) => {
    const beyondMm = reachBeyondWallMm(outlined(part), setup.tray);
    if (beyondMm <= OUTSIDE_TOLERANCE_MM.value) return [];
    return [
      finding({
        code: "part-outside",
        severity: "stop",
        partIds: [part.id],
        message: `${partLabel(part)} reaches ${shown(beyondMm, 2)} mm beyond the wall of the tray.`,
        measured: `${shown(beyondMm, 2)} mm beyond the wall`,
        limit: { text: "inside the wall, or touching it", source: "the tray's inner sizes" },
        remedy: "Move it inside, or make it smaller.",
      }),
    ];
  });

import { barsWithInsulatingBlock } from "./bars-with-insulating-block";
import { barsWithLooseRing } from "./bars-with-loose-ring";
import { discInRing } from "./disc-in-ring";
import type { Example } from "./example";
import { offCentreDiscInRing } from "./off-centre-disc-in-ring";
import { stepInDepth } from "./step-in-depth";
import { threeElectrodes } from "./three-electrodes";
import { tiltedWedge } from "./tilted-wedge";
import { twoBars } from "./two-bars";
import { twoDiscs } from "./two-discs";

/** The ready setups, in the order in which the start page shows them; the second is loaded at the first start. */
export const EXAMPLES: readonly Example[] = [
  twoBars,
  barsWithLooseRing,
  twoDiscs,
  discInRing,
  offCentreDiscInRing,
  barsWithInsulatingBlock,
  tiltedWedge,
  stepInDepth,
  threeElectrodes,
];

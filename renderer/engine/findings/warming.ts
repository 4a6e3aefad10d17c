import { POWER, WARMING } from "./limits";
import type { PlanRule } from "./rule";
import { finding, percent, roundedDown, shown } from "./wording";

/** Power into the water and the warming that it brings over the session. */
export const warming: PlanRule = ({ setup, bench }) => {
  const { powerW } = bench.circuit;
  const { riseOverSessionK, currentDrift } = bench.heat;
  const tooWarm = riseOverSessionK / WARMING.value;
  const tooStrong = powerW.value / POWER.value;
  const worst = Math.max(tooWarm, tooStrong);
  if (worst <= 1) return [];
  const volts = roundedDown(setup.supply.volts / Math.sqrt(worst));
  return [
    finding({
      code: "water-warms",
      severity: "caution",
      about: "supply.volts",
      message: `${shown(powerW.value)} W warms the water by up to ${shown(riseOverSessionK, 2)} K in ${shown(setup.session.minutes)} min; the current drifts by ${percent(currentDrift)}.`,
      measured: tooWarm >= tooStrong ? `${shown(riseOverSessionK)} K` : `${shown(powerW.value)} W`,
      limit: tooWarm >= tooStrong ? WARMING : POWER,
      remedy: `Set ${shown(volts)} V or less, or switch on only while reading.`,
      edit: { path: "supply.volts", value: volts },
    }),
  ];
};

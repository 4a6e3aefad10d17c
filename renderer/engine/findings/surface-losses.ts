import { ADVISABLE_HIGH_HZ, INTERFACE_SHARE } from "./limits";
import type { PlanRule } from "./rule";
import { finding, percent, roundedUp, shown } from "./wording";

/** AC: what the double layers take of the volts. */
export const interfaceShare: PlanRule = ({ setup, bench }) => {
  const surface = bench.interface;
  if (surface.waveform === "dc" || surface.shareLost.typical <= INTERFACE_SHARE.value) return [];
  const { low, typical, high } = surface.shareLost;
  const range = low < high ? ` (${percent(low)} to ${percent(high)}, an estimate)` : "";
  const needed = roundedUp(surface.frequencyForTwoPercentHz, 5);
  const top = Math.min(setup.meter.acHighHz, ADVISABLE_HIGH_HZ.value);
  return [
    finding({
      code: "interface-loss",
      severity: "caution",
      about: "supply.frequencyHz",
      message: `At ${shown(surface.frequencyHz)} Hz the electrodes' surfaces take about ${percent(typical)} of the volts${range}; since they are out of step with the water's, ${shown(surface.waterVolts.typical, 4)} V stay across the water.`,
      measured: percent(typical, 3),
      limit: { text: percent(INTERFACE_SHARE.value), source: "electrode double layers, published 5 to 50 µF/cm² (a margin of ours)" },
      remedy:
        needed <= top
          ? `Raise the frequency to ${shown(needed, 4)} Hz, use water that conducts less, or let the readings allow for the loss.`
          : "Use water that conducts less, or electrodes with more wetted face, or let the readings allow for the loss.",
      edit: needed <= top ? { path: "supply.frequencyHz", value: needed } : null,
    }),
  ];
};

/** AC so dense that the double layer no longer carries it all, and gas forms. */
export const alternatingGas: PlanRule = ({ bench }) => {
  const surface = bench.interface;
  if (surface.waveform === "dc") return [];
  const dense = bench.circuit.electrodes.filter((electrode) => electrode.largestCurrentDensityAPerM2 > surface.gasFreeCurrentDensityAPerM2);
  if (dense.length === 0) return [];
  const most = Math.max(...dense.map((electrode) => electrode.largestCurrentDensityAPerM2));
  // 1 mA/cm² is 10 A/m².
  const measured = `${shown(most / 10)} mA/cm²`;
  return [
    finding({
      code: "ac-gas",
      severity: "note",
      partIds: dense.map((electrode) => electrode.id),
      about: "supply.volts",
      message: `At its densest place ${measured} leaves the metal, more than the double layer carries: fine bubbles and a changing loss are likely there.`,
      measured,
      limit: {
        text: `${shown(surface.gasFreeCurrentDensityAPerM2 / 10)} mA/cm²`,
        source: "2πfC·0.5 V (derived, an estimate)",
      },
      remedy: "Lower the volts, round the corners, or use water that conducts less.",
    }),
  ];
};

/** DC: what electrolysis takes, as a number beside the plain statement that DC polarises. */
export const directDrop: PlanRule = ({ setup, bench }) => {
  const surface = bench.interface;
  if (surface.waveform === "ac") return [];
  const { low, typical, high } = surface.electrodeDropVolts;
  const given = surface.basis === "given";
  return [
    finding({
      code: "dc-drop",
      severity: "note",
      about: "interface.electrodeDropVolts",
      message: given
        ? `Of ${shown(bench.circuit.volts)} V your measured ${shown(typical)} V are lost at the electrodes; ${shown(surface.waterVolts.typical)} V drive the water.`
        : `Of ${shown(bench.circuit.volts)} V about ${shown(typical)} V (${shown(low)} to ${shown(high)}) are lost at the electrodes; ${shown(surface.waterVolts.typical)} V drive the water.`,
      measured: `${shown(typical)} V`,
      limit: {
        text: "water splits from 1.23 V on",
        source: given ? "measured by the user" : "1.23 V is published; the drop itself from memory; check the current edition",
      },
      remedy: setup.interface.inReadings
        ? "The predicted readings allow for it; compare the first reading before going on."
        : "Measure beside each electrode and enter the drop, or let the readings allow for it.",
    }),
  ];
};

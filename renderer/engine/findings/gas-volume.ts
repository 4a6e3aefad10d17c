import { CHLORINE_CEILING, HYDROGEN_CAUTION, HYDROGEN_FLAMMABLE } from "./limits";
import type { PlanRule } from "./rule";
import { finding, shown } from "./wording";

/** Hydrogen under a cover or in a hood that stands still, against its flammable limit. */
export const gasVolume: PlanRule = ({ bench }) => {
  const { gas } = bench;
  if (gas === null || gas.hydrogenVolPercent <= HYDROGEN_CAUTION.value) return [];
  const flammable = gas.hydrogenVolPercent >= HYDROGEN_FLAMMABLE.value;
  const measured = `${shown(gas.hydrogenVolPercent)} vol % in ${shown(gas.hoodLitres)} L`;
  return [
    finding({
      code: "hydrogen",
      severity: flammable ? "stop" : "caution",
      about: "session.hoodLitres",
      message: `The session makes up to ${shown(gas.hydrogenMl)} mL of hydrogen over each tray: ${measured} of still air.`,
      measured,
      limit: flammable ? HYDROGEN_FLAMMABLE : HYDROGEN_CAUTION,
      remedy: "Leave the tray uncovered with the room aired, keep flames away, lower the volts, or use AC.",
      safety: true,
    }),
  ];
};

/** Chlorine in the room, for the record beside the rule that forbids DC with chloride. */
export const chlorineInRoom: PlanRule = ({ setup, bench }) => {
  const { gas } = bench;
  if (gas === null || gas.chlorineRoomPpm <= CHLORINE_CEILING.value) return [];
  const measured = `${shown(gas.chlorineRoomPpm)} ppm in ${shown(setup.session.roomCubicMetres)} m³`;
  return [
    finding({
      code: "chlorine-in-room",
      severity: "stop",
      about: "supply.waveform",
      message: `All trays together can make ${measured} of closed room, more than lungs should meet for a quarter of an hour.`,
      measured,
      limit: CHLORINE_CEILING,
      remedy: "Never DC with chloride: use AC or another salt.",
      safety: true,
    }),
  ];
};

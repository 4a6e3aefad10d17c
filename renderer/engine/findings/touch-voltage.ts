import { isSaltSolution } from "../bench/water-conductivity";
import { dryHandsLimit, sourceOf, UNLOADED_RISE, wetHandsLimit } from "./limits";
import type { SetupRule } from "./rule";
import { finding, shown } from "./wording";

/** The supply against the touch-voltage limits, with the volts that it gives when nothing is connected. */
export const touchVoltage: SetupRule = (setup) => {
  const { volts, waveform, openCircuitVolts } = setup.supply;
  const salt = isSaltSolution(setup.water.salt);
  const wet = wetHandsLimit(waveform, salt);
  const dry = dryHandsLimit(waveform);
  const standing = Math.max(volts, openCircuitVolts ?? 0);
  const unloaded = standing > volts;
  const measured = `${shown(standing, 4)} V ${waveform.toUpperCase()}${unloaded ? " unloaded" : ""}`;
  const about = unloaded ? "supply.openCircuitVolts" : "supply.volts";
  const edit = unloaded ? null : { path: "supply.volts", value: wet.value };
  const another = unloaded
    ? `Use a supply that stays at or below ${wet.value} V with nothing connected.`
    : `Set the supply to ${wet.value} V or less.`;
  if (standing > dry.value) {
    const message = `The supply reaches ${measured}, above the limit even for dry hands.`;
    return [
      finding({ code: "volts-above-dry", severity: "stop", about, message, measured, limit: dry, remedy: another, edit, safety: true }),
    ];
  }
  if (standing > wet.value) {
    const message = `The supply reaches ${measured}; hands are wet at this bench${salt ? ", and salt water makes the skin conduct better still" : ""}.`;
    const remedy = `${another} Switch off before hands go into the water.`;
    return [
      finding({ code: "volts-above-wet-hands", severity: "caution", about, message, measured, limit: wet, remedy, edit, safety: true }),
    ];
  }
  if (waveform === "ac" && openCircuitVolts === undefined && volts * UNLOADED_RISE.value > wet.value) {
    const might = shown(volts * UNLOADED_RISE.value);
    return [
      finding({
        code: "open-circuit-unknown",
        severity: "note",
        about: "supply.openCircuitVolts",
        message: `A small transformer marked ${shown(volts)} V can stand near ${might} V with nothing connected, above the ${wet.value} V for wet hands.`,
        measured: `${measured} stated, unloaded unknown`,
        limit: { text: `${wet.value} ${wet.unit} with nothing connected`, source: `${sourceOf(wet)}; ${sourceOf(UNLOADED_RISE)}` },
        remedy: "Measure the supply with its leads open and enter that as the open-circuit voltage.",
        safety: true,
      }),
    ];
  }
  return [];
};

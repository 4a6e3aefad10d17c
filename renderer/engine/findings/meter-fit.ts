import { isSaltSolution } from "../bench/water-conductivity";
import { ADVISABLE_HIGH_HZ, ADVISABLE_LOW_HZ, DIGITS_PER_MM, LOADING_SHARE, sourceOf, wetHandsLimit } from "./limits";
import type { PlanRule, SetupRule } from "./rule";
import { finding, percent, roundedUp, shown } from "./wording";

/** The meter's input loads the probe, whose tip meets the water through a small spot. */
export const meterLoading: PlanRule = ({ setup, bench }) => {
  const { loadingShare, tipResistanceOhm, trayResistanceOhm, inputImpedanceOhm } = bench.meter;
  if (loadingShare <= LOADING_SHARE.value) return [];
  const source = (tipResistanceOhm + trayResistanceOhm) / 1000;
  return [
    finding({
      code: "meter-loads",
      severity: "caution",
      about: "meter.inputMegohm",
      message: `The meter draws the reading down by ${percent(loadingShare)}: ${shown(source)} kΩ at the probe against ${shown(inputImpedanceOhm / 1e6)} MΩ at its input.`,
      measured: percent(loadingShare, 3),
      limit: { text: percent(LOADING_SHARE.value), source: sourceOf(LOADING_SHARE) },
      remedy: `Use a meter of higher input resistance, a thicker tip than ${shown(setup.probing.probeTipMm)} mm, or water that conducts better; never a low-impedance mode.`,
    }),
  ];
};

/** The supply's frequency against what the meter measures truly, and against what is advisable. */
export const meterFrequency: SetupRule = (setup) => {
  const { waveform, frequencyHz } = setup.supply;
  const { acLowHz, acHighHz } = setup.meter;
  if (waveform === "dc") return [];
  const measured = `${shown(frequencyHz, 4)} Hz`;
  if (frequencyHz < acLowHz || frequencyHz > acHighHz) {
    const nearest = frequencyHz < acLowHz ? acLowHz : acHighHz;
    return [
      finding({
        code: "frequency-outside-meter",
        severity: "caution",
        about: "supply.frequencyHz",
        message: `At ${measured} the meter is outside its AC range, and its readings carry no stated accuracy.`,
        measured,
        limit: { text: `${shown(acLowHz, 4)} to ${shown(acHighHz, 4)} Hz`, source: "the meter's own AC range" },
        remedy: `Use ${shown(nearest, 4)} Hz, or a meter made for ${measured}.`,
        edit: nearest > 0 ? { path: "supply.frequencyHz", value: nearest } : null,
      }),
    ];
  }
  const low = frequencyHz < ADVISABLE_LOW_HZ.value;
  if (!low && frequencyHz <= ADVISABLE_HIGH_HZ.value) return [];
  const bound = low ? ADVISABLE_LOW_HZ : ADVISABLE_HIGH_HZ;
  return [
    finding({
      code: "frequency-not-advised",
      severity: "note",
      about: "supply.frequencyHz",
      message: low
        ? `At ${measured} the electrodes' surfaces take a growing share of the volts.`
        : `At ${measured} leads and meter act as small capacitors beside the water.`,
      measured,
      limit: bound,
      remedy: `Use ${ADVISABLE_LOW_HZ.value} to ${ADVISABLE_HIGH_HZ.value} Hz.`,
      edit: bound.value >= acLowHz && bound.value <= acHighHz ? { path: "supply.frequencyHz", value: bound.value } : null,
    }),
  ];
};

/** A millimetre must move the last digit, or the line cannot be found. */
export const readableGradient: PlanRule = ({ setup, bench }) => {
  const { digitsPerMm, medianFieldMvPerMm, digitVolts } = bench.meter;
  if (digitsPerMm === null || medianFieldMvPerMm === null || digitsPerMm >= DIGITS_PER_MM.value) return [];
  const { volts, waveform } = setup.supply;
  const needed = digitsPerMm > 0 ? roundedUp(volts / digitsPerMm, 0.1) : Infinity;
  const allowed = needed <= wetHandsLimit(waveform, isSaltSolution(setup.water.salt)).value;
  return [
    finding({
      code: "gradient-unreadable",
      severity: "caution",
      about: "supply.volts",
      message: `Along half of the lines a millimetre changes the reading by no more than ${shown(medianFieldMvPerMm, 2)} mV, less than one digit (${shown(digitVolts * 1000)} mV).`,
      measured: `${shown(digitsPerMm, 2)} digit per mm`,
      limit: DIGITS_PER_MM,
      remedy: allowed
        ? `Set ${shown(needed)} V, bring the electrodes closer, or use a meter with more counts.`
        : "Bring the electrodes closer, or use a meter with more counts.",
      edit: allowed ? { path: "supply.volts", value: needed } : null,
    }),
  ];
};

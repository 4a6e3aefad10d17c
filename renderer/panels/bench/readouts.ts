import type { BenchNumbers, Estimate } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { percentText, shownBounded, shownNumber, withPrefix } from "./numbers";

/** One line of a card: what it is, its value with unit, and what a reader should know of it. */
export interface Readout {
  readonly term: string;
  readonly value: string;
  readonly note?: string;
}

const range = ({ low, high }: Estimate, text: (value: number) => string): string =>
  low === high ? text(low) : `${text(low)} to ${text(high)}`;
const litres = (value: number): string => (value < 1 ? `${shownNumber(value * 1000)} mL` : `${shownNumber(value)} L`);
const grams = (value: number): string => (value < 1 ? `${shownNumber(value * 1000, 2)} mg` : `${shownNumber(value, 2)} g`);

/** @returns the water: conductivity, volume, salt, freeboard, tilt, parallax. */
export function waterReadouts(setup: Setup, { water, geometry }: BenchNumbers): readonly Readout[] {
  const { trays } = setup.session;
  const dose = water.saltToTarget;
  const lines: Readout[] = [
    {
      term: `Conductivity at ${shownNumber(setup.water.temperatureC)} °C`,
      value: `${shownNumber(water.conductivitySPerM * 1e4, 4)} µS/cm`,
      note: `${water.temperatureRule}, ${percentText(water.changePerKelvin)} per kelvin${water.withinTemperatureRange ? "" : "; beyond the published table"}`,
    },
    {
      term: "Volume",
      value: litres(water.volumePerTrayL.value),
      ...(trays > 1 ? { note: `${litres(water.volumeAllTraysL.value)} for ${trays} trays` } : {}),
    },
  ];
  if (dose !== null) {
    lines.push({
      term: `Salt for ${shownNumber(dose.toUsPerCm, 5)} µS/cm`,
      value: grams(dose.perTrayG),
      note: `${trays > 1 ? `${grams(dose.allTraysG)} for ${trays} trays; ` : ""}${dose.withinData ? "NaCl, stir and measure again" : "beyond the published data"}`,
    });
  }
  const [shallow, deep] = [water.shallowestMm, water.deepestMm];
  if (shallow !== deep) lines.push({ term: "Depth at the walls", value: `${shownNumber(shallow)} to ${shownNumber(deep)} mm` });
  lines.push(
    { term: "Freeboard", value: `${shownNumber(geometry.freeboardMm)} mm` },
    {
      term: `A tilt of ${geometry.tiltDeg}°`,
      value: percentText(geometry.tiltReadingShare),
      note: `of the span, at the most; ${percentText(geometry.tiltDepthShare)} of the depth`,
    },
    {
      term: "A mark seen aslant",
      value: `${shownNumber(geometry.parallaxAt10DegMm, 2)} mm at 10°`,
      note: `${shownNumber(geometry.parallaxAt30DegMm, 2)} mm at 30°: look straight down`,
    },
  );
  return lines;
}

/** @returns the circuit: resistance, current, power, each electrode's current. */
export function circuitReadouts(setup: Setup, { circuit }: BenchNumbers): readonly Readout[] {
  const { resistanceOhm, currentA, powerW, electrodes } = circuit;
  return [
    ...(resistanceOhm === null ? [] : [{ term: "Resistance", value: `${shownBounded(resistanceOhm)} Ω` }]),
    {
      term: "Current",
      value: withPrefix(currentA.value, "A"),
      note: `${percentText(circuit.shareOfLimit)} of the supply's ${withPrefix(circuit.currentLimitA, "A")}`,
    },
    { term: "Power", value: withPrefix(powerW.value, "W") },
    ...electrodes.map((electrode) => ({
      term: setup.parts.find((part) => part.id === electrode.id)?.name || `Electrode ${electrode.id}`,
      value: withPrefix(electrode.currentA, "A"),
      // 1 mA/cm² is 10 A/m².
      note: `at the most ${shownNumber(electrode.largestCurrentDensityAPerM2 / 10, 2)} mA/cm²`,
    })),
  ];
}

/** @returns what the electrodes' surfaces take. */
export function surfaceReadouts({ interface: surface }: BenchNumbers): readonly Readout[] {
  const basis = { given: "your own value", material: "by the metal", default: "metal unknown" }[surface.basis];
  if (surface.waveform === "dc") {
    return [
      {
        term: "Lost at both electrodes",
        value: range(surface.electrodeDropVolts, (volts) => `${shownNumber(volts)} V`),
        note: `${basis}; from memory, measure it`,
      },
      { term: "Left across the water", value: `${shownNumber(surface.waterVolts.typical)} V` },
      { term: "Readings", value: "drift with time", note: "DC polarises the electrodes; AC is preferred" },
    ];
  }
  return [
    {
      term: "Lost at the surfaces",
      value: `about ${percentText(surface.shareLost.typical)}`,
      note: `${range(surface.shareLost, (share) => percentText(share))}, an estimate`,
    },
    { term: "Left across the water", value: `${shownNumber(surface.waterVolts.typical, 4)} V`, note: "the lost volts are out of step" },
    { term: "Double layer", value: `${range(surface.doubleLayerUfPerCm2, (value) => shownNumber(value))} µF/cm²`, note: basis },
    { term: "2 % are lost at", value: withPrefix(surface.frequencyForTwoPercentHz, "Hz", 2) },
  ];
}

/** @returns what meter and probe do to a reading. */
export function meterReadouts({ meter }: BenchNumbers): readonly Readout[] {
  return [
    {
      term: "Probe loaded by",
      value: percentText(meter.loadingShare),
      note: `${withPrefix(meter.tipResistanceOhm + meter.trayResistanceOhm, "Ω")} at the tip, ${withPrefix(meter.inputImpedanceOhm, "Ω")} in the meter`,
    },
    { term: "Range that fits", value: `${shownNumber(meter.rangeVolts)} V`, note: `one digit is ${withPrefix(meter.digitVolts, "V")}` },
    { term: "Accuracy at the top", value: `± ${withPrefix(meter.accuracyVolts, "V", 2)}` },
    ...(meter.medianFieldMvPerMm === null || meter.digitsPerMm === null
      ? []
      : [
          {
            term: "Field along the lines",
            value: `${shownNumber(meter.medianFieldMvPerMm)} mV/mm`,
            note: `median; ${shownNumber(meter.digitsPerMm, 2)} digits per mm`,
          },
        ]),
  ];
}

/** @returns heat over the session, and on DC the gas and the metal lost. */
export function heatAndGasReadouts(setup: Setup, { heat, gas }: BenchNumbers): readonly Readout[] {
  const lines: Readout[] = [
    {
      term: `Warmer after ${shownNumber(setup.session.minutes)} min`,
      value: `${shownNumber(heat.riseOverSessionK, 2)} K`,
      note: `at the most; the current drifts by ${percentText(heat.currentDrift)}`,
    },
    {
      term: "Evaporation",
      value: `${range(heat.evaporationMm, (value) => shownNumber(value, 2))} mm`,
      note: "and cools the water: measure its temperature",
    },
  ];
  if (gas === null) return [...lines, { term: "Gas", value: "little", note: "AC: the double layers carry the current" }];
  lines.push({
    term: "Hydrogen",
    value: `${shownNumber(gas.hydrogenMl, 2)} mL`,
    note: `${shownNumber(gas.hydrogenVolPercent, 2)} vol % in ${shownNumber(gas.hoodLitres)} L of still air; flammable from ${gas.hydrogenLimitVolPercent} vol %`,
  });
  if (gas.chlorineMl > 0) {
    lines.push({
      term: "Chlorine",
      value: `${shownNumber(gas.chlorineMl, 2)} mL`,
      note: `${shownNumber(gas.chlorineRoomPpm, 2)} ppm in the room, all trays`,
    });
  } else {
    lines.push({ term: "Oxygen", value: `${shownNumber(gas.oxygenMl, 2)} mL` });
  }
  for (const anode of gas.anodes) {
    if (anode.lostG !== null) lines.push({ term: `${anode.id} loses`, value: grams(anode.lostG), note: `${anode.material}, at the most` });
  }
  return lines;
}

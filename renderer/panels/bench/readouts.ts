import type { BenchNumbers, Estimate } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { percentText, shownBounded, shownNumber, withPrefix } from "./numbers";

const words = texts.readouts;

/** One line of a card: what it is, its value with unit, and what a reader should know of it. */
export interface Readout {
  readonly term: string;
  readonly value: string;
  readonly note?: string;
}

const range = ({ low, high }: Estimate, text: (value: number) => string): string =>
  low === high ? text(low) : words.range(text(low), text(high));
const litres = (value: number): string => (value < 1 ? `${shownNumber(value * 1000)} mL` : `${shownNumber(value)} L`);
const grams = (value: number): string => (value < 1 ? `${shownNumber(value * 1000, 2)} mg` : `${shownNumber(value, 2)} g`);

/** @returns the water: conductivity, volume, salt, freeboard, tilt, parallax. */
export function waterReadouts(setup: Setup, { water, geometry }: BenchNumbers): readonly Readout[] {
  const { trays } = setup.session;
  const dose = water.saltToTarget;
  const lines: Readout[] = [
    {
      term: words.water.conductivity(shownNumber(setup.water.temperatureC)),
      value: `${shownNumber(water.conductivitySPerM * 1e4, 4)} µS/cm`,
      note: words.water.perKelvin(water.temperatureRule, percentText(water.changePerKelvin), water.withinTemperatureRange),
    },
    {
      term: words.water.volume,
      value: litres(water.volumePerTrayL.value),
      ...(trays > 1 ? { note: words.water.forTrays(litres(water.volumeAllTraysL.value), trays) } : {}),
    },
  ];
  if (dose !== null) {
    lines.push({
      term: words.water.salt(shownNumber(dose.toUsPerCm, 5)),
      value: grams(dose.perTrayG),
      note: `${trays > 1 ? `${words.water.forTrays(grams(dose.allTraysG), trays)}; ` : ""}${dose.withinData ? words.water.stir : words.water.beyondData}`,
    });
  }
  const [shallow, deep] = [water.shallowestMm, water.deepestMm];
  if (shallow !== deep) lines.push({ term: words.water.wallDepth, value: `${words.range(shownNumber(shallow), shownNumber(deep))} mm` });
  lines.push(
    { term: words.water.freeboard, value: `${shownNumber(geometry.freeboardMm)} mm` },
    {
      term: words.water.tilt(geometry.tiltDeg),
      value: percentText(geometry.tiltReadingShare),
      note: words.water.tiltNote(percentText(geometry.tiltDepthShare)),
    },
    {
      term: words.water.parallax,
      value: words.water.at10(shownNumber(geometry.parallaxAt10DegMm, 2)),
      note: words.water.at30(shownNumber(geometry.parallaxAt30DegMm, 2)),
    },
  );
  return lines;
}

/** @returns the circuit: resistance, current, power, each electrode's current. */
export function circuitReadouts(setup: Setup, { circuit }: BenchNumbers): readonly Readout[] {
  const { resistanceOhm, currentA, powerW, electrodes } = circuit;
  return [
    ...(resistanceOhm === null ? [] : [{ term: words.circuit.resistance, value: `${shownBounded(resistanceOhm)} Ω` }]),
    {
      term: words.circuit.current,
      value: withPrefix(currentA.value, "A"),
      note: words.circuit.ofLimit(percentText(circuit.shareOfLimit), withPrefix(circuit.currentLimitA, "A")),
    },
    { term: words.circuit.power, value: withPrefix(powerW.value, "W") },
    ...electrodes.map((electrode) => ({
      term: setup.parts.find((part) => part.id === electrode.id)?.name || words.circuit.electrode(electrode.id),
      value: withPrefix(electrode.currentA, "A"),
      // 1 mA/cm² is 10 A/m².
      note: words.circuit.density(shownNumber(electrode.largestCurrentDensityAPerM2 / 10, 2)),
    })),
  ];
}

/** @returns what the electrodes' surfaces take. */
export function surfaceReadouts({ interface: surface }: BenchNumbers): readonly Readout[] {
  const basis = words.surfaces.bases[surface.basis];
  if (surface.waveform === "dc") {
    return [
      {
        term: words.surfaces.lostDc,
        value: range(surface.electrodeDropVolts, (volts) => `${shownNumber(volts)} V`),
        note: words.surfaces.measureIt(basis),
      },
      { term: words.surfaces.left, value: `${shownNumber(surface.waterVolts.typical)} V` },
      { term: words.surfaces.readings, value: words.surfaces.drift, note: words.surfaces.polarises },
    ];
  }
  return [
    {
      term: words.surfaces.lostAc,
      value: words.surfaces.about(percentText(surface.shareLost.typical)),
      note: words.surfaces.estimate(range(surface.shareLost, (share) => percentText(share))),
    },
    { term: words.surfaces.left, value: `${shownNumber(surface.waterVolts.typical, 4)} V`, note: words.surfaces.outOfStep },
    { term: words.surfaces.doubleLayer, value: `${range(surface.doubleLayerUfPerCm2, (value) => shownNumber(value))} µF/cm²`, note: basis },
    { term: words.surfaces.twoPercent, value: withPrefix(surface.frequencyForTwoPercentHz, "Hz", 2) },
  ];
}

/** @returns what meter and probe do to a reading. */
export function meterReadouts({ meter }: BenchNumbers): readonly Readout[] {
  return [
    {
      term: words.meter.loading,
      value: percentText(meter.loadingShare),
      note: words.meter.impedances(
        withPrefix(meter.tipResistanceOhm + meter.trayResistanceOhm, "Ω"),
        withPrefix(meter.inputImpedanceOhm, "Ω"),
      ),
    },
    { term: words.meter.range, value: `${shownNumber(meter.rangeVolts)} V`, note: words.meter.digit(withPrefix(meter.digitVolts, "V")) },
    { term: words.meter.accuracy, value: `± ${withPrefix(meter.accuracyVolts, "V", 2)}` },
    ...(meter.medianFieldMvPerMm === null || meter.digitsPerMm === null
      ? []
      : [
          {
            term: words.meter.field,
            value: `${shownNumber(meter.medianFieldMvPerMm)} mV/mm`,
            note: words.meter.median(shownNumber(meter.digitsPerMm, 2)),
          },
        ]),
  ];
}

/** @returns heat over the session, and on DC the gas and the metal lost. */
export function heatAndGasReadouts(setup: Setup, { heat, gas }: BenchNumbers): readonly Readout[] {
  const lines: Readout[] = [
    {
      term: words.session.warmer(shownNumber(setup.session.minutes)),
      value: `${shownNumber(heat.riseOverSessionK, 2)} K`,
      note: words.session.drift(percentText(heat.currentDrift)),
    },
    {
      term: words.session.evaporation,
      value: `${range(heat.evaporationMm, (value) => shownNumber(value, 2))} mm`,
      note: words.session.cools,
    },
  ];
  if (gas === null) return [...lines, { term: words.session.gas, value: words.session.little, note: words.session.acCarries }];
  lines.push({
    term: words.session.hydrogen,
    value: `${shownNumber(gas.hydrogenMl, 2)} mL`,
    note: words.session.hydrogenShare(shownNumber(gas.hydrogenVolPercent, 2), shownNumber(gas.hoodLitres), gas.hydrogenLimitVolPercent),
  });
  if (gas.chlorineMl > 0) {
    lines.push({
      term: words.session.chlorine,
      value: `${shownNumber(gas.chlorineMl, 2)} mL`,
      note: words.session.chlorineShare(shownNumber(gas.chlorineRoomPpm, 2)),
    });
  } else {
    lines.push({ term: words.session.oxygen, value: `${shownNumber(gas.oxygenMl, 2)} mL` });
  }
  for (const anode of gas.anodes) {
    if (anode.lostG !== null)
      lines.push({ term: words.session.loses(anode.id), value: grams(anode.lostG), note: words.session.atMost(anode.material) });
  }
  return lines;
}

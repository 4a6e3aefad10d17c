import type {
  AlternatingInterface,
  CircuitNumbers,
  DirectInterface,
  Estimate,
  InterfaceNumbers,
  SharePoint,
} from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { electrodeMaterial } from "./electrode-materials";

/** The double layer still carries the current, and little gas forms, up to about this swing, V (derived in physics terms, an estimate). */
export const GAS_FREE_SWING_VOLTS = 0.5;
const MM2_PER_CM2 = 100;
const CM2_PER_M2 = 1e4;
const LOWEST_HZ = 1;
const HIGHEST_HZ = 1e5;
const POINTS_PER_DECADE = 12;

/** @returns share of the voltage lost at the surfaces, as a magnitude: the reactance stands at right angles to the resistance. */
export function alternatingShareLost(reactanceOhm: number, resistanceOhm: number): number {
  if (reactanceOhm === 0) return 0;
  return reactanceOhm === Infinity ? 1 : reactanceOhm / Math.hypot(reactanceOhm, resistanceOhm);
}

/** @returns volts left across the water: V/√(1 + (X/R)²). */
export function alternatingWaterVolts(volts: number, reactanceOhm: number, resistanceOhm: number): number {
  return volts / Math.hypot(1, reactanceOhm / resistanceOhm);
}

/** @returns reactance of a double layer, ohm: 1/(2πfCA), with C in µF/cm² and A in mm². */
export function doubleLayerReactanceOhm(frequencyHz: number, capacitanceUfPerCm2: number, areaMm2: number): number {
  return 1 / (2 * Math.PI * frequencyHz * capacitanceUfPerCm2 * 1e-6 * (areaMm2 / MM2_PER_CM2));
}

const given = (value: number): Estimate => ({ low: value, typical: value, high: value });
const each = (of: (end: keyof Estimate) => number): Estimate => ({ low: of("low"), typical: of("typical"), high: of("high") });
/** The most capacitance makes the least reactance. */
const OPPOSITE: Record<keyof Estimate, keyof Estimate> = { low: "high", typical: "typical", high: "low" };

interface Surface {
  readonly areaMm2: number;
  readonly capacitance: Estimate;
}

function surfacesOf(setup: Setup, circuit: CircuitNumbers, entering: boolean): readonly Surface[] {
  const own = setup.interface.doubleLayerUfPerCm2;
  return circuit.electrodes
    .filter((electrode) => (entering ? electrode.currentA > 0 : electrode.currentA < 0))
    .map((electrode) => ({
      areaMm2: electrode.wettedAreaMm2,
      capacitance: own !== undefined ? given(own) : materialOf(setup, electrode.id).material.doubleLayerUfPerCm2,
    }));
}

function materialOf(setup: Setup, id: string): ReturnType<typeof electrodeMaterial> {
  return electrodeMaterial(setup.parts.find((part) => part.id === id)?.material ?? "");
}

/** Surfaces that share one direction of the current lie side by side: their admittances add. */
function reactance(surfaces: readonly Surface[], frequencyHz: number): Estimate {
  return each((end) => {
    const admittance = surfaces.reduce(
      (sum, surface) => sum + 1 / doubleLayerReactanceOhm(frequencyHz, surface.capacitance[OPPOSITE[end]], surface.areaMm2),
      0,
    );
    return 1 / admittance;
  });
}

/** Frequencies from 1 Hz to 100 kHz, evenly on a logarithmic scale. */
const FREQUENCIES_HZ: readonly number[] = Array.from(
  { length: Math.round(Math.log10(HIGHEST_HZ / LOWEST_HZ) * POINTS_PER_DECADE) + 1 },
  (_, index) => LOWEST_HZ * 10 ** (index / POINTS_PER_DECADE),
);

function basisOf(setup: Setup, circuit: CircuitNumbers, own: number | undefined): AlternatingInterface["basis"] {
  if (own !== undefined) return "given";
  return circuit.electrodes.every((electrode) => materialOf(setup, electrode.id).known) ? "material" : "default";
}

/**
 * AC: the double layers of all surfaces where the current enters the water, and of all where it leaves, in series with the water
 * (complex sum). Whole wetted faces are counted and one plain capacitance for each metal, so this is an estimate; loose conductors
 * are left out.
 */
export function alternatingInterface(setup: Setup, circuit: CircuitNumbers): AlternatingInterface {
  const { frequencyHz, volts } = setup.supply;
  const resistance = circuit.effectiveResistanceOhm ?? Infinity;
  const entering = surfacesOf(setup, circuit, true);
  const leaving = surfacesOf(setup, circuit, false);
  const x1 = reactance(entering, frequencyHz);
  const x2 = reactance(leaving, frequencyHz);
  const none = circuit.effectiveResistanceOhm === null;
  const total = each((end) => (none ? 0 : x1[end] + x2[end]));
  const shareAt = (hz: number): Estimate => each((end) => alternatingShareLost((total[end] * frequencyHz) / hz, resistance));
  const own = setup.interface.doubleLayerUfPerCm2;
  const capacitance = own !== undefined ? given(own) : leastOf([...entering, ...leaving].map((surface) => surface.capacitance));
  // X/√(R² + X²) = 2 % where X/R = 0.02/√(1 − 0.02²); X falls as 1/f.
  const twoPercent = 0.02 / Math.sqrt(1 - 0.02 ** 2);
  return {
    waveform: "ac",
    doubleLayerUfPerCm2: capacitance,
    basis: basisOf(setup, circuit, own),
    frequencyHz,
    reactanceEnteringOhm: none ? given(0) : x1,
    reactanceLeavingOhm: none ? given(0) : x2,
    reactanceOhm: total,
    shareLost: shareAt(frequencyHz),
    waterVolts: each((end) => alternatingWaterVolts(spanOr(circuit, volts), total[OPPOSITE[end]], resistance)),
    frequencyForTwoPercentHz: (frequencyHz * (total.typical / resistance)) / twoPercent,
    gasFreeCurrentDensityAPerM2: 2 * Math.PI * frequencyHz * capacitance.typical * 1e-6 * CM2_PER_M2 * GAS_FREE_SWING_VOLTS,
    alongFrequency: FREQUENCIES_HZ.map((hz): SharePoint => ({ frequencyHz: hz, share: shareAt(hz) })),
  };
}

const spanOr = (circuit: CircuitNumbers, volts: number): number => (circuit.volts > 0 ? circuit.volts : volts);

function leastOf(estimates: readonly Estimate[]): Estimate {
  const fallback = electrodeMaterial("").material.doubleLayerUfPerCm2;
  return estimates.reduce((least, one) => (one.typical < least.typical ? one : least), estimates[0] ?? fallback);
}

/**
 * DC: the volts that electrolysis takes at both electrodes together, by the metal where the current enters the water (it is there
 * that metal dissolves or gas forms), or as the user measured them. What is left drives the current through the water.
 */
export function directInterface(setup: Setup, circuit: CircuitNumbers): DirectInterface {
  const own = setup.interface.electrodeDropVolts;
  const anode = circuit.electrodes.find((electrode) => electrode.currentA > 0);
  const material = materialOf(setup, anode?.id ?? "");
  const drop = own !== undefined ? given(own) : material.material.electrodeDropVolts;
  const span = spanOr(circuit, setup.supply.volts);
  return {
    waveform: "dc",
    electrodeDropVolts: drop,
    basis: own !== undefined ? "given" : material.known ? "material" : "default",
    shareLost: each((end) => Math.min(1, drop[end] / span)),
    waterVolts: each((end) => Math.max(0, span - drop[OPPOSITE[end]])),
  };
}

/** @returns what the electrodes' surfaces take, for the supply's waveform. */
export function interfaceNumbers(setup: Setup, circuit: CircuitNumbers): InterfaceNumbers {
  return setup.supply.waveform === "ac" ? alternatingInterface(setup, circuit) : directInterface(setup, circuit);
}

/**
 * What the meter should read, against the lowest electrode's lead, where the field without losses stands at `normalised`
 * (0 at the lowest electrode, 1 at the highest). AC: the lost volts stand at right angles to those in the water, so magnitudes of
 * complex sums are taken. DC: the drop is split evenly between both electrodes, for want of a better published rule.
 */
export function readingWithInterfaceVolts(numbers: InterfaceNumbers, circuit: CircuitNumbers, normalised: number): number {
  const span = circuit.volts;
  if (numbers.waveform === "dc") {
    return (span - numbers.waterVolts.typical) / 2 + normalised * numbers.waterVolts.typical;
  }
  const resistance = circuit.effectiveResistanceOhm;
  if (resistance === null) return normalised * span;
  const total = Math.hypot(resistance, numbers.reactanceOhm.typical);
  return (span * Math.hypot(normalised * resistance, numbers.reactanceLeavingOhm.typical)) / total;
}

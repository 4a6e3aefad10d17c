import type { Bounded } from "./plan";

/**
 * The numbers of the bench: what a teacher decides water, supply and meter by. Pure data; every field's name carries its unit.
 * `Bounded` is used where the program's own numerical error enters; estimates from handbook values say so in their description.
 */

export type WaterKind = "distilled" | "low" | "tap" | "salty" | "brine";

/** Salt (NaCl) that brings water from one conductivity to another; both at 25 °C. */
export interface SaltDose {
  readonly fromUsPerCm: number;
  readonly toUsPerCm: number;
  /** Added concentration, mol/L. */
  readonly molPerLitre: number;
  readonly perTrayG: number;
  readonly allTraysG: number;
  /** Whether both ends lie where the published data hold (to 0.1 mol/L). */
  readonly withinData: boolean;
}

export interface WaterNumbers {
  readonly kind: WaterKind;
  readonly conductivityAt25SPerM: number;
  /** At the water's own temperature. */
  readonly conductivitySPerM: number;
  /** Which rule carried it there, and whether the temperature lies where that rule was published. */
  readonly temperatureRule: "natural water" | "salt solution";
  readonly withinTemperatureRange: boolean;
  /** Change of conductivity per kelvin at this temperature, as a share (0.02 = 2 %/K). */
  readonly changePerKelvin: number;
  /** Free surface of the water, parts and dry bed subtracted; the error is that of the integration. */
  readonly surfaceMm2: Bounded;
  readonly dryBedMm2: number;
  readonly volumePerTrayL: Bounded;
  readonly volumeAllTraysL: Bounded;
  readonly shallowestMm: number;
  readonly deepestMm: number;
  /** Salt that makes the stated conductivity from pure water, and salt that brings this water to the target (null: no target, or it is lower). */
  readonly saltFromPure: SaltDose;
  readonly saltToTarget: SaltDose | null;
}

export interface ElectrodeCurrent {
  readonly id: string;
  readonly volts: number;
  /** Positive: leaves the electrode into the water. */
  readonly currentA: number;
  /** Of all the current that leaves electrodes; negative where it comes back. */
  readonly shareOfTotal: number;
  readonly wettedAreaMm2: number;
  readonly meanCurrentDensityAPerM2: number;
  readonly largestCurrentDensityAPerM2: number;
}

export interface CircuitNumbers {
  /** At the electrodes' terminals. */
  readonly volts: number;
  /** Null where the electrodes sit at more than two potentials. */
  readonly resistanceOhm: Bounded | null;
  readonly shapeFactor: Bounded | null;
  /** Span ÷ total current: the resistance above, or its counterpart where there are more than two potentials. Null without current. */
  readonly effectiveResistanceOhm: number | null;
  readonly currentA: Bounded;
  readonly powerW: Bounded;
  readonly currentLimitA: number;
  readonly shareOfLimit: number;
  readonly electrodes: readonly ElectrodeCurrent[];
  readonly largestCurrentDensityAPerM2: number;
}

/** A value estimated between a low and a high end, because published values spread that far. */
export interface Estimate {
  readonly low: number;
  readonly typical: number;
  readonly high: number;
}

export interface SharePoint {
  readonly frequencyHz: number;
  /** Share of the supply's voltage lost at the surfaces, as a magnitude: X/√(R² + X²). */
  readonly share: Estimate;
}

/** AC: the double layers of the electrodes in series with the water. An estimate, since real surfaces are constant-phase elements. */
export interface AlternatingInterface {
  readonly waveform: "ac";
  readonly doubleLayerUfPerCm2: Estimate;
  /** Where the typical value comes from. */
  readonly basis: "given" | "material" | "default";
  readonly frequencyHz: number;
  /** Of all surfaces where current enters and of all where it leaves, at this frequency. */
  readonly reactanceEnteringOhm: Estimate;
  readonly reactanceLeavingOhm: Estimate;
  readonly reactanceOhm: Estimate;
  /** Share lost, as a magnitude: X/√(R² + X²). */
  readonly shareLost: Estimate;
  /** What is left across the water: V/√(1 + (X/R)²), volts. */
  readonly waterVolts: Estimate;
  /** Below this frequency more than 2 % is lost (typical value), Hz. */
  readonly frequencyForTwoPercentHz: number;
  /** Current density below which the double layer carries the current and little gas forms: 2πfC·0.5 V, A/m². */
  readonly gasFreeCurrentDensityAPerM2: number;
  readonly alongFrequency: readonly SharePoint[];
}

/** DC: the volts that electrolysis takes at both electrodes together. */
export interface DirectInterface {
  readonly waveform: "dc";
  readonly electrodeDropVolts: Estimate;
  readonly basis: "given" | "material" | "default";
  readonly shareLost: Estimate;
  readonly waterVolts: Estimate;
}

export type InterfaceNumbers = AlternatingInterface | DirectInterface;

export interface MeterNumbers {
  /** Resistance of the water at the probe's tip, and of the tray behind it, ohm. */
  readonly tipResistanceOhm: number;
  readonly trayResistanceOhm: number;
  /** What the meter lays across them: its resistance, on AC with its capacitance (magnitude), ohm. */
  readonly inputImpedanceOhm: number;
  /** Share of the reading that loading takes. */
  readonly loadingShare: number;
  /** The smallest range that holds the whole span, V, and one digit on it. */
  readonly rangeVolts: number;
  readonly digitVolts: number;
  /** Accuracy of a reading of the whole span on that range, V. */
  readonly accuracyVolts: number;
  readonly frequencyHz: number;
  readonly acLowHz: number;
  readonly acHighHz: number;
  /** True on DC, whose ranges know no frequency. */
  readonly frequencyWithinMeter: boolean;
  /** Field along the equipotentials where the probe can go: the median, and what a tenth of their length falls below. Null without any. */
  readonly medianFieldMvPerMm: number | null;
  readonly weakFieldMvPerMm: number | null;
  /** Median field against one digit. */
  readonly digitsPerMm: number | null;
}

export interface HeatNumbers {
  /** All power into the water, no losses, K per hour and over the session: an upper bound. */
  readonly riseKPerHour: number;
  readonly riseOverSessionK: number;
  /** Change of conductivity, and at fixed volts of current, caused by that rise (shares). */
  readonly conductivityDrift: number;
  readonly currentDrift: number;
  /** Level lost to evaporation over the session, mm, and first cooling, K per hour: estimates for a room at 22 °C and 50 % humidity. */
  readonly evaporationMm: Estimate;
  readonly evaporationCoolingKPerHour: Estimate;
}

export interface AnodeLoss {
  readonly id: string;
  readonly material: string;
  readonly chargeC: number;
  /** Metal dissolved by Faraday's law if all of the charge dissolves metal, g; null where the metal does not dissolve or is unknown. */
  readonly lostG: number | null;
}

/** What direct current makes over the session. Upper bounds: all charge makes this gas. */
export interface GasNumbers {
  readonly chargePerTrayC: number;
  readonly hydrogenMl: number;
  readonly oxygenMl: number;
  /** If all charge at the anode makes chlorine: 0 in water without chloride. */
  readonly chlorineMl: number;
  readonly hoodLitres: number;
  /** In the closed hood over one tray. */
  readonly hydrogenVolPercent: number;
  readonly hydrogenLimitVolPercent: number;
  readonly chlorineHoodPpm: number;
  /** All trays of the class in the closed room. */
  readonly chlorineRoomPpm: number;
  readonly anodes: readonly AnodeLoss[];
}

export interface PartInWater {
  readonly id: string;
  /** Deepest water at the part, mm. */
  readonly depthMm: number;
  /** What stands proud of the water there, mm; negative: the part is covered. */
  readonly proudMm: number;
  readonly immersedShare: number;
}

export interface WaterGeometry {
  /** Wall above the water at its deepest side, mm. */
  readonly freeboardMm: number;
  readonly parts: readonly PartInWater[];
  /** An unnoticed tilt of this many degrees … */
  readonly tiltDeg: number;
  /** … over the distance that the electrodes span, mm … */
  readonly tiltBaseMm: number;
  /** … changes the local depth by at most this share, and readings by this share of the span. */
  readonly tiltDepthShare: number;
  readonly tiltReadingShare: number;
  /** Apparent shift of a mark under the tray seen through water and base, mm. */
  readonly parallaxAt10DegMm: number;
  readonly parallaxAt30DegMm: number;
}

export type RegionRule =
  | "supply-current"
  | "power"
  | "heating"
  | "wet-hands"
  | "readable-gradient"
  | "tilt-tolerance"
  | "electrode-height"
  | "freeboard";

/** The edge that one rule draws in the plane of depth and volts; the rule forbids the side that `forbids` names. */
export interface RegionBoundary {
  readonly rule: RegionRule;
  /** The rule in a few words, for the label at the edge. */
  readonly label: string;
  readonly forbids: "above" | "below" | "deeper" | "shallower";
  /** The edge: depthMm, volts pairs, in order of depth (or of volts, where it stands upright). */
  readonly path: readonly (readonly [number, number])[];
  readonly source: string;
}

/** The volts that every rule allows at one depth. */
export interface RegionColumn {
  readonly depthMm: number;
  /** Lowest and highest allowed volts of each allowed run. */
  readonly volts: readonly (readonly [number, number])[];
}

/** Two rules that leave nothing between them, and the change that opens the region. */
export interface RegionClash {
  readonly rules: readonly [RegionRule, RegionRule];
  readonly message: string;
  readonly opensWith: string;
}

export interface OperatingRegion {
  /** False where the water is tilted or holds slabs: another depth changes the field's shape, so edges away from the present depth are estimates. */
  readonly exact: boolean;
  readonly depthRangeMm: readonly [number, number];
  readonly voltsRange: readonly [number, number];
  readonly boundaries: readonly RegionBoundary[];
  /** Volts at which a millimetre does not move the last digit, as runs from low to high: just above each change of the meter's range. */
  readonly unreadableVolts: readonly (readonly [number, number])[];
  readonly columns: readonly RegionColumn[];
  readonly present: readonly [number, number];
  readonly presentAllowed: boolean;
  /** Depth (mm, whole half millimetres) and volts (half volts where they fit) in the middle of the region; null when it is empty. */
  readonly suggestion: readonly [number, number] | null;
  readonly clash: RegionClash | null;
}

/** All of it. */
export interface BenchNumbers {
  readonly water: WaterNumbers;
  readonly circuit: CircuitNumbers;
  readonly interface: InterfaceNumbers;
  readonly meter: MeterNumbers;
  readonly heat: HeatNumbers;
  /** Null on AC, where the double layers carry the current. */
  readonly gas: GasNumbers | null;
  readonly geometry: WaterGeometry;
  readonly region: OperatingRegion;
}

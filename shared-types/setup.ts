import { z } from "zod";
import { polygonFault } from "./polygon-fault";
import { readingsSchema } from "./readings";

/**
 * The setup file, version 1: everything that is known about a tray before water is poured.
 * Lengths in mm, angles in degrees counter-clockwise, potentials in V, conductivity in µS/cm referred to 25 °C.
 * Origin: the lower-left inner corner of the tray (of a round tray: of its bounding square), y away from the reader.
 */

/** A number of a range; whatever is wrong with it, the message says the whole range. */
const between = (low: number, high: number) => {
  const error = `${low} to ${high}`;
  return z.number({ error }).min(low, { error }).max(high, { error });
};
const wholeBetween = (low: number, high: number) => {
  const error = `a whole number from ${low} to ${high}`;
  return z.number({ error }).int({ error }).min(low, { error }).max(high, { error });
};
const lengthMm = between;
const coordinateMm = between(-10_000, 10_000);
const pairMm = z.tuple([coordinateMm, coordinateMm]);
const identifier = z.string().min(1).max(40);
/** A word from an open list: materials, salts and sources that we do not know are kept, and treated with caution. */
const openWord = z.string().min(1).max(60);

const barSchema = z.strictObject({ kind: z.literal("bar"), lengthMm: lengthMm(0.1, 4000), widthMm: lengthMm(0.1, 4000) });
const discSchema = z.strictObject({ kind: z.literal("disc"), diameterMm: lengthMm(0.1, 4000) });
const ringSchema = z.strictObject({ kind: z.literal("ring"), outerMm: lengthMm(0.2, 4000), innerMm: lengthMm(0.1, 4000) });
const arcSchema = z.strictObject({
  kind: z.literal("arc"),
  outerMm: lengthMm(0.2, 4000),
  innerMm: lengthMm(0.1, 4000),
  sweepDeg: between(1, 359),
});
const frameSchema = z.strictObject({
  kind: z.literal("frame"),
  lengthMm: lengthMm(0.3, 4000),
  widthMm: lengthMm(0.3, 4000),
  wallMm: lengthMm(0.1, 2000),
});
const polygonSchema = z.strictObject({ kind: z.literal("polygon"), pointsMm: z.array(pairMm).min(3).max(500) });

export const shapeSchema = z
  .discriminatedUnion("kind", [barSchema, discSchema, ringSchema, arcSchema, frameSchema, polygonSchema])
  .superRefine((shape, context) => {
    if ((shape.kind === "ring" || shape.kind === "arc") && shape.innerMm >= shape.outerMm) {
      context.addIssue({
        code: "custom",
        path: ["innerMm"],
        message: `is ${shape.innerMm}, allowed: less than outerMm (${shape.outerMm})`,
      });
    }
    if (shape.kind === "frame" && 2 * shape.wallMm >= Math.min(shape.lengthMm, shape.widthMm)) {
      context.addIssue({
        code: "custom",
        path: ["wallMm"],
        message: `is ${shape.wallMm}, allowed: less than half of the shorter side (${Math.min(shape.lengthMm, shape.widthMm) / 2})`,
      });
    }
    if (shape.kind === "polygon") {
      const fault = polygonFault(shape.pointsMm);
      if (fault !== null) context.addIssue({ code: "custom", path: ["pointsMm"], message: fault });
    }
  });

const placement = {
  id: identifier,
  xMm: coordinateMm,
  yMm: coordinateMm,
  turnDeg: between(-3600, 3600).default(0),
  /** For the hand that edits, not for the tray: what bears the same word is selected and moved as one; what is locked stays. */
  group: identifier.optional(),
  locked: z.boolean().optional(),
};
const partCommon = {
  ...placement,
  name: z.string().max(80).default(""),
  heightMm: lengthMm(0.1, 500).default(24),
  material: openWord.default("brass"),
  shape: shapeSchema,
};
const partSchema = z.discriminatedUnion("role", [
  z.strictObject({ ...partCommon, role: z.literal("electrode"), tap: between(0, 1) }),
  z.strictObject({ ...partCommon, role: z.literal("floating") }),
  z.strictObject({ ...partCommon, role: z.literal("insulator") }),
]);
const slabSchema = z.strictObject({ ...placement, thicknessMm: lengthMm(0.01, 200), shape: shapeSchema });

const trayCommon = {
  wallHeightMm: lengthMm(1, 500).default(40),
  baseMm: lengthMm(0, 100).default(3),
  baseMaterial: openWord.default("acrylic"),
};
export const traySchema = z.discriminatedUnion("shape", [
  z.strictObject({ shape: z.literal("rectangle"), lengthMm: lengthMm(20, 2000), widthMm: lengthMm(20, 2000), ...trayCommon }),
  z.strictObject({ shape: z.literal("circle"), diameterMm: lengthMm(20, 2000), ...trayCommon }),
]);

const waterSchema = z.strictObject({
  depthMm: lengthMm(0.5, 200),
  tiltXDeg: between(-45, 45).default(0),
  tiltYDeg: between(-45, 45).default(0),
  conductivityUsPerCm: between(0.01, 300_000),
  temperatureC: between(0, 95).default(25),
  salt: openWord.default("none"),
  /** The conductivity that salt is to bring the water to, µS/cm at 25 °C; absent: no salt is to be added. */
  targetConductivityUsPerCm: between(0.01, 300_000).optional(),
  slabs: z.array(slabSchema).max(64).default([]),
});
const supplySchema = z.strictObject({
  waveform: z.enum(["ac", "dc"]),
  frequencyHz: between(0, 1_000_000).default(50),
  volts: between(0.001, 1000),
  currentLimitA: between(0.0001, 1000).default(1),
  source: openWord.default("safety-isolated"),
  /** What the supply gives with nothing connected, V (a loaded 12 V transformer can stand at 16 V unloaded); absent: `volts`. */
  openCircuitVolts: between(0.001, 1000).optional(),
});
/** The surfaces where metal meets water. Absent keys are estimated from the material; a reading of the user's own replaces them. */
const interfaceSchema = z.strictObject({
  /** Double-layer capacitance of the electrodes, µF/cm². */
  doubleLayerUfPerCm2: between(0.1, 1000).optional(),
  /** DC only: volts lost at both electrodes together, measured by the user beside the electrodes. */
  electrodeDropVolts: between(0, 50).optional(),
  /** Whether the predicted readings allow for the volts lost at the surfaces. */
  inReadings: z.boolean().default(false),
});
const meterSchema = z.strictObject({
  inputMegohm: between(0.0001, 1_000_000).default(10),
  counts: wholeBetween(100, 100_000_000).default(2000),
  accuracyPercent: between(0, 100).default(1),
  accuracyDigits: between(0, 1000).default(3),
  /** Capacitance across the input, pF: beside the megohms it loads the probe on AC. */
  inputPicofarad: between(0, 100_000).default(100),
  /** The frequencies at which the AC ranges keep their accuracy, Hz. */
  acLowHz: between(0, 10_000_000).default(40),
  acHighHz: between(0.1, 10_000_000).default(400),
});
const probingSchema = z.strictObject({
  levels: wholeBetween(1, 99).default(7),
  pointsPerLevel: wholeBetween(1, 200).default(7),
  probeTipMm: lengthMm(0.01, 50).default(1),
  wallClearanceMm: lengthMm(0, 500).default(5),
  partClearanceMm: lengthMm(0, 500).default(5),
  placementMm: lengthMm(0, 50).default(0.5),
});
const sessionSchema = z.strictObject({
  minutes: between(0.1, 10_000).default(40),
  trays: wholeBetween(1, 1000).default(1),
  /** Air that a cover or a hood with its fan off encloses over one tray, litres; and the room that all trays share, m³. */
  hoodLitres: between(0.1, 1_000_000).default(100),
  roomCubicMetres: between(1, 1_000_000).default(100),
});
/**
 * What the builder of the tray promises to keep, each ± half a width (probe placement stands with the probing). Absent as a whole:
 * the defaults hold, and the setup's id is what it was before there were any.
 */
const tolerancesSchema = z.strictObject({
  supplyPercent: between(0, 50).default(1),
  partPlacementMm: between(0, 50).default(0.5),
  partTurnDeg: between(0, 45).default(0.5),
  depthMm: between(0, 50).default(0.5),
  tiltDeg: between(0, 10).default(0.2),
  conductivityPercent: between(0, 100).default(5),
  temperatureK: between(0, 50).default(1),
});

export const setupSchema = z
  .strictObject({
    format: z.literal("fieldtray.setup"),
    version: z.literal(1),
    title: z.string().max(200).default(""),
    notes: z.string().max(20_000).default(""),
    tray: traySchema,
    water: waterSchema,
    supply: supplySchema,
    interface: interfaceSchema.prefault({}),
    meter: meterSchema.prefault({}),
    parts: z.array(partSchema).max(64),
    probing: probingSchema.prefault({}),
    session: sessionSchema.prefault({}),
    tolerances: tolerancesSchema.optional(),
    /** What was measured; absent until something is. Leaves the setup's id as it is. */
    readings: readingsSchema.optional(),
  })
  .superRefine((setup, context) => {
    const seen = new Set<string>();
    const things = [
      ...setup.parts.map((part, index) => ({ id: part.id, path: ["parts", index, "id"] })),
      ...setup.water.slabs.map((slab, index) => ({ id: slab.id, path: ["water", "slabs", index, "id"] })),
    ];
    for (const { id, path } of things) {
      if (seen.has(id)) context.addIssue({ code: "custom", path, message: `is "${id}", allowed: an id that no other part or slab has` });
      seen.add(id);
    }
    if (setup.supply.waveform === "ac" && setup.supply.frequencyHz <= 0) {
      context.addIssue({ code: "custom", path: ["supply", "frequencyHz"], message: "is 0, allowed: above 0 with waveform ac" });
    }
    if (setup.meter.acLowHz >= setup.meter.acHighHz) {
      const message = `is ${setup.meter.acLowHz}, allowed: less than acHighHz (${setup.meter.acHighHz})`;
      context.addIssue({ code: "custom", path: ["meter", "acLowHz"], message });
    }
  });

type DeepReadonly<T> = T extends object ? { readonly [Key in keyof T]: DeepReadonly<T[Key]> } : T;

/** A whole, validated setup; immutable. Every edit makes a new one. */
export type Setup = DeepReadonly<z.output<typeof setupSchema>>;
export type Tray = Setup["tray"];
export type Water = Setup["water"];
export type Supply = Setup["supply"];
export type Interface = Setup["interface"];
export type Meter = Setup["meter"];
export type Part = Setup["parts"][number];
export type PartRole = Part["role"];
export type Electrode = Extract<Part, { role: "electrode" }>;
export type Slab = Water["slabs"][number];
export type Shape = Part["shape"];
export type ShapeKind = Shape["kind"];
export type Probing = Setup["probing"];
export type Session = Setup["session"];
export type Tolerances = DeepReadonly<z.output<typeof tolerancesSchema>>;

/** What holds where a setup states no tolerances. */
export const DEFAULT_TOLERANCES: Tolerances = tolerancesSchema.parse({});

/** A shape and where it lies: what parts and slabs have in common. */
export interface PlacedShape {
  readonly id: string;
  readonly xMm: number;
  readonly yMm: number;
  readonly turnDeg: number;
  readonly shape: Shape;
}

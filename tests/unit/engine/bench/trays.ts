import type { FieldFacts } from "../../../../renderer/engine/bench/field-facts";
import { conductivityAtTemperatureSPerM } from "../../../../renderer/engine/bench/water-conductivity";
import { parseSetup } from "../../../../shared-types/parse-setup";
import { type ConductorReading, type FieldPicture, OWNER_WATER } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";

type Json = { [key: string]: Json | readonly Json[] | string | number | boolean | undefined };

const isObject = (value: Json[string]): value is Json => typeof value === "object" && value !== null && !Array.isArray(value);

function merged(base: Json, change: Json): Json {
  const result: Json = { ...base };
  for (const [key, value] of Object.entries(change)) {
    if (value === undefined) {
      delete result[key];
      continue;
    }
    const before = result[key];
    result[key] = isObject(before) && isObject(value) ? merged(before, value) : value;
  }
  return result;
}

/** A bar of full width: between two of them the field is uniform, exactly. */
export const fullWidthBar = (id: string, tap: number, xMm: number): Json => ({
  id,
  role: "electrode",
  tap,
  xMm,
  yMm: 100,
  turnDeg: 90,
  heightMm: 24,
  material: "brass",
  shape: { kind: "bar", lengthMm: 200, widthMm: 10 },
});

/** 160 mm of water, 200 mm wide and 12 mm deep, between two full-width bars: every number has a closed form. */
export const CHANNEL_LENGTH_MM = 160;
export const CHANNEL_WIDTH_MM = 200;

const CHANNEL: Json = {
  format: "fieldtray.setup",
  version: 1,
  title: "Channel between two bars",
  tray: { shape: "rectangle", lengthMm: 260, widthMm: 200, wallHeightMm: 40, baseMm: 5, baseMaterial: "acrylic" },
  water: { depthMm: 12, conductivityUsPerCm: 500, temperatureC: 25 },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6, currentLimitA: 1, source: "safety-isolated" },
  meter: { inputMegohm: 10, counts: 2000, accuracyPercent: 1, accuracyDigits: 3 },
  parts: [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 215)],
};

/** @returns the channel with changes; throws with the reasons where a change makes it no setup. */
export function channel(change: Json = {}): Setup {
  const parsed = parseSetup(merged(CHANNEL, change));
  if (!parsed.ok) throw new Error(parsed.problems.map((problem) => problem.message).join("; "));
  return parsed.value;
}

/** A picture of the uniform field, 2 mm apart. */
function channelPicture(volts: number): FieldPicture {
  const [columns, rows, pitch] = [131, 101, 2];
  const share = (x: number): number => Math.min(1, Math.max(0, (x - 50) / CHANNEL_LENGTH_MM));
  const at = (index: number): number => (index % columns) * pitch;
  const inBar = (x: number): boolean => (x >= 40 && x <= 50) || (x >= 210 && x <= 220);
  return {
    columns,
    rows,
    pitchXMm: pitch,
    pitchYMm: pitch,
    volts: Float32Array.from({ length: columns * rows }, (_, index) => share(at(index)) * volts),
    owner: Int16Array.from({ length: columns * rows }, (_, index) => (inBar(at(index)) ? (at(index) < 100 ? 0 : 1) : OWNER_WATER)),
  };
}

/** @returns the exact field of the channel: uniform between the bars, all at one potential behind them. */
export function channelFacts(setup: Setup): FieldFacts {
  const volts = setup.supply.volts;
  const crossSectionM2 = ((CHANNEL_WIDTH_MM / 1000) * setup.water.depthMm) / 1000;
  const resistance = CHANNEL_LENGTH_MM / 1000 / (conductivityAtTemperatureSPerM(setup) * crossSectionM2);
  const current = volts / resistance;
  const reading = (id: string, at: number, sign: 1 | -1): ConductorReading => ({
    id,
    role: "electrode",
    volts: at,
    voltsError: 0,
    currentA: sign * current,
    currentErrorA: 0,
    largestCurrentDensityAPerM2: current / crossSectionM2,
  });
  return {
    spanV: [0, volts],
    conductors: [reading("A", 0, -1), reading("B", volts, 1)],
    picture: channelPicture(volts),
    resistanceOhm: { value: resistance, error: 0 },
    shapeFactor: { value: CHANNEL_WIDTH_MM / CHANNEL_LENGTH_MM, error: 0 },
    cutOff: [],
    undetermined: { ids: [], water: false },
  };
}

import type { Severity } from "../../../../shared-types/plan";
import { type channel, fullWidthBar } from "../bench/trays";

/** Each rule just inside its limit and just outside, and what its sentences must speak of. */

export type Change = Parameters<typeof channel>[0];

const disc = (id: string, xMm: number, more: object) => ({ id, xMm, yMm: 100, shape: { kind: "disc", diameterMm: 20 }, ...more });
export const bars = [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 215)];
const withBar = (change: object) => [{ ...bars[0], ...change }, bars[1]];
/** A loose disc between the bars. */
export const floatingAt = (xMm: number, more: object = {}) => [...bars, disc("C", xMm, { role: "floating", ...more })];

export interface Row {
  readonly code: string;
  readonly severity: Severity;
  readonly inside: Change;
  readonly outside: Change;
  /** What the sentences must speak of. */
  readonly says: RegExp;
  readonly safety?: boolean;
}

export const dc = (volts: number, more: object = {}) => ({ supply: { waveform: "dc", volts, currentLimitA: 10 }, ...more });
/** Salt water that draws 0.36 A at 12 V: in 40 min 864 C, 109.5 mL of hydrogen. */
const strong = { conductivityUsPerCm: 20_000, depthMm: 12 };

export const TABLE: readonly Row[] = [
  { code: "overlap", severity: "stop", inside: { parts: floatingAt(60) }, outside: { parts: floatingAt(59) }, says: /C and A|A and C/ },
  {
    code: "short-circuit",
    severity: "stop",
    inside: { parts: [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 55.02)] },
    outside: { parts: [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 55)] },
    says: /touch .* different volts/,
    safety: true,
  },
  {
    code: "gap-too-narrow",
    severity: "caution",
    inside: { parts: [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 56)] },
    outside: { parts: [fullWidthBar("A", 0, 45), fullWidthBar("B", 1, 55.9)] },
    says: /0\.9 mm/,
  },
  {
    code: "floating-touches",
    severity: "stop",
    inside: { parts: floatingAt(60.02) },
    outside: { parts: floatingAt(60) },
    says: /no longer floats/,
  },
  {
    code: "part-outside",
    severity: "stop",
    inside: { parts: floatingAt(250) },
    outside: { parts: floatingAt(250.1) },
    says: /0\.1 mm beyond the wall/,
  },
  {
    code: "no-potential-difference",
    severity: "stop",
    inside: {},
    outside: { parts: [fullWidthBar("A", 1, 45), fullWidthBar("B", 1, 215)] },
    says: /same tap/,
  },
  {
    code: "lead-unused",
    severity: "caution",
    inside: {},
    outside: { parts: [fullWidthBar("A", 0.5, 45), fullWidthBar("B", 1, 215)] },
    says: /negative lead/,
  },
  {
    code: "tray-conducts",
    severity: "stop",
    inside: { tray: { baseMaterial: "glass" } },
    outside: { tray: { baseMaterial: "stainless steel" } },
    says: /stainless steel/,
    safety: true,
  },
  {
    code: "electrode-too-short",
    severity: "stop",
    inside: { parts: withBar({ heightMm: 13 }) },
    outside: { parts: withBar({ heightMm: 12 }) },
    says: /12 mm high in 12 mm of water.*two-dimensional/,
  },
  {
    code: "part-too-short",
    severity: "caution",
    inside: { parts: floatingAt(130, { heightMm: 13 }) },
    outside: { parts: floatingAt(130, { heightMm: 11 }) },
    says: /loose conductor/,
  },
  {
    code: "freeboard",
    severity: "caution",
    inside: { tray: { wallHeightMm: 22 } },
    outside: { tray: { wallHeightMm: 21.9 } },
    says: /9\.9 mm of wall/,
    safety: true,
  },
  {
    code: "water-spills",
    severity: "stop",
    inside: { tray: { wallHeightMm: 12.1 } },
    outside: { tray: { wallHeightMm: 12 } },
    says: /runs over/,
    safety: true,
  },
  // 0.2° over the 200 mm that the bars span: 1 % of the span at 8.73 mm.
  {
    code: "too-shallow-for-tilt",
    severity: "caution",
    inside: { water: { depthMm: 8.74 } },
    outside: { water: { depthMm: 8.72 } },
    says: /0\.2°.*of the span/,
  },
  {
    code: "bed-dry",
    severity: "note",
    inside: { water: { tiltXDeg: 5.27 } },
    outside: { water: { tiltXDeg: 5.28 } },
    says: /runs dry/,
  },
  {
    code: "depth-step",
    severity: "note",
    inside: {},
    outside: { water: { slabs: [{ id: "S", xMm: 130, yMm: 100, thicknessMm: 4, shape: { kind: "bar", lengthMm: 40, widthMm: 60 } }] } },
    says: /24 mm of a slab's edge/,
  },
  {
    code: "volts-above-wet-hands",
    severity: "caution",
    inside: { supply: { volts: 12 } },
    outside: { supply: { volts: 12.1 } },
    says: /12\.1 V AC/,
    safety: true,
  },
  {
    code: "volts-above-wet-hands",
    severity: "caution",
    inside: dc(30),
    outside: dc(30.1),
    says: /30\.1 V DC/,
    safety: true,
  },
  {
    code: "volts-above-wet-hands",
    severity: "caution",
    inside: { water: { salt: "sodium-chloride" }, supply: { volts: 6 } },
    outside: { water: { salt: "sodium-chloride" }, supply: { volts: 6.1 } },
    says: /salt water/,
    safety: true,
  },
  {
    code: "volts-above-dry",
    severity: "stop",
    inside: { supply: { volts: 25 } },
    outside: { supply: { volts: 25.1 } },
    says: /even for dry hands/,
    safety: true,
  },
  {
    code: "volts-above-wet-hands",
    severity: "caution",
    inside: { supply: { openCircuitVolts: 12 } },
    outside: { supply: { openCircuitVolts: 15 } },
    says: /15 V AC unloaded/,
    safety: true,
  },
  {
    code: "open-circuit-unknown",
    severity: "note",
    inside: { supply: { volts: 9 } },
    outside: { supply: { volts: 9.1 } },
    says: /nothing connected/,
    safety: true,
  },
  {
    code: "source-not-isolated",
    severity: "stop",
    inside: { supply: { source: "battery" } },
    outside: { supply: { source: "autotransformer" } },
    says: /autotransformer/,
    safety: true,
  },
  { code: "dc-polarises", severity: "caution", inside: {}, outside: dc(6), says: /6 V DC polarises/ },
  { code: "dc-drop", severity: "note", inside: {}, outside: dc(6), says: /about 1\.05 V \(0\.8 to 1\.3\)/ },
  {
    code: "chloride-dc",
    severity: "stop",
    inside: dc(6, { water: { salt: "magnesium-sulfate" } }),
    outside: dc(6, { water: { salt: "sodium-chloride" } }),
    says: /chlorine at the positive electrode/,
    safety: true,
  },
  {
    code: "chlorine-in-room",
    severity: "stop",
    inside: dc(12, { water: { ...strong, salt: "sodium-chloride" }, session: { trays: 2, minutes: 9.1 } }),
    outside: dc(12, { water: { ...strong, salt: "sodium-chloride" }, session: { trays: 2, minutes: 9.2 } }),
    says: /ppm in 100 m³/,
    safety: true,
  },
  {
    code: "metal-unsuitable",
    severity: "caution",
    inside: { parts: withBar({ material: "stainless steel" }) },
    outside: { parts: withBar({ material: "aluminium" }) },
    says: /oxide skin/,
  },
  {
    code: "metal-unknown",
    severity: "note",
    inside: { parts: withBar({ material: "graphite" }) },
    outside: { parts: withBar({ material: "moonstone" }) },
    says: /moonstone/,
  },
  {
    code: "anode-dissolves",
    severity: "caution",
    inside: dc(6, { parts: [bars[0], { ...bars[1], material: "graphite" }] }),
    outside: dc(6),
    says: /B, the positive side, dissolves/,
  },
  // The channel draws 4.5 mA at 6 V.
  {
    code: "current-above-limit",
    severity: "stop",
    inside: { supply: { currentLimitA: 0.0045 + 1e-9 } },
    outside: { supply: { currentLimitA: 0.00449 } },
    says: /4\.5 mA.*4\.49 mA/,
  },
  {
    code: "water-warms",
    severity: "caution",
    inside: { water: { conductivityUsPerCm: 4600 }, supply: { volts: 12 } },
    outside: { water: { conductivityUsPerCm: 4680 }, supply: { volts: 12 } },
    says: /warms the water by up to .* K in 40 min/,
  },
  {
    code: "hydrogen",
    severity: "caution",
    inside: dc(12, { water: strong, session: { hoodLitres: 11 } }),
    outside: dc(12, { water: strong, session: { hoodLitres: 10.9 } }),
    says: /mL of hydrogen.*10\.9 L of still air/,
    safety: true,
  },
  {
    code: "hydrogen",
    severity: "stop",
    inside: dc(12, { water: strong, session: { hoodLitres: 2.75 } }),
    outside: dc(12, { water: strong, session: { hoodLitres: 2.73 } }),
    says: /2\.73 L of still air/,
    safety: true,
  },
  // Two bars of 48 cm² in 1333 Ω: 2 % at about 12.4 Hz.
  {
    code: "interface-loss",
    severity: "caution",
    inside: { supply: { frequencyHz: 12.5 }, interface: { doubleLayerUfPerCm2: 20 } },
    outside: { supply: { frequencyHz: 12.4 }, interface: { doubleLayerUfPerCm2: 20 } },
    says: /At 12\.4 Hz .* about 2 % of the volts;/,
  },
  {
    code: "ac-gas",
    severity: "note",
    inside: { water: { conductivityUsPerCm: 8370 } },
    outside: { water: { conductivityUsPerCm: 8390 } },
    says: /3\.1\d mA\/cm²/,
  },
  // A tip of 1 mm (500 Ω m/σ) and a quarter of the channel in 10 MΩ: 1 % at 101 kΩ, which is 51.2 µS/cm.
  {
    code: "meter-loads",
    severity: "caution",
    inside: { water: { conductivityUsPerCm: 51.5 } },
    outside: { water: { conductivityUsPerCm: 51 } },
    says: /MΩ at its input/,
  },
  {
    code: "frequency-outside-meter",
    severity: "caution",
    inside: { supply: { frequencyHz: 400 } },
    outside: { supply: { frequencyHz: 401 } },
    says: /At 401 Hz the meter/,
  },
  {
    code: "frequency-not-advised",
    severity: "note",
    inside: { supply: { frequencyHz: 1000 }, meter: { acHighHz: 20_000 } },
    outside: { supply: { frequencyHz: 1001 }, meter: { acHighHz: 20_000 } },
    says: /At 1001 Hz leads and meter/,
  },
  // 6.25 mV per mm and volt; one digit is 10 mV above 1.999 V, 1 mV below.
  {
    code: "gradient-unreadable",
    severity: "caution",
    inside: { supply: { volts: 0.161 } },
    outside: { supply: { volts: 0.159 } },
    says: /0\.99 mV, less than one digit \(1 mV\)/,
  },
  {
    code: "water-distilled",
    severity: "caution",
    inside: { water: { conductivityUsPerCm: 10 } },
    outside: { water: { conductivityUsPerCm: 9.9 } },
    says: /9\.9 µS\/cm is nearly distilled/,
  },
  {
    code: "water-brine",
    severity: "note",
    inside: { water: { conductivityUsPerCm: 2790 } },
    outside: { water: { conductivityUsPerCm: 2800 } },
    says: /2800 µS\/cm is salty/,
  },
  {
    code: "temperature-beyond-table",
    severity: "note",
    inside: { water: { temperatureC: 35 } },
    outside: { water: { temperatureC: 36 } },
    says: /36 °C/,
  },
  {
    code: "salt-beyond-data",
    severity: "note",
    inside: { water: { targetConductivityUsPerCm: 10_000 } },
    outside: { water: { targetConductivityUsPerCm: 12_000 } },
    says: /more salt than the published data cover/,
  },
  {
    code: "template-tiles",
    severity: "note",
    inside: { tray: { lengthMm: 185, widthMm: 248 }, parts: [] },
    outside: { tray: { lengthMm: 185.5, widthMm: 248.5 }, parts: [] },
    says: /185\.5 × 248\.5 mm/,
  },
];

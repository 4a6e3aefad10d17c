import type { Plan } from "../../shared-types/plan";
import type { Part, Setup, Shape } from "../../shared-types/setup";
import { current, shown } from "../engine/findings/wording";
import type { Block } from "./flow";

/** The bench list: what a technician fetches, fills and sets, for one tray and for all. */

/** @returns a shape's sizes in words, mm. */
export function sizesOf(shape: Shape): string {
  const n = (value: number): string => shown(value, 5);
  switch (shape.kind) {
    case "bar":
      return `bar ${n(shape.lengthMm)} × ${n(shape.widthMm)}`;
    case "disc":
      return `disc ⌀ ${n(shape.diameterMm)}`;
    case "ring":
      return `ring ⌀ ${n(shape.outerMm)} / ${n(shape.innerMm)}`;
    case "arc":
      return `arc ⌀ ${n(shape.outerMm)} / ${n(shape.innerMm)}, ${n(shape.sweepDeg)}°`;
    case "frame":
      return `frame ${n(shape.lengthMm)} × ${n(shape.widthMm)}, wall ${n(shape.wallMm)}`;
    case "polygon":
      return `polygon, ${shape.pointsMm.length} corners`;
  }
}

const signOf = (tap: number): string => (tap === 0 ? "−" : tap === 1 ? "+" : "tap");
const place = ({ xMm, yMm, turnDeg }: Part): string =>
  `${shown(xMm, 5)}, ${shown(yMm, 5)}${turnDeg === 0 ? "" : `, ${shown(turnDeg, 4)}°`}`.replaceAll("-", "−");

function partRows(setup: Setup): string[][] {
  const { trays } = setup.session;
  return [
    ...setup.parts.map((part) => [
      part.name === "" || part.name === part.id ? part.id : `${part.name} (${part.id})`,
      part.role === "electrode" ? `electrode ${signOf(part.tap)}` : part.role === "floating" ? "loose conductor" : "insulator",
      `${sizesOf(part.shape)}, ${shown(part.heightMm, 4)} high`,
      part.material,
      place(part),
      String(trays),
    ]),
    ...setup.water.slabs.map((slab) => [
      `slab ${slab.id}`,
      "insulating plate on the bed",
      `${sizesOf(slab.shape)}, ${shown(slab.thicknessMm, 4)} thick`,
      "insulator",
      `${shown(slab.xMm, 5)}, ${shown(slab.yMm, 5)}`,
      String(trays),
    ]),
  ];
}

function leadRows(setup: Setup): string[][] {
  const { trays } = setup.session;
  const unit = setup.supply.waveform === "ac" ? "V AC" : "V DC";
  const electrodes = setup.parts.flatMap((part) => (part.role === "electrode" ? [part] : []));
  return [
    ...electrodes.map(({ id, tap }) => [
      `supply ${tap === 0 ? "− (common)" : tap === 1 ? "+ (live)" : `divider tap, ${shown(tap * 100)} %`}`,
      `electrode ${id}`,
      `${shown(tap * setup.supply.volts, 4)} ${unit}`,
      tap === 0 ? "black, marked −" : tap === 1 ? "red, marked +" : "another colour, marked with its volts",
      String(trays),
    ]),
    ["meter, common", "the − electrode", "0 V", "black", String(trays)],
    ["meter, volts", "probe", "reading", "red", String(trays)],
  ];
}

function waterRows(setup: Setup, plan: Plan): string[][] {
  const { water } = setup;
  const { volumePerTrayL, volumeAllTraysL, saltToTarget, saltFromPure, shallowestMm, deepestMm } = plan.bench.water;
  const tilt =
    water.tiltXDeg === 0 && water.tiltYDeg === 0
      ? "level"
      : `tilted ${shown(water.tiltXDeg)}° along x, ${shown(water.tiltYDeg)}° along y: ${shown(shallowestMm)} to ${shown(deepestMm)} mm deep`;
  const salt =
    saltToTarget !== null
      ? [
          `Salt (NaCl) to add, ${shown(saltToTarget.fromUsPerCm, 4)} → ${shown(saltToTarget.toUsPerCm, 4)} µS/cm`,
          `${shown(saltToTarget.perTrayG)} g`,
          `${shown(saltToTarget.allTraysG)} g`,
        ]
      : ["Salt to add", "none", "none"];
  return [
    ["Water", `${shown(volumePerTrayL.value)} L`, `${shown(volumeAllTraysL.value)} L`],
    salt,
    [
      "For comparison: salt (NaCl) that makes this conductivity from pure water",
      `${shown(saltFromPure.perTrayG)} g`,
      `${shown(saltFromPure.allTraysG)} g`,
    ],
    ["Depth at the tray's centre", `${shown(water.depthMm, 4)} mm`, tilt.replaceAll("-", "−")],
    [
      "Conductivity as the conductivity meter shows it, referred to 25 °C",
      `${shown(water.conductivityUsPerCm, 4)} µS/cm`,
      `at ${shown(water.temperatureC)} °C: ${shown(plan.bench.water.conductivitySPerM * 10_000, 4)} µS/cm`,
    ],
  ];
}

function settingRows(setup: Setup, plan: Plan): string[][] {
  const { supply, meter } = setup;
  const ac = supply.waveform === "ac";
  const { circuit, meter: numbers } = plan.bench;
  return [
    [
      "Supply",
      `${supply.source}, ${ac ? `AC ${shown(supply.frequencyHz, 4)} Hz` : "DC"}, ${shown(supply.volts, 4)} V under load, limit ${current(supply.currentLimitA)}`,
    ],
    [
      "It should then show",
      `${current(circuit.currentA.value)} a tray${plan.resistanceOhm === null ? "" : `, that is ${shown(plan.resistanceOhm.value, 4)} Ω`}, ${shown(plan.powerW)} W`,
    ],
    [
      "Meter",
      `${ac ? "AC" : "DC"} volts, range ${shown(numbers.rangeVolts, 4)} V, one digit ${shown(1000 * numbers.digitVolts)} mV, input ${shown(meter.inputMegohm)} MΩ; never a low-impedance range`,
    ],
    ["Probe", `tip ${shown(setup.probing.probeTipMm)} mm, upright, just touching the water; look straight down`],
    ["Session", `${shown(setup.session.minutes)} min, ${setup.session.trays} ${setup.session.trays === 1 ? "tray" : "trays"}`],
  ];
}

/** @returns the bench list as blocks. Rules of the bench are common practice, no source. */
export function benchList(setup: Setup, plan: Plan): Block[] {
  const { trays } = setup.session;
  const first = plan.probing.levels.flatMap(({ points }) => points).find(({ n }) => n === 1);
  return [
    { kind: "heading", words: `Parts, for ${trays} ${trays === 1 ? "tray" : "trays"}` },
    {
      kind: "table",
      columns: [
        { head: "part", share: 24, bold: true },
        { head: "as", share: 19 },
        { head: "sizes, mm", share: 29 },
        { head: "material", share: 14 },
        { head: "centre x, y mm, turn", share: 22 },
        { head: "fetch", share: 9, align: "end" },
      ],
      rows: partRows(setup),
    },
    { kind: "heading", words: "Leads" },
    {
      kind: "table",
      columns: [
        { head: "from", share: 28, bold: true },
        { head: "to", share: 24 },
        { head: "at", share: 18 },
        { head: "colour and mark", share: 34 },
        { head: "fetch", share: 9, align: "end" },
      ],
      rows: leadRows(setup),
    },
    { kind: "heading", words: "Water" },
    {
      kind: "table",
      columns: [
        { head: "", share: 46, bold: true },
        { head: "each tray", share: 22 },
        { head: "all trays", share: 32 },
      ],
      rows: waterRows(setup, plan),
    },
    { kind: "heading", words: "Supply, meter and probe" },
    {
      kind: "table",
      columns: [
        { head: "", share: 22, bold: true },
        { head: "", share: 78 },
      ],
      rows: settingRows(setup, plan),
    },
    { kind: "heading", words: "Order of work" },
    ...[
      "Measure the check bars of the printed template: 100 mm ± 0.5 in both directions.",
      "Tape the template down, printed side up, the marked side towards the reader; set the tray on it, inside of the wall on the thick outline.",
      `Place the parts on their outlines; ${setup.water.tiltXDeg === 0 && setup.water.tiltYDeg === 0 ? "level the tray with a spirit level" : "set the tilt with shims and check both depths"}.`,
      "Fill to the depth, measured at the tray's centre; stir, wait until it is still, note temperature and conductivity.",
      "Supply off: join the leads by the table, compare the signs with the template. Then the checklist, before anything is switched on.",
      `Switch on, note volts and current after a minute${first === undefined ? "" : `; the first reading is point 1 at ${shown(first.xMm, 4)}, ${shown(first.yMm, 4)} mm and should be ${shown(first.volts, 3)} V`}.`,
      "At the end: supply off, plug out, leads off, then the water; rinse and dry the metal.",
    ].map((words): Block => ({ kind: "tick", words })),
  ];
}

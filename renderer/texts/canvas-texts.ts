import type { Severity } from "../../shared-types/plan";
import type { PartRole, ShapeKind } from "../../shared-types/setup";

const kinds: Readonly<Record<ShapeKind, string>> = {
  bar: "bar",
  disc: "disc",
  ring: "ring",
  arc: "arc",
  frame: "frame",
  polygon: "polygon",
};
const severities: Readonly<Record<Severity, string>> = { stop: "Stop", caution: "Caution", note: "Note" };

type Quantity = "potential" | "field" | "current" | "difference";

/** What the tray says: its names for those who listen, its labels, the numbers under the hand, and what is announced. */
export const canvasTexts = {
  tray: (count: number): string => `Tray with ${count} ${count === 1 ? "part" : "parts"}. Arrow keys move what is selected.`,
  empty: "Drag a bar or a disc from the shelf onto the tray, or press Enter on one there.",
  severities,
  list: {
    label: "Parts in the tray",
    help: "Parts in the tray. Arrow keys choose, Space adds or drops, Enter goes to the tray to move them.",
    none: "No parts yet",
  },
  thing: {
    place: (x: string, y: string): string => `x ${x}, y ${y} mm`,
    turned: (place: string, turn: string): string => `${place}, turned ${turn}°`,
    slab: (thickness: string): string => `slab ${thickness} mm thick`,
    electrode: (volts: string): string => `electrode at ${volts} V`,
    roles: { floating: "floating conductor", insulator: "insulator" } satisfies Readonly<Record<Exclude<PartRole, "electrode">, string>>,
    whole: (name: string, role: string, kind: ShapeKind, size: string, place: string): string =>
      `${name}: ${role}, ${kinds[kind]} ${size}, ${place}`,
    locked: "locked",
    inGroup: (group: string): string => `in group ${group}`,
  },
  said: {
    refused: (why: string): string => `Refused. ${why}`,
    undone: (step: string): string => `Undone: ${step}`,
    redone: (step: string): string => `Redone: ${step}`,
    done: (step: string): string => `${step.charAt(0).toUpperCase()}${step.slice(1)}`,
    withState: (done: string, state: string): string => `${done}: ${state}`,
    nothingSelected: "Nothing selected",
    selected: (name: string, place: string): string => `${name} selected, ${place}`,
    manySelected: (count: number): string => `${count} selected`,
  },
  hand: {
    place: (x: string, y: string): string => `x ${x}, y ${y} mm`,
    by: (x: string, y: string): string => `by ${x}, ${y} mm`,
    locked: "locked",
    angle: (degrees: string): string => `${degrees}°`,
    gap: (mm: string): string => `${mm} mm`,
    equalGap: (mm: string): string => `= ${mm} mm`,
  },
  tags: {
    volts: (volts: string): string => `${volts} V`,
    floats: "floats",
    floatsAt: (volts: string): string => `floats ${volts} V`,
  },
  tape: {
    length: (mm: string): string => `${mm} mm`,
    slanted: (length: string, across: string, up: string): string => `${length} (${across} across, ${up} up)`,
  },
  rules: { x: "x mm", y: "y mm" },
  scale: {
    units: { potential: "V", field: "V/cm", current: "A/m²", difference: "V" } satisfies Readonly<Record<Quantity, string>>,
    of: {
      potential: "potential",
      field: "field strength",
      current: "current density",
      difference: "the difference of potential",
    } satisfies Readonly<Record<Quantity, string>>,
    value: (text: string, unit: string): string => `${text} ${unit}`,
    andMore: (text: string): string => `≥ ${text}`,
    name: (of: string, low: string, high: string, apart: boolean): string =>
      apart ? `Colours of ${of}, from ${low} to ${high}` : `Colours of ${of}, from ${low} to ${high}, lighter is higher`,
  },
  pin: (number: number, volts: string | null): string => (volts === null ? `${number}` : `${number}  ${volts} V`),
} as const;

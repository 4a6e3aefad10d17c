import type { PartRole, Shape, ShapeKind } from "../../shared-types/setup";

/** What the shelf hands over: a shape with its first sizes, and what it is to be. */
export interface ShelfPart {
  readonly shape: Shape;
  /** Absent: an electrode while fewer than two are there, then a floating conductor. */
  readonly role?: PartRole;
  readonly material?: string;
  readonly heightMm?: number;
}

/** The type under which a shelf part travels while it is dragged with the pointer. Its text is the JSON of a ShelfPart. */
export const SHELF_PART_TYPE = "application/x-fieldtray-part+json";

/** Sizes that fit a bench tray of 300 × 200 mm; the user changes them at once or never. */
export const FIRST_SHAPES: Readonly<Record<ShapeKind, Shape>> = {
  bar: { kind: "bar", lengthMm: 100, widthMm: 10 },
  disc: { kind: "disc", diameterMm: 30 },
  ring: { kind: "ring", outerMm: 60, innerMm: 54 },
  arc: { kind: "arc", outerMm: 80, innerMm: 70, sweepDeg: 120 },
  frame: { kind: "frame", lengthMm: 80, widthMm: 60, wallMm: 4 },
  polygon: {
    kind: "polygon",
    pointsMm: [
      [-20, -15],
      [20, -15],
      [0, 20],
    ],
  },
};

/** @returns the text that carries a shelf part through a drag. */
export const shelfPartText = (part: ShelfPart): string => JSON.stringify(part);

const ROLES: readonly PartRole[] = ["electrode", "floating", "insulator"];

/** @returns the shelf part in a dropped text, or null when it is none. Its sizes are checked when it is placed. */
export function readShelfPart(text: string): ShelfPart | null {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return null;
  }
  if (typeof data !== "object" || data === null || !("shape" in data)) return null;
  const { shape } = data;
  if (typeof shape !== "object" || shape === null || !("kind" in shape)) return null;
  const kind = Object.values(FIRST_SHAPES).find((known) => known.kind === shape.kind)?.kind;
  if (kind === undefined) return null;
  const role = "role" in data ? ROLES.find((known) => known === data.role) : undefined;
  return {
    // A shape with a known kind; the document refuses it with reasons if its sizes are wrong.
    shape: shape as Shape,
    ...(role === undefined ? {} : { role }),
    ...("material" in data && typeof data.material === "string" ? { material: data.material } : {}),
    ...("heightMm" in data && typeof data.heightMm === "number" ? { heightMm: data.heightMm } : {}),
  };
}

import type { DragEvent } from "react";
import type { Setup, Shape, ShapeKind } from "../../shared-types/setup";
import { addSlab } from "../document/commands/bench";
import { addPart, freePlaceMm } from "../document/commands/parts";
import type { Document } from "../document/document";
import { FIRST_SHAPES, SHELF_PART_TYPE, shelfPartText } from "../document/shelf-part";
import { boundsOf, outlineOf } from "../engine/geometry/outline";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { PartPicture } from "./part-picture";

const NAMES: readonly (readonly [ShapeKind, string])[] = [
  ["bar", "Bar"],
  ["disc", "Disc"],
  ["ring", "Ring"],
  ["arc", "Arc"],
  ["frame", "Frame"],
  ["polygon", "Outline"],
];

/** A slab as the shelf gives it out: half the usual tray, a third of its depth. */
const FIRST_SLAB: Shape = { kind: "bar", lengthMm: 80, widthMm: 120 };
const FIRST_THICKNESS_MM = 4;

/** The middle of free water for a new shape. */
function freePlace(setup: Setup, shape: Shape): readonly [number, number] {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  return freePlaceMm(setup, shape, (thing) => boundsOf(outlineOf(thing)), [0, 0, lengthMm, widthMm]);
}

/** The shelf of parts: dragged onto the tray, or placed in free water by a click or the Enter key. */
export function Shelf({ document }: { readonly document: Document }) {
  function place(kind: ShapeKind): void {
    const { setup } = document.getState();
    const shape = FIRST_SHAPES[kind];
    document.run(addPart(setup, { shape }, ...freePlace(setup, shape)));
  }
  function lift(event: DragEvent, kind: ShapeKind): void {
    event.dataTransfer.setData(SHELF_PART_TYPE, shelfPartText({ shape: FIRST_SHAPES[kind] }));
    event.dataTransfer.effectAllowed = "copy";
  }
  return (
    <section className="shelf" aria-label="Shelf of parts">
      <h2>Shelf</h2>
      <p className="hint">Drag onto the tray, or press Enter to place.</p>
      <ul>
        {NAMES.map(([kind, name]) => (
          <li key={kind}>
            <button type="button" className="shelf-part" draggable onDragStart={(event) => lift(event, kind)} onClick={() => place(kind)}>
              <PartPicture shape={FIRST_SHAPES[kind]} />
              <span>{name}</span>
            </button>
          </li>
        ))}
        <li>
          <button
            type="button"
            className="shelf-part"
            onClick={() => document.run(addSlab(FIRST_SLAB, FIRST_THICKNESS_MM, ...freePlace(document.getState().setup, FIRST_SLAB)))}
          >
            <PartPicture shape={FIRST_SLAB} plate />
            <span>Slab on the bed</span>
          </button>
        </li>
      </ul>
    </section>
  );
}

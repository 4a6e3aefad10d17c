import type { DragEvent } from "react";
import type { Setup, Shape, ShapeKind } from "../../shared-types/setup";
import { addSlab } from "../document/commands/bench";
import { addPart, freePlaceMm } from "../document/commands/parts";
import type { Document } from "../document/document";
import { FIRST_SHAPES, SHELF_PART_TYPE, shelfPartText } from "../document/shelf-part";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { texts } from "../texts/texts";
import { choicesOf } from "./fields";
import { boxOf } from "./many-tools";
import { PartPicture } from "./part-picture";

const words = texts.layOut.shelf;

/** A slab as the shelf gives it out: a good part of the usual tray, a third of its depth. */
const FIRST_SLAB: Shape = { kind: "bar", lengthMm: 80, widthMm: 120 };
const FIRST_THICKNESS_MM = 4;

/** The middle of free water for a new shape. */
export function freePlace(setup: Setup, shape: Shape): readonly [number, number] {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  return freePlaceMm(setup, shape, boxOf, [0, 0, lengthMm, widthMm]);
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
    <section className="shelf" aria-label={words.label}>
      <h2>{words.title}</h2>
      <p className="hint">{words.hint}</p>
      <ul>
        {choicesOf<ShapeKind>(words.shapes).map(([kind, name]) => (
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
            aria-label={words.slabLong}
            title={words.slabLong}
            onClick={() => document.run(addSlab(FIRST_SLAB, FIRST_THICKNESS_MM, ...freePlace(document.getState().setup, FIRST_SLAB)))}
          >
            <PartPicture shape={FIRST_SLAB} plate />
            <span>{words.slab}</span>
          </button>
        </li>
      </ul>
    </section>
  );
}

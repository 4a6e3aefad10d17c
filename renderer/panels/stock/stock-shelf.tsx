import { type DragEvent, useDeferredValue } from "react";
import { useStore } from "zustand";
import type { StockPart } from "../../../shared-types/stock";
import { addPart } from "../../document/commands/parts";
import type { Document } from "../../document/document";
import { SHELF_PART_TYPE, type ShelfPart, shelfPartText } from "../../document/shelf-part";
import { usedOf } from "../../document/stock-findings";
import { texts } from "../../texts/texts";
import { PartPicture } from "../part-picture";
import { freePlace } from "../shelf";
import type { StockKeeper } from "./use-stock";

const words = texts.stock;

const shelfPart = ({ shape, material, heightMm, insulates }: StockPart): ShelfPart => ({
  shape,
  material,
  heightMm,
  ...(insulates ? { role: "insulator" as const } : {}),
});

/** Parts that the prep room owns, with how many are left beside those in this setup's trays; placed as the shelf's shapes are. */
export function StockShelf(props: { readonly document: Document; readonly keeper: StockKeeper; readonly onEdit: () => void }) {
  const { document, keeper, onEdit } = props;
  // What is left changes with the parts, not with the hand that drags one.
  const setup = useDeferredValue(useStore(document, (state) => state.setup));
  const { parts } = keeper.stock;
  function place(entry: StockPart): void {
    const now = document.getState().setup;
    document.run(addPart(now, shelfPart(entry), ...freePlace(now, entry.shape)));
  }
  function lift(event: DragEvent, entry: StockPart): void {
    event.dataTransfer.setData(SHELF_PART_TYPE, shelfPartText(shelfPart(entry)));
    event.dataTransfer.effectAllowed = "copy";
  }
  return (
    <section className="stock-shelf" aria-label={words.shelf}>
      {parts.length > 0 && <h2>{words.shelf}</h2>}
      <ul>
        {parts.map((entry, index) => {
          const left = entry.count - setup.session.trays * usedOf(setup, entry);
          return (
            // biome-ignore lint/suspicious/noArrayIndexKey: entries of a stock list have no other identity than their place in it.
            <li key={index}>
              <button
                type="button"
                className="in-tray in-tray-held"
                draggable
                title={words.shelfHint}
                onDragStart={(event) => lift(event, entry)}
                onClick={() => place(entry)}
              >
                <PartPicture shape={entry.shape} sizePx={22} hollow={entry.insulates} />
                <span className="in-tray-name">{entry.name}</span>
                <span className={`in-tray-standing${left < 0 ? " stock-short" : ""}`}>{words.left(left, entry.count)}</span>
              </button>
            </li>
          );
        })}
      </ul>
      <button type="button" className="stock-edit" onClick={onEdit}>
        {words.edit}
      </button>
    </section>
  );
}

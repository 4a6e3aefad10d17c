import { type ClipboardEvent, type DragEvent, type KeyboardEvent, type RefObject, useState } from "react";
import { pasteThings, thingsText } from "../document/clipboard";
import { addPart, removeThings } from "../document/commands/parts";
import { readShelfPart, SHELF_PART_TYPE } from "../document/shelf-part";
import { type KeyMeaning, meaningOf } from "./keys";
import type { TrayCanvasProps } from "./tray-canvas";
import { placeOn } from "./use-pointer";
import { type TrayView, toTray, viewOf } from "./view";

/** What reaches the tray by key, by clipboard and by dropping. */

function actOnView(trayView: TrayView, view: Extract<KeyMeaning, { kind: "view" }>["view"]): void {
  const acts = {
    "zoom in": trayView.zoomIn,
    "zoom out": trayView.zoomOut,
    fit: trayView.fit,
    tape: () => trayView.setTool(trayView.getState().tool === "tape" ? "hand" : "tape"),
    pin: () => trayView.setTool(trayView.getState().tool === "pin" ? "hand" : "pin"),
  };
  acts[view]();
}

/** Does what a key means on the tray. @returns whether it meant something. */
export function actOnKey(event: KeyboardEvent, { setup, selection, trayView, actions, editable }: TrayCanvasProps): boolean {
  const meaning = meaningOf(event, setup, selection);
  if (meaning === null) return false;
  if (meaning.kind === "select") actions.select(meaning.ids);
  else if (meaning.kind === "view") actOnView(trayView, meaning.view);
  else if (!editable) return false;
  else actions.run(meaning.edit);
  return true;
}

/** @returns the listeners that copy, cut and paste what is selected as text. */
export function useClipboard({ setup, selection, actions, editable }: TrayCanvasProps) {
  function copy(event: ClipboardEvent, cut: boolean): void {
    const text = thingsText(setup, selection);
    if (text === null) return;
    event.clipboardData.setData("text/plain", text);
    event.preventDefault();
    if (cut && editable) actions.run(removeThings(setup, selection));
  }
  return {
    onCopy: (event: ClipboardEvent): void => copy(event, false),
    onCut: (event: ClipboardEvent): void => copy(event, true),
    onPaste: (event: ClipboardEvent): void => {
      const pasted = editable ? pasteThings(event.clipboardData.getData("text/plain")) : null;
      if (pasted === null) return;
      event.preventDefault();
      if (pasted.ok) actions.run(pasted.value);
      else actions.refuse(pasted.problems);
    },
    // The browser turns these keys into copy, cut and paste by itself; nobody further out may take them for something else.
    onKeyDown: (event: KeyboardEvent): void => {
      if ((event.ctrlKey || event.metaKey) && ["c", "x", "v"].includes(event.key.toLowerCase())) event.stopPropagation();
    },
  };
}

/** Takes parts that are dropped from the shelf. @returns whether one is over the tray, and what to listen with. */
export function useDrop({ setup, trayView, snapping, actions, editable }: TrayCanvasProps, surface: RefObject<HTMLDivElement | null>) {
  const [over, setOver] = useState(false);
  return {
    over,
    listeners: {
      onDragOver: (event: DragEvent): void => {
        if (!editable || !event.dataTransfer.types.includes(SHELF_PART_TYPE)) return;
        event.preventDefault();
        event.dataTransfer.dropEffect = "copy";
        setOver(true);
      },
      onDragLeave: (): void => setOver(false),
      onDrop: (event: DragEvent): void => {
        setOver(false);
        const part = readShelfPart(event.dataTransfer.getData(SHELF_PART_TYPE));
        if (part === null || !editable) return;
        event.preventDefault();
        const [xMm, yMm] = toTray(viewOf(trayView.getState()), ...placeOn(surface.current, event));
        const step = snapping ? 1 : 0.1;
        actions.run(addPart(setup, part, Math.round(xMm / step) * step, Math.round(yMm / step) * step));
        surface.current?.focus({ preventScroll: true });
      },
    },
  };
}

import { benchTexts } from "./bench-texts";
import { canvasTexts } from "./canvas-texts";
import { closerTexts } from "./closer-texts";
import { documentTexts } from "./document-texts";
import { fileTexts } from "./file-texts";
import { layOutTexts } from "./lay-out-texts";
import { probeTexts, sheetTexts } from "./paper-texts";
import { readingsTexts } from "./readings-texts";
import { readoutTexts } from "./readout-texts";
import { stockTexts } from "./stock-texts";
import { windowTexts } from "./window-texts";

/** Every text of the window, in English. Another language is another object of this type. */
export const texts = {
  window: windowTexts,
  layOut: layOutTexts,
  canvas: canvasTexts,
  closer: closerTexts,
  document: documentTexts,
  files: fileTexts,
  bench: benchTexts,
  readouts: readoutTexts,
  readings: readingsTexts,
  probe: probeTexts,
  sheets: sheetTexts,
  stock: stockTexts,
} as const;
export type Texts = typeof texts;

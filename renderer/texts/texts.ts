import { fileTexts } from "./file-texts";
import { layOutTexts } from "./lay-out-texts";
import { probeTexts, sheetTexts } from "./paper-texts";
import { windowTexts } from "./window-texts";

/** Every text of the window, in English. Another language is another object of this type. */
export const texts = { window: windowTexts, layOut: layOutTexts, files: fileTexts, probe: probeTexts, sheets: sheetTexts } as const;
export type Texts = typeof texts;

import { traySizeMm } from "../geometry/tray-outline";
import { A4_FREE_MM } from "./limits";
import type { SetupRule } from "./rule";
import { finding, shown } from "./wording";

/** A tray larger than a sheet: its template at full size is cut into tiles. */
export const templateTiles: SetupRule = (setup) => {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const fits = A4_FREE_MM.some(([alongX, alongY]) => lengthMm <= alongX && widthMm <= alongY);
  if (fits) return [];
  return [
    finding({
      code: "template-tiles",
      severity: "note",
      about: setup.tray.shape === "circle" ? "tray.diameterMm" : "tray.lengthMm",
      message: `The template of a ${shown(lengthMm, 4)} × ${shown(widthMm, 4)} mm tray does not fit one A4 sheet at full size; it is printed in tiles to be joined.`,
      measured: `${shown(lengthMm, 4)} × ${shown(widthMm, 4)} mm`,
      limit: {
        text: A4_FREE_MM.map(([alongX, alongY]) => `${alongX} × ${alongY} mm`).join(" or "),
        source: "ISO 216, A4 less edge, header and check bars",
      },
      remedy: "Join the tiles by their crosses, or print on a larger sheet.",
    }),
  ];
};

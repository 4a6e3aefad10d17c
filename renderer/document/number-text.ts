import type { Shape } from "../../shared-types/setup";
import { texts } from "../texts/texts";

const words = texts.document.sizes;

/**
 * Numbers as the screen writes them: the decimal sign of the user's language, never more digits than asked for. Hundreds of them
 * are written in a frame, so that the sign is asked for once and the digits come without a formatter.
 */
const DECIMAL_SIGN = new Intl.NumberFormat().formatToParts(1.5).find(({ type }) => type === "decimal")?.value ?? ".";

/** @returns a number with exactly so many decimals, such as "3.00"; a true minus sign, and none before zero. */
export function fixed(value: number, decimals: number): string {
  const digits = Math.abs(value).toFixed(decimals);
  const text = DECIMAL_SIGN === "." ? digits : digits.replace(".", DECIMAL_SIGN);
  return value < 0 && /[1-9]/.test(digits) ? `−${text}` : text;
}

/** @returns a number with at most so many decimals, trailing zeros dropped, such as "6" or "0.5". */
export function trimmed(value: number, decimals: number): string {
  const text = fixed(value, decimals);
  return /[.,]/.test(text) ? text.replace(/[.,]?0+$/, "") : text;
}

/** @returns the decimals that tell even steps of this size apart and give two digits of a step: 0.75 → 2, 1.5 → 1, 0.05 → 3. */
export function decimalsForStep(step: number): number {
  if (!(step > 0)) return 2;
  return Math.min(6, Math.max(1, 1 - Math.floor(Math.log10(step))));
}

/** @returns the sizes that a hand cares about while resizing, such as "120 × 10 mm". */
export function sizeText(shape: Shape): string {
  const mm = (value: number): string => trimmed(value, 2);
  switch (shape.kind) {
    case "bar":
      return words.bar(mm(shape.lengthMm), mm(shape.widthMm));
    case "disc":
      return words.disc(mm(shape.diameterMm));
    case "ring":
      return words.ring(mm(shape.outerMm), mm(shape.innerMm));
    case "arc":
      return words.arc(mm(shape.outerMm), mm(shape.innerMm), mm(shape.sweepDeg));
    case "frame":
      return words.frame(mm(shape.lengthMm), mm(shape.widthMm), mm(shape.wallMm));
    case "polygon":
      return words.polygon(shape.pointsMm.length);
  }
}

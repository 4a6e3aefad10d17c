import { useEffect, useMemo, useState } from "react";
import { CANVAS_PROPERTIES, type CanvasTheme } from "./theme";

/**
 * A canvas does not redraw by itself when a font arrives: the theme becomes a new object then, so that texts are measured
 * and painted again.
 */
export function useLoadedTheme(theme: CanvasTheme): CanvasTheme {
  const [loaded, setLoaded] = useState<string | null>(null);
  const { font } = theme;
  useEffect(() => {
    let wanted = true;
    const { fonts } = window.document;
    const here = (): void => {
      if (wanted) setLoaded(font);
    };
    Promise.all([fonts.load(`12px ${font}`), fonts.load(`700 12px ${font}`)]).then(here, here);
    return () => {
      wanted = false;
    };
  }, [font]);
  // biome-ignore lint/correctness/useExhaustiveDependencies: the font's arrival asks for another object with the same colours.
  return useMemo(() => ({ ...theme }), [theme, loaded]);
}

/** @returns the theme as custom properties for the canvas's own element, so that its notes and tags match what is painted. */
export const themeProperties = (theme: CanvasTheme): Readonly<Record<string, string>> =>
  Object.fromEntries(
    (Object.keys(CANVAS_PROPERTIES) as (keyof typeof CANVAS_PROPERTIES)[]).map((key) => [CANVAS_PROPERTIES[key], theme[key]]),
  );

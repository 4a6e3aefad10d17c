/** Measures texts before they are drawn, so that labels can be placed. */
export type WidthOf = (text: string) => number;

/** @returns a measure for texts in one font, px; widths are kept, since the same few texts come again in every frame. */
export function widthIn(font: string): WidthOf {
  const pen = window.document.createElement("canvas").getContext("2d");
  if (pen === null) return (text) => 7 * text.length;
  pen.font = font;
  const known = new Map<string, number>();
  return (text) => {
    const before = known.get(text);
    if (before !== undefined) return before;
    const width = pen.measureText(text).width;
    known.set(text, width);
    return width;
  };
}

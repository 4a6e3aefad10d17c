/**
 * Widths of characters, read from the font file that is embedded: so that columns, labels and the check that nothing
 * overlaps go by what is printed. Reads the tables head, hhea, hmtx and cmap (format 4) of a TrueType file
 * (OpenType specification 1.9).
 */
export interface FontMetrics {
  /** @returns the width of a text (mm) set at a size (mm). */
  readonly widthOf: (words: string, sizeMm: number) => number;
  /** @returns whether the font has a sign for a character. */
  readonly has: (character: string) => boolean;
}

function tableAt(view: DataView, tag: string): number {
  const count = view.getUint16(4);
  for (let index = 0; index < count; index++) {
    const entry = 12 + 16 * index;
    const name = String.fromCharCode(...[0, 1, 2, 3].map((byte) => view.getUint8(entry + byte)));
    if (name === tag) return view.getUint32(entry + 8);
  }
  throw new Error(`the font file has no table ${tag}`);
}

function characterMap(view: DataView): (code: number) => number {
  const cmap = tableAt(view, "cmap");
  const count = view.getUint16(cmap + 2);
  for (let index = 0; index < count; index++) {
    const start = cmap + view.getUint32(cmap + 4 + 8 * index + 4);
    if (view.getUint16(start) !== 4) continue;
    const segments = view.getUint16(start + 6) / 2;
    const [ends, starts] = [start + 14, start + 16 + 2 * segments];
    const [deltas, offsets] = [starts + 2 * segments, starts + 4 * segments];
    return (code) => {
      for (let segment = 0; segment < segments; segment++) {
        if (code > view.getUint16(ends + 2 * segment)) continue;
        const first = view.getUint16(starts + 2 * segment);
        if (code < first) return 0;
        const delta = view.getUint16(deltas + 2 * segment);
        const offset = view.getUint16(offsets + 2 * segment);
        if (offset === 0) return (code + delta) & 0xffff;
        const glyph = view.getUint16(offsets + 2 * segment + offset + 2 * (code - first));
        return glyph === 0 ? 0 : (glyph + delta) & 0xffff;
      }
      return 0;
    };
  }
  throw new Error("the font file has no character map of format 4");
}

/** @returns the metrics of a TrueType font; throws when the bytes are none. */
export function readFontMetrics(bytes: Uint8Array): FontMetrics {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const unitsPerEm = view.getUint16(tableAt(view, "head") + 18);
  const wide = view.getUint16(tableAt(view, "hhea") + 34);
  const hmtx = tableAt(view, "hmtx");
  const glyphOf = characterMap(view);
  const advance = (glyph: number): number => view.getUint16(hmtx + 4 * Math.min(glyph, wide - 1)) / unitsPerEm;
  const known = new Map<string, number>();
  const widthOfCharacter = (character: string): number => {
    const before = known.get(character);
    if (before !== undefined) return before;
    const width = advance(glyphOf(character.codePointAt(0) ?? 0));
    known.set(character, width);
    return width;
  };
  return {
    widthOf: (words, sizeMm) => [...words].reduce((sum, character) => sum + widthOfCharacter(character), 0) * sizeMm,
    has: (character) => glyphOf(character.codePointAt(0) ?? 0) !== 0,
  };
}

/** The two cuts of the one family that the sheets are set in. */
export interface SheetFonts {
  readonly regular: FontMetrics;
  readonly bold: FontMetrics;
}

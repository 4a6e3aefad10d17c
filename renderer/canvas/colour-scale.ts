/**
 * The colours of potential: our own scale from steel blue (low) over pale teal to pale straw (high), and its dark counterpart.
 * Built in the Oklab space (B. Ottosson, "A perceptual color space for image processing", 2020), in which equal distances look
 * about equally different. Lightness rises all the way, so that the scale survives a grey printer and any colour blindness;
 * blue against yellow is the pair that the common kinds of it (protan, deutan) leave apart. All of it stays light (or dark) enough
 * for the lines and labels over it.
 */

type Triple = readonly [number, number, number];

/** Lightness, chroma and hue (degrees) in Oklab's polar form: low, middle, high. */
interface Stops {
  readonly low: Triple;
  readonly middle: Triple;
  readonly high: Triple;
}

const LIGHT: Stops = { low: [0.74, 0.08, 252], middle: [0.865, 0.062, 192], high: [0.96, 0.07, 95] };
/** The same lightness without any hue: what a grey printer makes of it. */
const grey = ({ low, middle, high }: Stops): Stops => ({ low: [low[0], 0, 0], middle: [middle[0], 0, 0], high: [high[0], 0, 0] });
/** Differences: blue below, nothing in the middle, ochre above, as far apart as blue and yellow are for every common kind of eye. */
const APART_LIGHT: readonly [below: Triple, none: Triple, above: Triple] = [
  [0.74, 0.1, 252],
  [0.97, 0.006, 150],
  [0.79, 0.115, 72],
];
const APART_DARK: readonly [below: Triple, none: Triple, above: Triple] = [
  [0.5, 0.1, 252],
  [0.26, 0.008, 150],
  [0.53, 0.1, 72],
];
const DARK: Stops = { low: [0.26, 0.055, 252], middle: [0.41, 0.045, 200], high: [0.545, 0.082, 82] };

/** More than a channel's 256 steps: the three channels step at different places, which hides the steps. */
const SHADES = 1024;
/** Steps in which the curve is walked to space the shades evenly. */
const FINE = 32 * SHADES;

const lab = ([lightness, chroma, hueDeg]: Triple): Triple => {
  const hue = (hueDeg * Math.PI) / 180;
  return [lightness, chroma * Math.cos(hue), chroma * Math.sin(hue)];
};

/** Linear sRGB of an Oklab colour; the matrices of the publication named above. */
function linearRgb([L, a, b]: Triple): Triple {
  const l = (L + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (L - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (L - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s,
  ];
}

/** The transfer curve of sRGB (IEC 61966-2-1). */
const encoded = (linear: number): number => {
  const value = linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
  return Math.round(255 * Math.min(1, Math.max(0, value)));
};

/** The curve through the three stops: a parabola in Oklab. */
function along({ low, middle, high }: Stops, share: number): Triple {
  const [from, through, to] = [lab(low), lab(middle), lab(high)];
  const at = (axis: 0 | 1 | 2): number => {
    const bend = 2 * through[axis] - (from[axis] + to[axis]) / 2;
    return (1 - share) ** 2 * from[axis] + 2 * share * (1 - share) * bend + share ** 2 * to[axis];
  };
  return [at(0), at(1), at(2)];
}

/** The scale's shades in Oklab, spaced evenly along the curve. */
export function shadesInOklab(dark: boolean, greys = false): readonly Triple[] {
  const hued = dark ? DARK : LIGHT;
  const stops = greys ? grey(hued) : hued;
  const fine = Array.from({ length: FINE + 1 }, (_, index) => along(stops, index / FINE));
  const walked = [0];
  fine.slice(1).forEach((shade, index) => {
    const before = fine[index] as Triple;
    walked.push((walked[index] as number) + Math.hypot(shade[0] - before[0], shade[1] - before[1], shade[2] - before[2]));
  });
  const total = walked.at(-1) as number;
  let next = 0;
  return Array.from({ length: SHADES }, (_, index) => {
    const wanted = (total * index) / (SHADES - 1);
    while (next < FINE && (walked[next] as number) < wanted) next++;
    return fine[next] as Triple;
  });
}

const tableOf = (shades: readonly Triple[]): readonly Triple[] =>
  shades.map((shade) => {
    const [r, g, b] = linearRgb(shade);
    return [encoded(r), encoded(g), encoded(b)] as const;
  });

/** A scale ready for use: red, green, blue (0 to 255) of each shade, from the lowest potential to the highest. */
export interface ColourScale {
  readonly shades: readonly Triple[];
  /** The same as one 32-bit number a shade, in the byte order of ImageData. */
  readonly packed: Uint32Array;
}

/** Straight from below to none, and from none to above. */
function shadesApart(dark: boolean): readonly Triple[] {
  const [below, none, above] = (dark ? APART_DARK : APART_LIGHT).map(lab) as [Triple, Triple, Triple];
  return Array.from({ length: SHADES }, (_, index): Triple => {
    const share = (2 * index) / (SHADES - 1) - 1;
    const end = share < 0 ? below : above;
    const at = (axis: 0 | 1 | 2): number => none[axis] + Math.abs(share) * (end[axis] - none[axis]);
    return [at(0), at(1), at(2)];
  });
}

function scaleOf(inOklab: readonly Triple[]): ColourScale {
  const shades = tableOf(inOklab);
  const bytes = new Uint8ClampedArray(SHADES * 4);
  for (const [index, shade] of shades.entries()) bytes.set([...shade, 255], index * 4);
  return { shades, packed: new Uint32Array(bytes.buffer) };
}

export const LIGHT_SCALE = scaleOf(shadesInOklab(false));
export const DARK_SCALE = scaleOf(shadesInOklab(true));

/** @returns a scale with so many bands of one colour each: every shade of a band is its middle one. */
export function stepped({ shades }: ColourScale, bands: number): ColourScale {
  const ofBand = (index: number): Triple => {
    const band = Math.min(bands - 1, Math.floor((index / shades.length) * bands));
    return shades[Math.round(((band + 0.5) / bands) * (shades.length - 1))] as Triple;
  };
  const banded = shades.map((_, index) => ofBand(index));
  const bytes = new Uint8ClampedArray(banded.length * 4);
  for (const [index, shade] of banded.entries()) bytes.set([...shade, 255], index * 4);
  return { shades: banded, packed: new Uint32Array(bytes.buffer) };
}

/**
 * @param colours hues, or greys alone.
 * @param apart whether the middle of the scale is nothing and both ends are apart (differences); greys run from dark to light then too.
 * @returns the scale for a light or dark window.
 */
export function scaleFor(dark: boolean, colours: "hues" | "greys", apart: boolean): ColourScale {
  if (colours === "greys") return scaleOf(shadesInOklab(dark, true));
  if (apart) return scaleOf(shadesApart(dark));
  return dark ? DARK_SCALE : LIGHT_SCALE;
}

/** @returns the CSS colour at a share (0 lowest potential, 1 highest) of the scale. */
export function colourAt({ shades }: ColourScale, share: number): string {
  const index = Math.round(Math.min(1, Math.max(0, share)) * (SHADES - 1));
  return `rgb(${(shades[index] as Triple).join(" ")})`;
}

/** Colours and type of the canvas as plain data: the stage itself knows no style sheet. Colours are CSS colours. */
export interface CanvasTheme {
  readonly dark: boolean;
  /** The table that the tray stands on. */
  readonly bench: string;
  readonly wall: string;
  readonly wallEdge: string;
  /** The tray's bed where it is dry. */
  readonly base: string;
  /** Water that has no field yet. */
  readonly water: string;
  readonly rule: string;
  readonly ruleInk: string;
  /** Lines, labels and points over the field. */
  readonly ink: string;
  /** What lifts labels and points off the field. */
  readonly halo: string;
  readonly metal: string;
  readonly metalEdge: string;
  readonly insulator: string;
  readonly insulatorInk: string;
  readonly slab: string;
  readonly slabEdge: string;
  readonly tag: string;
  readonly tagInk: string;
  readonly positive: string;
  readonly common: string;
  readonly accent: string;
  readonly stop: string;
  readonly caution: string;
  readonly note: string;
  readonly font: string;
}

type Colours = Omit<CanvasTheme, "dark">;

/** Shown where the page gives no colour of its own; also what the style sheet's values start from. */
export const LIGHT_CANVAS: CanvasTheme = {
  dark: false,
  bench: "#e7e5e0",
  wall: "#f4f7f8",
  wallEdge: "#7f8a91",
  base: "#f8f7f3",
  water: "#dbe7ec",
  rule: "#fbfaf6",
  ruleInk: "#3b4348",
  ink: "#15191c",
  halo: "#ffffff",
  metal: "#3d454c",
  metalEdge: "#dfe5e9",
  insulator: "#f6f1e4",
  insulatorInk: "#5c5340",
  slab: "rgba(255, 255, 255, 0.55)",
  slabEdge: "#4d5a63",
  tag: "#ffffff",
  tagInk: "#15191c",
  positive: "#a8201a",
  common: "#15191c",
  accent: "#0b5cad",
  stop: "#a8201a",
  caution: "#8a5a00",
  note: "#0b5cad",
  font: "system-ui, sans-serif",
};

export const DARK_CANVAS: CanvasTheme = {
  dark: true,
  bench: "#1b1d1f",
  wall: "#30363a",
  wallEdge: "#87939b",
  base: "#24282b",
  water: "#22343d",
  rule: "#2a2e31",
  ruleInk: "#c9d1d6",
  ink: "#f3f6f8",
  halo: "#0d0f10",
  metal: "#0f1214",
  metalEdge: "#b9c4cb",
  insulator: "#4a4434",
  insulatorInk: "#e6dcc2",
  slab: "rgba(8, 10, 12, 0.4)",
  slabEdge: "#c3ced5",
  tag: "#15181a",
  tagInk: "#f3f6f8",
  positive: "#ff8a80",
  common: "#f3f6f8",
  accent: "#7db8ff",
  stop: "#ff8a80",
  caution: "#f2bd54",
  note: "#7db8ff",
  font: "system-ui, sans-serif",
};

/** Which custom property of the page gives which colour of the canvas. */
export const CANVAS_PROPERTIES: Readonly<Record<keyof Colours, string>> = {
  bench: "--canvas-bench",
  wall: "--canvas-wall",
  wallEdge: "--canvas-wall-edge",
  base: "--canvas-base",
  water: "--canvas-water",
  rule: "--canvas-rule",
  ruleInk: "--canvas-rule-ink",
  ink: "--canvas-ink",
  halo: "--canvas-halo",
  metal: "--canvas-metal",
  metalEdge: "--canvas-metal-edge",
  insulator: "--canvas-insulator",
  insulatorInk: "--canvas-insulator-ink",
  slab: "--canvas-slab",
  slabEdge: "--canvas-slab-edge",
  tag: "--canvas-tag",
  tagInk: "--canvas-tag-ink",
  positive: "--canvas-positive",
  common: "--canvas-common",
  accent: "--canvas-accent",
  stop: "--canvas-stop",
  caution: "--canvas-caution",
  note: "--canvas-note",
  font: "--canvas-font",
};

/**
 * @param dark whether the page is dark.
 * @param read gives the value of a custom property, "" where the page has none.
 * @returns the theme, our own defaults where the page is silent.
 */
export function canvasTheme(dark: boolean, read: (property: string) => string): CanvasTheme {
  const fallback = dark ? DARK_CANVAS : LIGHT_CANVAS;
  const keys = Object.keys(CANVAS_PROPERTIES) as (keyof Colours)[];
  const given = keys.map((key) => [key, read(CANVAS_PROPERTIES[key]).trim() || fallback[key]] as const);
  return { ...fallback, ...Object.fromEntries(given) };
}

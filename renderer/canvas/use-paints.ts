import { useMemo, useRef } from "react";
import type { Plan, ProbePoint } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { CloserLookState } from "../document/closer-look";
import { decimalsForStep, fixed, trimmed } from "../document/number-text";
import { signedDistance } from "../engine/geometry/signed-distance";
import { texts } from "../texts/texts";
import { type ColourScale, scaleFor, stepped } from "./colour-scale";
import { fieldPixels, imageOf } from "./field-image";
import type { Gap } from "./gaps";
import { outlinedThing } from "./hit";
import { placeLabels, type Taken } from "./line-labels";
import { paintBench, paintSlabs, paintWallEdge } from "./paint/bench";
import { type FieldParts, labelFont, paintEquipotentials, paintFieldLines, paintPicture } from "./paint/field";
import { type Emphasis, paintEmphasis, paintTags, tagFont } from "./paint/hand";
import { paintParts } from "./paint/parts";
import type { Pen } from "./paint/pen";
import { numberFont, paintPoints } from "./paint/points";
import { paintOrigin, paintRules, rulesLieOver } from "./paint/rules";
import { bandsOf } from "./picture-scale";
import { type PictureValues, pictureValues } from "./picture-values";
import { type Crowd, createCrowd, type PixelBox, type PlacedPoint, placeNumbers, RING_PX } from "./point-numbers";
import { placeTags } from "./tags";
import { type WidthOf, widthIn } from "./text-width";
import type { CanvasTheme } from "./theme";
import { toScreen, toTray, type View } from "./view";

/** What is painted on each sheet of the stage, remade only when what it shows changes: under a drag the field's sheet rests. */

export interface Shown extends FieldParts {
  readonly points: boolean;
  readonly tags: boolean;
}

/** What the colours show, and in which colours. */
export type PictureLook = Pick<CloserLookState, "quantity" | "colours" | "steps" | "comparison">;

/** The picture's values and colours, ready to be painted and explained; null while it is not shown. */
export interface ShownPicture {
  readonly values: PictureValues;
  readonly scale: ColourScale;
}

/** @returns what the picture shows of a plan. */
export function useShownPicture(field: PlannedField | null, look: PictureLook, theme: CanvasTheme, picture: boolean): ShownPicture | null {
  const { quantity, colours, steps, comparison } = look;
  const plan = picture ? (field?.plan ?? null) : null;
  const other = comparison?.plan.picture ?? null;
  const values = useMemo(() => (plan === null ? null : pictureValues(plan, quantity, other)), [plan, quantity, other]);
  const smooth = useMemo(() => scaleFor(theme.dark, colours, values?.quantity === "difference"), [theme.dark, colours, values?.quantity]);
  const bands = plan === null || values === null || !steps ? null : bandsOf(plan, values);
  const scale = useMemo(() => (bands === null ? smooth : stepped(smooth, bands)), [smooth, bands]);
  return useMemo(() => (values === null ? null : { values, scale }), [values, scale]);
}

/** A plan with the setup that it belongs to. */
export interface PlannedField {
  readonly plan: Plan;
  readonly setup: Setup;
  /** It no longer belongs to what lies in the tray: shown pale. */
  readonly outOfDate: boolean;
}

export type Paint = (pen: Pen) => void;

/** @returns every probe point of a plan, those that check floating conductors last. */
export const pointsOf = (plan: Plan): readonly ProbePoint[] => [
  ...plan.probing.levels.flatMap(({ points }) => points),
  ...plan.probing.checks,
];

function crowdOf(placed: readonly PlacedPoint[]): Crowd {
  const crowd = createCrowd();
  for (const { x, y, number } of placed) {
    crowd.add([x - RING_PX - 1, y - RING_PX - 1, x + RING_PX + 1, y + RING_PX + 1]);
    if (number !== null) crowd.add(number);
  }
  return crowd;
}

/** Small boxes along the line that shows a clear gap, so that tags leave it readable. */
function alongGap({ from, to }: Gap, view: View): readonly PixelBox[] {
  const [[x0, y0], [x1, y1]] = [toScreen(view, ...from), toScreen(view, ...to)];
  const count = Math.max(1, Math.ceil(Math.hypot(x1 - x0, y1 - y0) / 16));
  return Array.from({ length: count + 1 }, (_, index) => {
    const [x, y] = [x0 + ((x1 - x0) * index) / count, y0 + ((y1 - y0) * index) / count];
    return [x - 8, y - 8, x + 8, y + 8];
  });
}

/** What labels along lines must leave free: points with their numbers, tags, and metal. */
function takenBy(field: PlannedField, view: View, tagWidthOf: WidthOf, placed: readonly PlacedPoint[], tags: boolean): Taken {
  const crowd = crowdOf(placed);
  if (tags) for (const { box } of placeTags(field.setup, field.plan, view, tagWidthOf, new Set(), crowdOf(placed))) crowd.add(box);
  const parts = field.setup.parts.map(outlinedThing);
  return (x, y, radius) => {
    if (crowd.meets([x - radius, y - radius, x + radius, y + radius])) return true;
    const [xMm, yMm] = toTray(view, x, y);
    const reach = radius / view.scale;
    return parts.some(
      ({ placed: part, box, loops }) =>
        xMm > box[0] - reach &&
        xMm < box[2] + reach &&
        yMm > box[1] - reach &&
        yMm < box[3] + reach &&
        signedDistance(part, xMm, yMm, loops) < reach,
    );
  };
}

/** @returns the measures of the theme's fonts. */
const useWidths = (theme: CanvasTheme) =>
  useMemo(() => ({ tag: widthIn(tagFont(theme)), label: widthIn(labelFont(theme)), number: widthIn(numberFont(theme)) }), [theme]);

/** @returns the sheet of bench and tray. */
export function useBenchPaint(setup: Setup, view: View, theme: CanvasTheme): Paint {
  const { tray, water } = setup;
  // biome-ignore lint/correctness/useExhaustiveDependencies: a dragged part changes the setup, but not the bench.
  return useMemo(
    () => (pen: Pen) => {
      paintBench(pen, setup, view, theme);
      paintSlabs(pen, setup, view, theme);
      if (!rulesLieOver(view)) paintRules(pen, tray, view, theme);
    },
    [tray, water, view, theme],
  );
}

/** @returns the sheets of the field (picture, lines, labels) and of what lies over the parts: probe points and rules. */
export function useFieldPaint(
  field: PlannedField | null,
  setup: Setup,
  view: View,
  theme: CanvasTheme,
  shown: Shown,
  shownPicture: ShownPicture | null,
  markedPoints: ReadonlySet<number>,
): { readonly field: Paint; readonly points: Paint; readonly placed: readonly PlacedPoint[] } {
  const widths = useWidths(theme);
  const { plan, outOfDate } = field ?? { plan: null, outOfDate: false };
  const plannedSetup = field?.setup ?? null;
  const { tray } = setup;
  const plannedTray = plannedSetup?.tray ?? tray;
  const { fieldLines, equipotentials, points, tags } = shown;
  const scale = shownPicture?.values.quantity === "potential" ? shownPicture.scale : null;
  const image = useMemo(() => {
    if (plan === null || shownPicture === null) return null;
    const { values, scale: colours } = shownPicture;
    return imageOf(fieldPixels({ ...plan.picture, volts: values.values }, values.span, plannedTray, colours));
  }, [plan, shownPicture, plannedTray]);
  const placed = useMemo(
    () => (plan === null || !points ? [] : placeNumbers(pointsOf(plan), view, widths.number)),
    [plan, points, view, widths],
  );
  const labels = useMemo(() => {
    if (plan === null || plannedSetup === null || !equipotentials) return [];
    const [first, second] = plan.equipotentials;
    const step = first === undefined ? 1 : Math.abs((second?.volts ?? plan.spanV[0]) - first.volts);
    const decimals = decimalsForStep(step);
    const taken = takenBy({ plan, setup: plannedSetup, outOfDate: false }, view, widths.tag, placed, tags);
    return placeLabels(
      plan.equipotentials,
      view,
      (volts) => [texts.canvas.tags.volts(fixed(volts, decimals)), fixed(volts, decimals), trimmed(volts, decimals)],
      widths.label,
      taken,
    );
  }, [plan, plannedSetup, equipotentials, view, widths, placed, tags]);
  // biome-ignore lint/correctness/useExhaustiveDependencies: a dragged part changes the setup, but not its water.
  const fieldPaint = useMemo(
    () => (pen: Pen) => {
      if (plan !== null) {
        if (image !== null) paintPicture(pen, plan, image, tray, view, outOfDate);
        if (image !== null) paintSlabs(pen, setup, view, { ...theme, slab: "transparent" });
        if (fieldLines) paintFieldLines(pen, plan, view, theme, outOfDate);
        if (equipotentials) paintEquipotentials(pen, plan, labels, view, theme, image === null ? null : scale, outOfDate);
      }
      paintWallEdge(pen, tray, view, theme);
      paintOrigin(pen, view, theme);
    },
    [plan, image, tray, setup.water, view, theme, outOfDate, fieldLines, equipotentials, labels, scale],
  );
  const pointsPaint = useMemo(
    () => (pen: Pen) => {
      if (!outOfDate) paintPoints(pen, placed, theme, markedPoints);
      if (rulesLieOver(view)) paintRules(pen, tray, view, theme);
    },
    [placed, outOfDate, theme, markedPoints, tray, view],
  );
  return { field: fieldPaint, points: pointsPaint, placed };
}

/** @returns the sheet of the parts that rest, and above it that of dragged parts, the edges of selected and faulty ones, and tags. */
export function usePartsPaint(
  setup: Setup,
  plan: Plan | null,
  view: View,
  theme: CanvasTheme,
  emphasis: Emphasis,
  tagsShown: boolean,
  points: readonly PlacedPoint[],
  gaps: readonly Gap[],
  dragged: readonly string[],
): { readonly parts: Paint; readonly tags: Paint } {
  const widths = useWidths(theme);
  const crowd = useMemo(() => {
    const taken = crowdOf(points);
    for (const gap of gaps) for (const box of alongGap(gap, view)) taken.add(box);
    return taken;
  }, [points, gaps, view]);
  const { selection } = emphasis;
  const tags = useMemo(
    () => (tagsShown ? placeTags(setup, plan, view, widths.tag, new Set(selection), crowd) : []),
    [setup, plan, view, widths, selection, tagsShown, crowd],
  );
  const resting = useSameList(setup.parts.filter(({ id }) => !dragged.includes(id)));
  const parts = useMemo(() => (pen: Pen) => paintParts(pen, resting, view, theme), [resting, view, theme]);
  const above = useMemo(
    () => (pen: Pen) => {
      paintParts(
        pen,
        setup.parts.filter(({ id }) => dragged.includes(id)),
        view,
        theme,
      );
      paintEmphasis(pen, setup, view, theme, emphasis);
      paintTags(pen, tags, theme);
    },
    [setup, view, theme, emphasis, tags, dragged],
  );
  return { parts, tags: above };
}

/** @returns the list of before while it holds the very same items: a drag makes a new setup in every frame, out of parts that rest. */
function useSameList<Item>(list: readonly Item[]): readonly Item[] {
  const before = useRef(list);
  if (before.current.length !== list.length || list.some((item, index) => item !== before.current[index])) before.current = list;
  return before.current;
}

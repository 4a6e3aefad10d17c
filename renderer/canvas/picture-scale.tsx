import type { Plan } from "../../shared-types/plan";
import { trimmed } from "../document/number-text";
import { texts } from "../texts/texts";
import { type ColourScale, colourAt } from "./colour-scale";
import type { PictureValues } from "./picture-values";

const words = texts.canvas.scale;
const STOPS = 16;
/** Bands that a stepped picture has where no equipotentials part them. */
export const PLAIN_BANDS = 10;

/** @returns how many bands a stepped picture has: those between the equipotentials, else a plain ten. */
export const bandsOf = (plan: Plan, { quantity }: Pick<PictureValues, "quantity">): number =>
  quantity === "potential" ? plan.equipotentials.length + 1 : PLAIN_BANDS;

/** Colour stops of the bar: a smooth run, or each band with hard edges. */
function stopsOf(scale: ColourScale, bands: number | null): string {
  if (bands === null) return Array.from({ length: STOPS + 1 }, (_, index) => colourAt(scale, index / STOPS)).join(", ");
  return Array.from({ length: bands }, (_, band) => {
    const colour = colourAt(scale, (band + 0.5) / bands);
    return `${colour} ${(100 * band) / bands}% ${(100 * (band + 1)) / bands}%`;
  }).join(", ");
}

/** What the colours of the picture mean: from one end of its scale to the other, with a tick at each equipotential where it shows potential. */
export function PictureScale(props: {
  readonly plan: Plan;
  readonly shown: PictureValues;
  readonly scale: ColourScale;
  readonly steps: boolean;
}) {
  const { plan, shown, scale, steps } = props;
  const { quantity, span, open } = shown;
  const [low, high] = span;
  const unit = words.units[quantity];
  const text = (value: number): string => words.value(trimmed(value, value !== 0 && Math.abs(value) < 0.1 ? 5 : 3), unit);
  const [lowText, highText] = [text(low), open ? words.andMore(text(high)) : text(high)];
  const ticks = quantity === "potential" ? plan.equipotentials.map(({ volts }) => volts) : quantity === "difference" ? [0] : [];
  return (
    <div className="volt-scale" role="img" aria-label={words.name(words.of[quantity], lowText, highText, quantity === "difference")}>
      <span>{lowText}</span>
      <div
        className="volt-scale-bar"
        style={{ background: `linear-gradient(to right, ${stopsOf(scale, steps ? bandsOf(plan, shown) : null)})` }}
      >
        {ticks.map((value) => (
          <i key={value} style={{ left: `${(100 * (value - low)) / (high - low)}%` }} />
        ))}
      </div>
      <span>{highText}</span>
    </div>
  );
}

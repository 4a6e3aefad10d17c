import type { Plan } from "../../shared-types/plan";
import { trimmed } from "../document/number-text";
import { texts } from "../texts/texts";
import { colourAt, DARK_SCALE, LIGHT_SCALE } from "./colour-scale";

const words = texts.canvas.scale;
const STOPS = 16;

/** What the colours of the picture mean: the scale from the lowest to the highest electrode potential, with a tick at each level. */
export function VoltScale({ plan, dark }: { readonly plan: Plan; readonly dark: boolean }) {
  const scale = dark ? DARK_SCALE : LIGHT_SCALE;
  const [low, high] = plan.spanV;
  const colours = Array.from({ length: STOPS + 1 }, (_, index) => colourAt(scale, index / STOPS));
  const [lowText, highText] = [words.volts(trimmed(low, 3)), words.volts(trimmed(high, 3))];
  return (
    <div className="volt-scale" role="img" aria-label={words.potential(lowText, highText)}>
      <span>{lowText}</span>
      <div className="volt-scale-bar" style={{ background: `linear-gradient(to right, ${colours.join(", ")})` }}>
        {plan.equipotentials.map(({ volts }) => (
          <i key={volts} style={{ left: `${(100 * (volts - low)) / (high - low)}%` }} />
        ))}
      </div>
      <span>{highText}</span>
    </div>
  );
}

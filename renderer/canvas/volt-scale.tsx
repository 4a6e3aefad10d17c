import type { Plan } from "../../shared-types/plan";
import { trimmed } from "../document/number-text";
import { colourAt, DARK_SCALE, LIGHT_SCALE } from "./colour-scale";

const STOPS = 16;

/** What the colours of the picture mean: the scale from the lowest to the highest electrode potential, with a tick at each level. */
export function VoltScale({ plan, dark }: { readonly plan: Plan; readonly dark: boolean }) {
  const scale = dark ? DARK_SCALE : LIGHT_SCALE;
  const [low, high] = plan.spanV;
  const colours = Array.from({ length: STOPS + 1 }, (_, index) => colourAt(scale, index / STOPS));
  const [lowText, highText] = [`${trimmed(low, 3)} V`, `${trimmed(high, 3)} V`];
  return (
    <div className="volt-scale" role="img" aria-label={`Colours of potential, from ${lowText} to ${highText}, lighter is higher`}>
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

import type { Shape } from "../../shared-types/setup";
import { boundsOf, chainOf, outlineOf } from "../engine/geometry/outline";

/** A small picture of a shape, drawn from its exact outline. */
export function PartPicture({
  shape,
  sizePx = 44,
  plate = false,
}: {
  readonly shape: Shape;
  readonly sizePx?: number;
  readonly plate?: boolean;
}) {
  const loops = outlineOf({ id: "", xMm: 0, yMm: 0, turnDeg: 0, shape });
  const [left, bottom, right, top] = boundsOf(loops);
  const span = Math.max(right - left, top - bottom) * 1.1;
  const x0 = (left + right - span) / 2;
  const y0 = (bottom + top - span) / 2;
  const path = loops
    .map(
      (loop) =>
        `M${chainOf(loop, span / 400)
          .map(([x, y]) => `${((x - x0) / span) * sizePx} ${(1 - (y - y0) / span) * sizePx}`)
          .join("L")}Z`,
    )
    .join("");
  return (
    <svg
      className={plate ? "part-picture plate" : "part-picture"}
      viewBox={`0 0 ${sizePx} ${sizePx}`}
      width={sizePx}
      height={sizePx}
      aria-hidden="true"
    >
      <path d={path} fillRule="evenodd" />
    </svg>
  );
}

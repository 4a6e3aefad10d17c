import type { Shape } from "../../shared-types/setup";
import { boundsOf, chainOf, outlineOf } from "../engine/geometry/outline";

export interface PartPictureProps {
  readonly shape: Shape;
  readonly turnDeg?: number;
  readonly sizePx?: number;
  /** A plate on the bed: only its edge, dashed. */
  readonly plate?: boolean;
  /** Not metal: only its edge. */
  readonly hollow?: boolean;
}

/** A small picture of a shape, drawn from its exact outline. */
export function PartPicture({ shape, turnDeg = 0, sizePx = 40, plate = false, hollow = false }: PartPictureProps) {
  const loops = outlineOf({ id: "", xMm: 0, yMm: 0, turnDeg, shape });
  const [left, bottom, right, top] = boundsOf(loops);
  const span = Math.max(right - left, top - bottom) * 1.12;
  const x0 = (left + right - span) / 2;
  const y0 = (bottom + top - span) / 2;
  const path = loops
    .map(
      (loop) =>
        `M${chainOf(loop, span / 400)
          .map(([x, y]) => `${(((x - x0) / span) * sizePx).toFixed(2)} ${((1 - (y - y0) / span) * sizePx).toFixed(2)}`)
          .join("L")}Z`,
    )
    .join("");
  return (
    <svg
      className={`part-picture${plate ? " plate" : hollow ? " hollow" : ""}`}
      viewBox={`0 0 ${sizePx} ${sizePx}`}
      width={sizePx}
      height={sizePx}
      aria-hidden="true"
    >
      <path d={path} fillRule="evenodd" />
    </svg>
  );
}

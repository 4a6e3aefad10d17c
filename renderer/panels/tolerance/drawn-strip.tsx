import type { DrawnPoint, PointBand } from "../../../shared-types/tolerance";

const WIDTH = 120;
const HEIGHT = 18;
/** The strip reaches this many linear bands to each side. */
const REACH = 1.4;

/** One point's two answers on one line: the linear band as a frame, the drawn 95 % interval as a bar in it, its mean as a tick. */
export function DrawnStrip({ band, drawn }: { readonly band: PointBand; readonly drawn: DrawnPoint }) {
  const { volts, bandV } = band;
  const along = (at: number): number => Math.min(WIDTH, Math.max(0, (WIDTH * ((at - volts) / (REACH * bandV) + 1)) / 2));
  if (bandV === 0) return <svg className="strip" width={WIDTH} height={HEIGHT} aria-hidden="true" />;
  const [left, right] = [along(volts - bandV), along(volts + bandV)];
  const [low, high] = [along(drawn.lowVolts), along(drawn.highVolts)];
  return (
    <svg className="strip" width={WIDTH} height={HEIGHT} aria-hidden="true">
      <rect className="linear" x={left} y={1.5} width={right - left} height={HEIGHT - 3} />
      <rect className="drawn" x={low} y={6} width={high - low} height={HEIGHT - 12} />
      <line className="mean" x1={along(drawn.meanVolts)} x2={along(drawn.meanVolts)} y1={3} y2={HEIGHT - 3} />
    </svg>
  );
}

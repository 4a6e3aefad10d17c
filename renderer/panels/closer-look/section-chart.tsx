import type { FieldReading } from "../../../shared-types/plan";
import { decimalsForStep, fixed, trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";

const words = texts.closer.section;
const [WIDTH, HEIGHT] = [368, 170];
const ROOM = { left: 44, right: 10, top: 10, bottom: 34 };
const STEPS_PER_DECADE = [1, 2, 5, 10];

/** @returns a round step that parts a range into four to eight. */
export function roundStep(range: number): number {
  const rough = range / 6;
  const decade = 10 ** Math.floor(Math.log10(rough));
  return decade * (STEPS_PER_DECADE.find((step) => step * decade >= rough) ?? 10);
}

/** The round numbers within a range. */
function ticks(low: number, high: number): readonly number[] {
  const step = roundStep(high - low);
  const first = Math.ceil(low / step - 1e-9);
  const count = Math.floor(high / step + 1e-9) - first + 1;
  return Array.from({ length: Math.max(0, count) }, (_, index) => (first + index) * step);
}

/** The potential along a section: distance from A across, volts up; where there is no potential the line is broken, on metal it is thick. */
export function SectionChart(props: { readonly readings: readonly FieldReading[]; readonly lengthMm: number }) {
  const { readings, lengthMm } = props;
  const volts = readings.flatMap((reading) => (reading.volts === null || Number.isNaN(reading.volts) ? [] : [reading.volts]));
  if (volts.length === 0 || lengthMm <= 0) return null;
  const [least, most] = [Math.min(...volts), Math.max(...volts)];
  const margin = Math.max(0.05 * (most - least), 1e-6, 1e-4 * Math.abs(most));
  const [low, high] = [least - margin, most + margin];
  const xOf = (mm: number): number => ROOM.left + (mm / lengthMm) * (WIDTH - ROOM.left - ROOM.right);
  const yOf = (value: number): number => HEIGHT - ROOM.bottom - ((value - low) / (high - low)) * (HEIGHT - ROOM.top - ROOM.bottom);
  const mmOf = (index: number): number => (index / (readings.length - 1)) * lengthMm;
  const path = (wanted: (reading: FieldReading) => boolean): string => {
    let open = false;
    return readings
      .map((reading, index) => {
        const drawn = reading.volts !== null && !Number.isNaN(reading.volts) && wanted(reading);
        const start = !open;
        open = drawn;
        return drawn ? `${start ? "M" : "L"}${xOf(mmOf(index)).toFixed(1)} ${yOf(reading.volts ?? 0).toFixed(1)}` : "";
      })
      .join("");
  };
  const decimals = decimalsForStep(roundStep(high - low)) - 1;
  return (
    <svg
      className="section-chart"
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      role="img"
      aria-label={words.chart(trimmed(lengthMm, 1), fixed(least, 3), fixed(most, 3))}
    >
      {ticks(low, high).map((value) => (
        <g key={value}>
          <path className="chart-line" d={`M${ROOM.left} ${yOf(value)}H${WIDTH - ROOM.right}`} />
          <text x={ROOM.left - 5} y={yOf(value) + 4} textAnchor="end">
            {fixed(value, Math.max(0, decimals))}
          </text>
        </g>
      ))}
      {ticks(0, lengthMm).map((mm) => (
        <g key={mm}>
          <path className="chart-line" d={`M${xOf(mm)} ${HEIGHT - ROOM.bottom}v4`} />
          <text x={xOf(mm)} y={HEIGHT - ROOM.bottom + 15} textAnchor="middle">
            {trimmed(mm, 1)}
          </text>
        </g>
      ))}
      <path className="chart-axis" d={`M${ROOM.left} ${ROOM.top}V${HEIGHT - ROOM.bottom}H${WIDTH - ROOM.right}`} />
      <path className="section-volts" d={path(() => true)} />
      <path className="section-metal" d={path(({ inside }) => inside !== null)} />
      <text x={6} y={ROOM.top + 4}>
        V
      </text>
      <text x={WIDTH - ROOM.right} y={HEIGHT - 4} textAnchor="end">
        {words.along}
      </text>
    </svg>
  );
}

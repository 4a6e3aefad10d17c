import { type KeyboardEvent, type PointerEvent, useId, useRef } from "react";
import type { AlternatingInterface, Estimate, SharePoint } from "../../../shared-types/bench";
import { texts } from "../../texts/texts";
import type { Gesture } from "./region-chart";
import { useWidth } from "./use-width";

const words = texts.bench.frequency;

const FIRST_WIDTH = 400;
const HEIGHT = 190;
const MARGIN = { left: 46, right: 14 };
/** Upper edge and height of the drawn field, px. */
const TOP = 10;
const FIELD_HEIGHT = 144;
const LOWEST_HZ = 1;
const HIGHEST_HZ = 1e5;
const LOWEST_SHARE = 1e-4;
const DECADES_HZ = [1, 10, 100, 1000, 10_000, 100_000];
const DECADES_SHARE = [1e-4, 1e-3, 1e-2, 1e-1, 1];
/** The share above which a finding speaks. */
const NAMED_SHARE = 0.02;

const shareOfHz = (hz: number): number => Math.log(hz / LOWEST_HZ) / Math.log(HIGHEST_HZ / LOWEST_HZ);
const hzOfShare = (share: number): number => LOWEST_HZ * (HIGHEST_HZ / LOWEST_HZ) ** share;
const yOfShare = (share: number): number =>
  TOP + (Math.log(Math.min(1, Math.max(LOWEST_SHARE, share))) / Math.log(LOWEST_SHARE)) * FIELD_HEIGHT;

/** Two digits are enough for a frequency that a hand sets. */
const rounded = (hz: number): number => Number(Math.min(HIGHEST_HZ, Math.max(LOWEST_HZ, hz)).toPrecision(2));
const hzText = (hz: number): string => (hz >= 1000 ? `${hz / 1000} kHz` : `${hz} Hz`);
const percentText = (share: number): string => `${Number((share * 100).toPrecision(2))} %`;

export interface FrequencyChartProps {
  readonly surface: AlternatingInterface;
  readonly meterLowHz: number;
  readonly meterHighHz: number;
  readonly onChoose: (frequencyHz: number, gesture: Gesture) => void;
}

/** The share of the volts lost at the electrodes' surfaces along frequency: estimate and its spread, the meter's range shaded. */
export function FrequencyChart({ surface, meterLowHz, meterHighHz, onChoose }: FrequencyChartProps) {
  const id = useId();
  const svg = useRef<SVGSVGElement>(null);
  const figure = useRef<HTMLElement>(null);
  const chartWidth = useWidth(figure, FIRST_WIDTH);
  const width = chartWidth - MARGIN.left - MARGIN.right;
  const xOfHz = (hz: number): number => MARGIN.left + shareOfHz(hz) * width;
  const hzOfX = (x: number): number => hzOfShare((x - MARGIN.left) / width);
  const curve = (points: readonly SharePoint[], end: keyof Estimate): string[] =>
    points.map((point) => `${xOfHz(point.frequencyHz).toFixed(1)} ${yOfShare(point.share[end]).toFixed(1)}`);
  const dragging = useRef(false);
  const { alongFrequency, frequencyHz, shareLost } = surface;
  const low = xOfHz(Math.max(LOWEST_HZ, meterLowHz));
  const high = xOfHz(Math.min(HIGHEST_HZ, Math.max(LOWEST_HZ, meterHighHz)));
  const bottom = TOP + FIELD_HEIGHT;

  const place = (event: PointerEvent<SVGElement>): number | null => {
    const matrix = svg.current?.getScreenCTM();
    return matrix ? rounded(hzOfX(new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse()).x)) : null;
  };
  const onPointerDown = (event: PointerEvent<SVGElement>): void => {
    event.currentTarget.setPointerCapture(event.pointerId);
    dragging.current = true;
    onChoose(frequencyHz, "start");
  };
  const onPointer = (event: PointerEvent<SVGElement>, gesture: "move" | "end"): void => {
    if (!dragging.current) return;
    dragging.current = gesture === "move";
    onChoose(place(event) ?? frequencyHz, gesture);
  };
  const onKeyDown = (event: KeyboardEvent<SVGElement>): void => {
    const factor = { ArrowLeft: 1 / 1.1, ArrowRight: 1.1, PageDown: 0.5, PageUp: 2 }[event.key];
    if (factor === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    onChoose(rounded(frequencyHz * factor), "key");
  };

  const band = `M${[...curve(alongFrequency, "high"), ...curve(alongFrequency, "low").reverse()].join("L")}Z`;
  const x = xOfHz(Math.min(HIGHEST_HZ, Math.max(LOWEST_HZ, frequencyHz)));
  const text = words.dotValue(hzText(frequencyHz), percentText(shareLost.typical));
  return (
    <figure ref={figure} aria-label={words.figure}>
      <svg ref={svg} className="bench-chart" viewBox={`0 0 ${chartWidth} ${HEIGHT}`} role="presentation">
        <defs>
          <clipPath id={`${id}-clip`}>
            <rect x={MARGIN.left} y={TOP} width={width} height={FIELD_HEIGHT} />
          </clipPath>
        </defs>
        <rect className="bench-chart-ground" x={MARGIN.left} y={TOP} width={width} height={FIELD_HEIGHT} />
        <rect className="bench-chart-meter" x={low} y={TOP} width={Math.max(0, high - low)} height={FIELD_HEIGHT} />
        <text className="bench-chart-name" x={(low + high) / 2} y={TOP + 13} textAnchor="middle">
          {words.meter}
        </text>
        <g clipPath={`url(#${id}-clip)`}>
          <path className="bench-chart-spread" d={band} />
          <path className="bench-chart-curve" d={`M${curve(alongFrequency, "typical").join("L")}`} />
          <line
            className="bench-chart-edge"
            x1={MARGIN.left}
            x2={MARGIN.left + width}
            y1={yOfShare(NAMED_SHARE)}
            y2={yOfShare(NAMED_SHARE)}
          />
        </g>
        <text className="bench-chart-name" x={MARGIN.left + width - 6} y={yOfShare(NAMED_SHARE) - 4} textAnchor="end">
          {percentText(NAMED_SHARE)}
        </text>
        <g className="bench-chart-axes">
          <path d={`M${MARGIN.left} ${TOP}V${bottom}H${MARGIN.left + width}`} />
          {DECADES_HZ.map((hz) => (
            <g key={hz}>
              <line x1={xOfHz(hz)} y1={bottom} x2={xOfHz(hz)} y2={bottom + 4} />
              <text x={xOfHz(hz)} y={bottom + 15} textAnchor="middle">
                {hz >= 1000 ? `${hz / 1000}k` : hz}
              </text>
            </g>
          ))}
          {DECADES_SHARE.map((share) => (
            <g key={share}>
              <line x1={MARGIN.left - 4} y1={yOfShare(share)} x2={MARGIN.left} y2={yOfShare(share)} />
              <text x={MARGIN.left - 7} y={yOfShare(share) + 4} textAnchor="end">
                {percentText(share)}
              </text>
            </g>
          ))}
          <text className="bench-chart-axis" x={MARGIN.left + width} y={bottom + 30} textAnchor="end">
            {words.axis}
          </text>
        </g>
        <g
          className={shareLost.typical > NAMED_SHARE ? "bench-chart-dot bench-chart-dot-forbidden" : "bench-chart-dot"}
          role="slider"
          tabIndex={0}
          aria-label={words.dot}
          aria-valuemin={LOWEST_HZ}
          aria-valuemax={HIGHEST_HZ}
          aria-valuenow={frequencyHz}
          aria-valuetext={text}
          transform={`translate(${x} ${yOfShare(shareLost.typical)})`}
          onPointerDown={onPointerDown}
          onPointerMove={(event) => onPointer(event, "move")}
          onPointerUp={(event) => onPointer(event, "end")}
          onPointerCancel={(event) => onPointer(event, "end")}
          onKeyDown={onKeyDown}
        >
          <title>{text}</title>
          <circle className="bench-chart-grip" r="16" />
          <circle className="bench-chart-ring" r="7.5" />
          <circle className="bench-chart-core" r="3" />
        </g>
      </svg>
    </figure>
  );
}

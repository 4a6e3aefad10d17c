import { type KeyboardEvent, type PointerEvent, useId, useRef } from "react";
import type { OperatingRegion } from "../../../shared-types/bench";
import { texts } from "../../texts/texts";
import { edgeLabels, edgePoints } from "./edge-labels";
import {
  allowsSetting,
  axisTicks,
  type ChartFrame,
  chartEnds,
  depthOfX,
  regionPath,
  voltsOfY,
  xOfDepth,
  yOfVolts,
} from "./region-geometry";
import { useWidth } from "./use-width";

const words = texts.bench.chart;

const FIRST_WIDTH = 400;
const heightFor = (width: number): number => Math.round(Math.min(380, Math.max(260, 0.72 * width)));
const MARGIN = { left: 42, right: 10, top: 10, bottom: 36 };
const LEAST_DEPTH_MM = 0.5;
const LEAST_VOLTS = 0.1;
const DEPTH_STEP_MM = 0.5;
const VOLTS_STEP = 0.1;
/** A dot let go so near to the suggestion takes it, in units of the drawing. */
const CATCHES_WITHIN = 8;
/** Steps that a key with Shift makes. */
const LEAPS = 5;

export type Gesture = "start" | "move" | "end" | "key";

export interface RegionChartProps {
  readonly region: OperatingRegion;
  readonly depthMm: number;
  readonly volts: number;
  readonly waveform: "ac" | "dc";
  /** Another setting chosen by hand; a drag is `start`, many `move`s and `end`, a key is `key`. */
  readonly onChoose: (depthMm: number, volts: number, gesture: Gesture) => void;
}

const snapped = (value: number, step: number, least: number): number => Number(Math.max(least, Math.round(value / step) * step).toFixed(6));

/**
 * Water depth against supply voltage: what the rules allow, each edge named, the present setting as a dot for hand or keys,
 * the suggestion as a diamond. What is forbidden is hatched, so that the picture needs no colour.
 */
export function RegionChart({ region, depthMm, volts, waveform, onChoose }: RegionChartProps) {
  const id = useId();
  const svg = useRef<SVGSVGElement>(null);
  const figure = useRef<HTMLElement>(null);
  const chartWidth = useWidth(figure, FIRST_WIDTH);
  const chartHeight = heightFor(chartWidth);
  const dragging = useRef<ChartFrame | null>(null);
  // While a hand drags the dot the axes stand still under it.
  const frame: ChartFrame = dragging.current ?? {
    left: MARGIN.left,
    top: MARGIN.top,
    width: chartWidth - MARGIN.left - MARGIN.right,
    height: chartHeight - MARGIN.top - MARGIN.bottom,
    ...chartEnds(region, [depthMm, volts]),
  };
  const allowed = allowsSetting(region, depthMm, volts);
  const x = xOfDepth(frame, depthMm);
  const y = yOfVolts(frame, volts);

  const place = (event: PointerEvent<SVGElement>): readonly [number, number] | null => {
    const matrix = svg.current?.getScreenCTM();
    if (!matrix) return null;
    const point = new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse());
    const { suggestion } = region;
    if (suggestion !== null) {
      const away = Math.hypot(point.x - xOfDepth(frame, suggestion[0]), point.y - yOfVolts(frame, suggestion[1]));
      if (away < CATCHES_WITHIN) return suggestion;
    }
    const depth = Math.min(frame.depthEndMm, depthOfX(frame, point.x));
    const height = Math.min(frame.voltsEnd, voltsOfY(frame, point.y));
    return [snapped(depth, DEPTH_STEP_MM, LEAST_DEPTH_MM), snapped(height, VOLTS_STEP, LEAST_VOLTS)];
  };

  const onPointerDown = (event: PointerEvent<SVGElement>): void => {
    event.currentTarget.setPointerCapture(event.pointerId);
    dragging.current = frame;
    onChoose(depthMm, volts, "start");
  };
  const onPointerMove = (event: PointerEvent<SVGElement>): void => {
    if (dragging.current === null) return;
    const chosen = place(event);
    if (chosen !== null) onChoose(...chosen, "move");
  };
  const onPointerUp = (event: PointerEvent<SVGElement>): void => {
    if (dragging.current === null) return;
    const chosen = place(event) ?? [depthMm, volts];
    dragging.current = null;
    onChoose(...chosen, "end");
  };
  const onKeyDown = (event: KeyboardEvent<SVGElement>): void => {
    const leap = event.shiftKey ? LEAPS : 1;
    const moves: Record<string, readonly [number, number]> = {
      ArrowLeft: [-DEPTH_STEP_MM * leap, 0],
      ArrowRight: [DEPTH_STEP_MM * leap, 0],
      ArrowUp: [0, VOLTS_STEP * leap],
      ArrowDown: [0, -VOLTS_STEP * leap],
    };
    const move = moves[event.key];
    if (move === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    onChoose(snapped(depthMm + move[0], DEPTH_STEP_MM, LEAST_DEPTH_MM), snapped(volts + move[1], VOLTS_STEP, LEAST_VOLTS), "key");
  };

  const { left, top, width, height } = frame;
  return (
    <figure ref={figure} aria-label={words.figure}>
      <svg ref={svg} className="bench-chart" viewBox={`0 0 ${chartWidth} ${chartHeight}`} role="presentation">
        <defs>
          <pattern id={`${id}-hatch`} width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <line className="bench-chart-hatch" x1="0" y1="0" x2="0" y2="7" />
          </pattern>
          <clipPath id={`${id}-clip`}>
            <rect x={left} y={top} width={width} height={height} />
          </clipPath>
        </defs>
        <rect className="bench-chart-ground" x={left} y={top} width={width} height={height} />
        <rect x={left} y={top} width={width} height={height} fill={`url(#${id}-hatch)`} />
        <g clipPath={`url(#${id}-clip)`}>
          <path className="bench-chart-allowed" d={regionPath(frame, region)} />
          {region.boundaries.map((boundary) => (
            <polyline
              key={boundary.rule}
              className={`bench-chart-edge bench-chart-edge-${boundary.forbids}`}
              points={edgePoints(frame, boundary)}
            />
          ))}
        </g>
        <CoarseDigits frame={frame} region={region} />
        <Axes frame={frame} waveform={waveform} />
        <g clipPath={`url(#${id}-clip)`}>
          <line className="bench-chart-cross" x1={x} y1={y} x2={x} y2={top + height} />
          <line className="bench-chart-cross" x1={left} y1={y} x2={x} y2={y} />
        </g>
        {edgeLabels(frame, region).map((label) => (
          <text
            key={label.rule}
            className="bench-chart-name"
            x={label.x}
            y={label.y}
            textAnchor="end"
            transform={label.upright ? `rotate(-90 ${label.x} ${label.y})` : undefined}
          >
            {label.text}
          </text>
        ))}
        {region.suggestion !== null && (
          <path
            className="bench-chart-suggestion"
            d="M0-8L8 0L0 8L-8 0Z"
            transform={`translate(${xOfDepth(frame, region.suggestion[0])} ${yOfVolts(frame, region.suggestion[1])})`}
          >
            <title>{words.suggestion(String(region.suggestion[0]), String(region.suggestion[1]))}</title>
          </path>
        )}
        <g
          className={allowed ? "bench-chart-dot" : "bench-chart-dot bench-chart-dot-forbidden"}
          role="slider"
          tabIndex={0}
          aria-label={words.dot}
          aria-valuemin={0}
          aria-valuemax={frame.voltsEnd}
          aria-valuenow={volts}
          aria-valuetext={words.dotValue(String(depthMm), String(volts), allowed)}
          transform={`translate(${x} ${y})`}
          onPointerDown={onPointerDown}
          onPointerMove={onPointerMove}
          onPointerUp={onPointerUp}
          onPointerCancel={onPointerUp}
          onKeyDown={onKeyDown}
        >
          <circle className="bench-chart-grip" r="16" />
          <circle className="bench-chart-ring" r="7.5" />
          {allowed ? (
            <circle className="bench-chart-core" r="3" />
          ) : (
            <path className="bench-chart-no" d="M-3.5-3.5L3.5 3.5M3.5-3.5L-3.5 3.5" />
          )}
        </g>
      </svg>
    </figure>
  );
}

/** Just above a change of the meter's range a digit is too coarse: the bands above the lowest readable volts. */
function CoarseDigits({ frame, region }: { readonly frame: ChartFrame; readonly region: OperatingRegion }) {
  const right = frame.left + frame.width;
  const bands = region.unreadableVolts.filter(([low]) => low > 0 && low < frame.voltsEnd);
  return bands.map(([low, high]) => {
    const bottom = yOfVolts(frame, low);
    const top = yOfVolts(frame, Math.min(high, frame.voltsEnd));
    return (
      <g key={low}>
        <line className="bench-chart-edge bench-chart-edge-below" x1={frame.left} x2={right} y1={bottom} y2={bottom} />
        {high < frame.voltsEnd && <line className="bench-chart-edge bench-chart-edge-below" x1={frame.left} x2={right} y1={top} y2={top} />}
        {bottom - top >= 14 && (
          <text className="bench-chart-name" x={right - 6} y={bottom - 4} textAnchor="end">
            {words.coarseDigit}
          </text>
        )}
      </g>
    );
  });
}

function Axes({ frame, waveform }: { readonly frame: ChartFrame; readonly waveform: "ac" | "dc" }) {
  const { left, top, width, height, depthEndMm, voltsEnd } = frame;
  const bottom = top + height;
  return (
    <g className="bench-chart-axes">
      <path d={`M${left} ${top}V${bottom}H${left + width}`} />
      {axisTicks(depthEndMm, 6).map((depth) => (
        <g key={depth}>
          <line x1={xOfDepth(frame, depth)} y1={bottom} x2={xOfDepth(frame, depth)} y2={bottom + 4} />
          <text x={xOfDepth(frame, depth)} y={bottom + 15} textAnchor="middle">
            {depth}
          </text>
        </g>
      ))}
      {axisTicks(voltsEnd, 5).map((volts) => (
        <g key={volts}>
          <line x1={left - 4} y1={yOfVolts(frame, volts)} x2={left} y2={yOfVolts(frame, volts)} />
          <text x={left - 7} y={yOfVolts(frame, volts) + 4} textAnchor="end">
            {volts}
          </text>
        </g>
      ))}
      <text className="bench-chart-axis" x={left + width} y={bottom + 31} textAnchor="end">
        {words.depthAxis}
      </text>
      <text className="bench-chart-axis" x={12} y={top + 2} textAnchor="end" transform={`rotate(-90 12 ${top + 2})`}>
        {words.voltsAxis(waveform)}
      </text>
    </g>
  );
}

import { area, line, type ScaleContinuousNumeric } from "d3";
import type { ReactElement } from "react";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { arrowPath, boxPath, markPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS, type MarkShape } from "../theme.ts";
import { ColumnGround } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";

/** From a value to points across the column, from its left edge. */
export type ValueScale = ScaleContinuousNumeric<number, number>;

export interface ValuePoint {
  readonly heightM: number;
  readonly value: number;
  /** Ends of the error bar. */
  readonly low?: number;
  readonly high?: number;
  /** The value is a limit: the truth lies below, or above. */
  readonly censored?: "below" | "above";
  readonly isAnomaly?: boolean;
  readonly isSetAside?: boolean;
}

export interface CurvePoint {
  readonly heightM: number;
  readonly value: number;
  readonly low?: number;
  readonly high?: number;
}

interface ValueColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly scale: ValueScale;
  readonly title: string;
  readonly unit: string;
  readonly points: readonly ValuePoint[];
  /** Values the background reaches from and to. */
  readonly background?: readonly [low: number, high: number];
  /** A fitted curve with its band, in rust. */
  readonly curve?: readonly CurvePoint[];
  /** Several of them, each with its own ends. */
  readonly curves?: readonly (readonly CurvePoint[])[];
  /** Join the points from below upward, in ink. */
  readonly isJoined?: boolean;
  readonly shape?: MarkShape;
  readonly tickLabels?: readonly { readonly value: number; readonly label: string }[];
}

/** Measured values against height: background as a band, limits as soft arrows, anomalies and the fitted curve in rust. */
export function ValueColumn(props: ValueColumnProps): ReactElement {
  const { x, width, y, scale, title, unit, background, curve = [], curves = [], tickLabels } = props;
  const { top } = spanOf(y);
  return (
    <g>
      <ColumnHead x={x} top={top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} scale={scale} {...(tickLabels ? { tickLabels } : {})}>
        {background && <BackgroundBand x={x} y={y} scale={scale} ends={background} />}
      </ColumnGround>
      {[curve, ...curves].map(
        (points) =>
          points.length > 0 && (
            <FittedCurve key={points[0]?.heightM} x={x} y={y} scale={scale} curve={points} />
          ),
      )}
      <ValueMarks {...props} />
    </g>
  );
}

interface BandProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly scale: ValueScale;
  readonly ends: readonly [number, number];
}

function BackgroundBand({ x, y, scale, ends }: BandProps): ReactElement {
  const { top, bottom } = spanOf(y);
  const [left, right] = [scale(ends[0]), scale(ends[1])];
  return <path d={boxPath(x + left, top, right - left, bottom - top)} fill={COLOURS.band} />;
}

interface FittedCurveProps {
  readonly x: number;
  readonly y: HeightScale;
  readonly scale: ValueScale;
  readonly curve: readonly CurvePoint[];
}

function FittedCurve({ x, y, scale, curve }: FittedCurveProps): ReactElement {
  const shown = curve.filter((point) => isInFrame(y, point.heightM));
  const band = area<CurvePoint>()
    .y((point) => y(point.heightM))
    .x0((point) => x + scale(point.low ?? point.value))
    .x1((point) => x + scale(point.high ?? point.value));
  const middle = line<CurvePoint>(
    (point) => x + scale(point.value),
    (point) => y(point.heightM),
  );
  return (
    <>
      <path d={band(shown) ?? ""} fill={COLOURS.rust} opacity={0.16} />
      <path d={middle(shown) ?? ""} fill="none" stroke={COLOURS.rust} strokeWidth={0.9} />
    </>
  );
}

const ARROW = 5.5;
const RADIUS = 1.25;

function ValueMarks({ x, y, scale, points, isJoined, shape = "circle" }: ValueColumnProps): ReactElement {
  const shown = points.filter((point) => isInFrame(y, point.heightM));
  const full = shown.filter((point) => point.censored === undefined && point.isSetAside !== true);
  const marks = (list: readonly ValuePoint[]) =>
    list.map((point) => markPath(shape, x + scale(point.value), y(point.heightM), RADIUS)).join("");
  const joined = line<ValuePoint>(
    (point) => x + scale(point.value),
    (point) => y(point.heightM),
  );
  const plain = full.filter((point) => point.isAnomaly !== true);
  const anomalies = full.filter((point) => point.isAnomaly === true);
  const open = shown.filter((point) => point.isSetAside === true);
  return (
    <>
      {isJoined && <path d={joined(full) ?? ""} fill="none" stroke={COLOURS.ink} strokeWidth={0.6} />}
      <MarkLines d={errorBars(full, x, { y, scale })} colour={COLOURS.ink} />
      <MarkLines d={limitArrows(shown, x, { y, scale })} colour={COLOURS.soft} />
      {plain.length > 0 && !isJoined && <path d={marks(plain)} fill={COLOURS.ink} />}
      {anomalies.length > 0 && <path d={marks(anomalies)} fill={COLOURS.rust} />}
      {open.length > 0 && (
        <path d={marks(open)} fill={COLOURS.paper} stroke={COLOURS.soft} strokeWidth={0.5} />
      )}
    </>
  );
}

function MarkLines({ d, colour }: { readonly d: string; readonly colour: string }): ReactElement | null {
  return d === "" ? null : <path d={d} fill="none" stroke={colour} strokeWidth={0.5} />;
}

interface Scales {
  readonly y: HeightScale;
  readonly scale: ValueScale;
}

function errorBars(points: readonly ValuePoint[], x: number, { y, scale }: Scales): string {
  return points
    .filter(({ low, high }) => low !== undefined || high !== undefined)
    .map(({ heightM, value, low = value, high = value }) => {
      return `M${round(x + scale(low))} ${round(y(heightM))}H${round(x + scale(high))}`;
    })
    .join("");
}

function limitArrows(points: readonly ValuePoint[], x: number, { y, scale }: Scales): string {
  return points
    .filter(({ censored }) => censored !== undefined)
    .map(({ heightM, value, censored }) =>
      arrowPath(x + scale(value), y(heightM), censored === "below" ? -ARROW : ARROW),
    )
    .join("");
}

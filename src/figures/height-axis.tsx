import { extent, range, tickFormat, tickStep, ticks } from "d3";
import type { ReactElement } from "react";
import { type HeightScale, spanOf } from "./height-scale.ts";
import { round } from "./numbers.ts";
import { PlateText } from "./plate-text.tsx";
import { capHeight, textWidth } from "./text.ts";
import { COLOURS, TEXT } from "./theme.ts";

/** How the axis reads: own height or depth in its own unit, or metres from a horizon. */
export interface AxisReading {
  readonly unit: string;
  readonly metresPerUnit: number;
  /** Height in metres where the axis reads 0. */
  readonly zeroM: number;
  /** A depth axis reads more downward. */
  readonly direction: "height" | "depth";
  /** Write a plus sign before what lies above 0: for distances from a horizon. */
  readonly signed?: boolean;
}

export function readingAt({ metresPerUnit, zeroM, direction }: AxisReading, heightM: number): number {
  const distance = (heightM - zeroM) / metresPerUnit;
  return (direction === "depth" ? -distance : distance) + 0;
}

function heightOf({ metresPerUnit, zeroM, direction }: AxisReading, reading: number): number {
  return zeroM + (direction === "depth" ? -reading : reading) * metresPerUnit;
}

export interface AxisTick {
  readonly y: number;
  readonly label: string;
}

const POINTS_PER_TICK = 30;
const MINUS = "−";

export interface AxisTicks {
  readonly labelled: readonly AxisTick[];
  /** The unlabelled ones halfway between. */
  readonly between: readonly number[];
}

/** Round readings along the axis; a lens has its own finer ones. */
export function axisTicks(y: HeightScale, reading: AxisReading): AxisTicks {
  const heights = y.domain();
  const pieces = heights
    .slice(1)
    .map((heightM, i) => pieceTicks(y, reading, [heights[i] ?? heightM, heightM]));
  const labelled = new Map(pieces.flatMap((piece) => piece.labelled).map((tick) => [round(tick.y), tick]));
  return { labelled: [...labelled.values()], between: pieces.flatMap((piece) => piece.between) };
}

function pieceTicks(
  y: HeightScale,
  reading: AxisReading,
  [baseM, topM]: readonly [number, number],
): AxisTicks {
  const [from, to] = extent([readingAt(reading, baseM), readingAt(reading, topM)]);
  if (from === undefined || to === undefined || !(to > from)) return { labelled: [], between: [] };
  const count = Math.max(1, Math.round(Math.abs(y(topM) - y(baseM)) / POINTS_PER_TICK));
  const values = ticks(from, to, count);
  const format = tickFormat(from, to, count);
  const step = tickStep(from, to, count);
  const first = (values[0] ?? from) - step / 2;
  const halves = range(values.length + 1).map((i) => first + i * step);
  const at = (value: number) => y(heightOf(reading, value));
  return {
    labelled: values.map((value) => ({
      y: at(value),
      label: signedLabel(value, format(value), reading.signed === true),
    })),
    between: halves.filter((value) => value >= from && value <= to).map(at),
  };
}

function signedLabel(value: number, text: string, isSigned: boolean): string {
  return `${isSigned && value > 0 ? "+" : ""}${text.replace(/^[-−]/, MINUS)}`;
}

interface HeightAxisProps {
  /** The axis line; ticks and labels stand to its left. */
  readonly x: number;
  readonly y: HeightScale;
  readonly reading: AxisReading;
  /** A second axis, which stands back. */
  readonly isQuiet?: boolean;
}

const TICK = 4;

/** Width of an axis with its labels, left of its line, in points. */
export function heightAxisWidth(y: HeightScale, reading: AxisReading): number {
  const labels = [reading.unit, ...axisTicks(y, reading).labelled.map((tick) => tick.label)];
  return TICK + 2 + Math.max(...labels.map((label) => textWidth(label, TEXT.unit)));
}

export function HeightAxis({ x, y, reading, isQuiet = false }: HeightAxisProps): ReactElement {
  const colour = isQuiet ? COLOURS.soft : COLOURS.ink;
  const { top, bottom } = spanOf(y);
  const { labelled, between } = axisTicks(y, reading);
  const long = labelled.map((tick) => `M${round(x - TICK)} ${round(tick.y)}h${TICK}`).join("");
  const short = between.map((tickY) => `M${round(x - TICK / 2)} ${round(tickY)}h${TICK / 2}`).join("");
  const lift = capHeight(TEXT.unit) / 2;
  return (
    <g>
      <path
        d={`M${round(x)} ${round(top)}V${round(bottom)}${long}${short}`}
        fill="none"
        stroke={colour}
        strokeWidth={isQuiet ? 0.35 : 0.5}
      />
      {labelled.map((tick) => (
        <PlateText
          key={round(tick.y)}
          x={x - TICK - 2}
          y={tick.y + lift}
          style={TEXT.unit}
          anchor="end"
          colour={colour}
        >
          {tick.label}
        </PlateText>
      ))}
      <PlateText x={x - TICK - 2} y={top - 8} style={TEXT.unit} anchor="end" colour={COLOURS.soft}>
        {reading.unit}
      </PlateText>
    </g>
  );
}

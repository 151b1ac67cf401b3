import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, spanOf } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { COLOURS } from "../theme.ts";
import { ColumnGround, type ValueTick } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";
import type { ValueScale } from "./value-column.tsx";

export interface CountBar {
  readonly baseM: number;
  readonly topM: number;
  readonly value: number;
}

interface CountColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly scale: ValueScale;
  readonly title: string;
  readonly unit: string;
  readonly bars: readonly CountBar[];
  readonly tickLabels?: readonly ValueTick[];
}

const THINNEST_BAR = 0.8;

/** Counts or amounts per sample, as bars over the rock each sample took. */
export function CountColumn({
  x,
  width,
  y,
  scale,
  title,
  unit,
  bars,
  tickLabels,
}: CountColumnProps): ReactElement {
  const zero = scale(0);
  const path = bars.flatMap(({ baseM, topM, value }) => {
    const span = clippedSpan(y, baseM, topM);
    if (span === undefined || value === 0) return [];
    const height = Math.max(THINNEST_BAR, span.bottom - span.top);
    return [boxPath(x + zero, (span.top + span.bottom - height) / 2, scale(value) - zero, height)];
  });
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} scale={scale} {...(tickLabels ? { tickLabels } : {})} />
      {path.length > 0 && <path d={path.join("")} fill={COLOURS.ink} opacity={0.75} />}
    </g>
  );
}

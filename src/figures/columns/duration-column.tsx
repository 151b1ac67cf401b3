import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, spanOf } from "../height-scale.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { ColumnHead } from "./column-head.tsx";

interface DurationColumnProps {
  readonly x: number;
  readonly y: HeightScale;
  /** The level both lengths hang from: the highest last find. */
  readonly fromM: number;
  readonly leastM?: number;
  readonly mostM?: number;
}

const HALF = 3.5;
const LANE = 12;
export const DURATION_WIDTH = 2 * LANE;

/** Least and most height between the first and the last disappearance, as upright brackets below the highest last find. */
export function DurationColumn({ x, y, fromM, leastM, mostM }: DurationColumnProps): ReactElement {
  const bracket = (lane: number, lengthM: number | undefined) =>
    lengthM === undefined ? "" : bracketPath(x + (lane + 0.5) * LANE, y, { fromM, lengthM });
  const [least, most] = [bracket(0, leastM), bracket(1, mostM)];
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title="Duration" unit="least, most" />
      {least !== "" && <path d={least} fill="none" stroke={COLOURS.ink} strokeWidth={1} />}
      {most !== "" && (
        <path d={most} fill="none" stroke={COLOURS.ink} strokeWidth={0.6} strokeDasharray="2 1.2" />
      )}
    </g>
  );
}

/** A foot only where the length ends inside the frame; an arrow where it goes on below. */
function bracketPath(
  x: number,
  y: HeightScale,
  { fromM, lengthM }: { readonly fromM: number; readonly lengthM: number },
): string {
  const span = clippedSpan(y, fromM - lengthM, fromM);
  if (span === undefined) return "";
  const isCut = fromM - lengthM < Math.min(...y.domain());
  const foot = isCut
    ? `M${round(x - 2.2)} ${round(span.bottom - 3)}L${round(x)} ${round(span.bottom)}L${round(x + 2.2)} ${round(span.bottom - 3)}`
    : `M${round(x - HALF)} ${round(span.bottom)}h${2 * HALF}`;
  return `M${round(x - HALF)} ${round(span.top)}h${2 * HALF}M${round(x)} ${round(span.top)}V${round(span.bottom)}${foot}`;
}

import { area, line, max } from "d3";
import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { ColumnGround } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";

export interface DensityPoint {
  readonly heightM: number;
  readonly density: number;
}

/** A confidence set of a level; in pieces it is several parts. */
export interface LevelSet {
  readonly baseM: number;
  readonly topM: number;
}

interface DensityColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly title: string;
  readonly unit: string;
  readonly density?: readonly DensityPoint[];
  readonly sets?: readonly LevelSet[];
  /** Best level. */
  readonly pointM?: number;
}

/** What is inferred about a level: its density over height, or the set of levels that cannot be excluded. */
export function DensityColumn({
  x,
  width,
  y,
  title,
  unit,
  density = [],
  sets = [],
  pointM,
}: DensityColumnProps): ReactElement {
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} />
      {density.length > 0 && <DensityCurve x={x} width={width} y={y} density={density} />}
      {sets.length > 0 && (
        <path
          d={setPath(sets, x, { width, y })}
          fill={COLOURS.blue}
          fillOpacity={0.28}
          stroke={COLOURS.blue}
          strokeWidth={0.7}
        />
      )}
      {pointM !== undefined && isInFrame(y, pointM) && (
        <path
          d={`M${round(x)} ${round(y(pointM))}h${round(width)}`}
          stroke={COLOURS.blue}
          strokeWidth={1.3}
        />
      )}
    </g>
  );
}

interface DensityCurveProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly density: readonly DensityPoint[];
}

function DensityCurve({ x, width, y, density }: DensityCurveProps): ReactElement {
  const highest = max(density, (point) => point.density) ?? 1;
  const across = (point: DensityPoint) => x + (point.density / highest) * (width - 4);
  const shown = density.filter((point) => isInFrame(y, point.heightM));
  const filled = area<DensityPoint>()
    .y((point) => y(point.heightM))
    .x0(x)
    .x1(across);
  const edge = line<DensityPoint>(across, (point) => y(point.heightM));
  return (
    <>
      <path d={filled(shown) ?? ""} fill={COLOURS.blue} opacity={0.28} />
      <path d={edge(shown) ?? ""} fill="none" stroke={COLOURS.blue} strokeWidth={0.9} />
    </>
  );
}

const SET_INSET = 0.25;

function setPath(
  sets: readonly LevelSet[],
  x: number,
  { width, y }: { readonly width: number; readonly y: HeightScale },
): string {
  return sets
    .flatMap(({ baseM, topM }) => {
      const span = clippedSpan(y, baseM, topM);
      return span
        ? [boxPath(x + width * SET_INSET, span.top, width * (1 - 2 * SET_INSET), span.bottom - span.top)]
        : [];
    })
    .join("");
}

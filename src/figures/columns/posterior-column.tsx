import { area, max } from "d3";
import type { ReactElement } from "react";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { POSTERIOR_PAINT } from "../legend-timing-swatch.tsx";
import { round } from "../numbers.ts";
import { ColumnGround } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";

export interface LevelDensity {
  readonly heightsM: readonly number[];
  /** Per metre. */
  readonly density: readonly number[];
}

interface PosteriorColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly title: string;
  readonly unit: string;
  /** One for each level of a scenario, each to its own highest density. */
  readonly levels: readonly LevelDensity[];
}

/** Room left free beside the highest density. */
const CLEAR = 4;

/** Where the levels of a scenario may lie: the posterior density of each along the section. */
export function PosteriorColumn({ x, width, y, title, unit, levels }: PosteriorColumnProps): ReactElement {
  const shown = levels.map(({ heightsM, density }) =>
    heightsM
      .map((heightM, i) => ({ heightM, density: density[i] ?? 0 }))
      .filter(({ heightM }) => isInFrame(y, heightM)),
  );
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} />
      {shown.map((points, place) => {
        const highest = max(points, (point) => point.density) ?? 0;
        if (!(highest > 0)) return null;
        const outline = area<{ heightM: number; density: number }>()
          .y((point) => round(y(point.heightM)))
          .x0(round(x))
          .x1((point) => round(x + (point.density / highest) * (width - CLEAR)));
        return <path key={`${place}`} d={outline(points) ?? ""} {...POSTERIOR_PAINT} />;
      })}
    </g>
  );
}

import { area, curveStepBefore, line } from "d3";
import type { ReactElement } from "react";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { BAND_ALL_PAINT, BAND_EACH_PAINT, EXPECTED_PAINT, OBSERVED_PAINT } from "../legend-timing-swatch.tsx";
import { round } from "../numbers.ts";
import { ColumnGround } from "./column-ground.tsx";
import { ColumnHead } from "./column-head.tsx";
import { linearColumn } from "./value-scale.ts";

/** Last finds above a level: how many there are, and how many one common end would give. */
export interface LastsPoint {
  readonly positionM: number;
  readonly observed: number;
  readonly expected: number;
  readonly low: number;
  readonly high: number;
  readonly lowAll: number;
  readonly highAll: number;
}

interface LastFindsColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly title: string;
  readonly unit: string;
  /** From below upward. */
  readonly points: readonly LastsPoint[];
}

/** The last-occurrence curve against what one common end would give: pointwise band inside the simultaneous one. */
export function LastFindsColumn({ x, width, y, title, unit, points }: LastFindsColumnProps): ReactElement {
  const most = Math.max(1, ...points.map(({ observed, highAll }) => Math.max(observed, highAll)));
  const { scale, tickLabels } = linearColumn([0, most], width);
  const shown = points.filter(({ positionM }) => isInFrame(y, positionM));
  const at = (count: number) => round(x + scale(count));
  const down = ({ positionM }: LastsPoint) => round(y(positionM));
  const band = (low: (point: LastsPoint) => number, high: (point: LastsPoint) => number) =>
    area<LastsPoint>()
      .y(down)
      .x0((point) => at(low(point)))
      .x1((point) => at(high(point)))(shown) ?? "";
  const curve = (count: (point: LastsPoint) => number) => line<LastsPoint>((point) => at(count(point)), down);
  return (
    <g>
      <ColumnHead x={x} top={spanOf(y).top} title={title} unit={unit} />
      <ColumnGround x={x} width={width} y={y} scale={scale} tickLabels={tickLabels} />
      {shown.length > 0 && (
        <>
          <path
            d={band(
              ({ lowAll }) => lowAll,
              ({ highAll }) => highAll,
            )}
            {...BAND_ALL_PAINT}
          />
          <path
            d={band(
              ({ low }) => low,
              ({ high }) => high,
            )}
            {...BAND_EACH_PAINT}
          />
          <path d={curve(({ expected }) => expected)(shown) ?? ""} {...EXPECTED_PAINT} />
          <path
            d={curve(({ observed }) => observed).curve(curveStepBefore)(shown) ?? ""}
            {...OBSERVED_PAINT}
          />
        </>
      )}
    </g>
  );
}

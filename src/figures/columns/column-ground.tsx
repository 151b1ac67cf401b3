import type { ReactElement, ReactNode } from "react";
import { type HeightScale, spanOf } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { COLOURS, TEXT } from "../theme.ts";

export interface ValueTick {
  readonly value: number;
  readonly label: string;
}

interface ColumnGroundProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly scale?: (value: number) => number;
  /** Hair lines with their labels under the column. */
  readonly tickLabels?: readonly ValueTick[];
  /** Drawn between the ground and its hair lines. */
  readonly children?: ReactNode;
}

/** Room the labels take under a column, in points. */
export const TICK_LABEL_DEPTH = 12;

export function ColumnGround(props: ColumnGroundProps): ReactElement {
  const { x, width, y, scale, tickLabels = [], children } = props;
  const { top, bottom } = spanOf(y);
  const placed = tickLabels.map((tick) => ({ label: tick.label, x: x + (scale?.(tick.value) ?? 0) }));
  const hairs = placed.map((tick) => `M${round(tick.x)} ${round(top)}V${round(bottom)}`).join("");
  return (
    <>
      <path d={boxPath(x, top, width, bottom - top)} fill={COLOURS.column} />
      {children}
      {hairs !== "" && <path d={hairs} fill="none" stroke={COLOURS.hair} strokeWidth={0.5} />}
      {placed.map((tick) => (
        <PlateText
          key={tick.label}
          x={tick.x}
          y={bottom + 9.5}
          style={TEXT.unit}
          anchor="middle"
          colour={COLOURS.soft}
        >
          {tick.label}
        </PlateText>
      ))}
    </>
  );
}

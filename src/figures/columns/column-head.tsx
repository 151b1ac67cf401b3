import type { ReactElement } from "react";
import { PlateText } from "../plate-text.tsx";
import { textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";

interface ColumnHeadProps {
  readonly x: number;
  /** Upper edge of the column. */
  readonly top: number;
  readonly title: string;
  /** Unit and scale, in words. */
  readonly unit?: string;
}

export function ColumnHead({ x, top, title, unit }: ColumnHeadProps): ReactElement {
  return (
    <g>
      <PlateText x={x} y={top - 18} style={TEXT.heading}>
        {title}
      </PlateText>
      {unit !== undefined && unit !== "" && (
        <PlateText x={x} y={top - 8} style={TEXT.unit} colour={COLOURS.soft}>
          {unit}
        </PlateText>
      )}
    </g>
  );
}

/** Width a head needs, in points. */
export function columnHeadWidth(title: string, unit = ""): number {
  return Math.max(textWidth(title, TEXT.heading), textWidth(unit, TEXT.unit));
}

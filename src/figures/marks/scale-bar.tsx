import { tickIncrement } from "d3";
import type { ReactElement } from "react";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { capHeight } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";

/** A round length near a third of `span` (in the unit shown): 1, 2 or 5 times a power of ten. */
export function scaleBarLength(span: number): number {
  const step = tickIncrement(0, span, 3);
  return step < 0 ? -1 / step : step;
}

interface ScaleBarProps {
  readonly x: number;
  /** Its lower end. */
  readonly y: number;
  readonly length: number;
  readonly label: string;
}

/** An upright bar of known thickness, its label to the right. */
export function ScaleBar({ x, y, length, label }: ScaleBarProps): ReactElement {
  const lift = capHeight(TEXT.unit) / 2;
  return (
    <g>
      <path
        d={`M${round(x)} ${round(y)}h4m-2 0v${round(-length)}m-2 0h4`}
        fill="none"
        stroke={COLOURS.ink}
        strokeWidth={0.6}
      />
      <PlateText x={x + 7} y={y - length / 2 + lift} style={TEXT.unit}>
        {label}
      </PlateText>
    </g>
  );
}

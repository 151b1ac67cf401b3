import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame } from "../height-scale.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { boxPath } from "./mark-path.ts";

export interface HorizonMark {
  readonly label: string;
  readonly heightM: number;
  /** Interval of its position; absent where it is a sharp level. */
  readonly lowM?: number;
  readonly highM?: number;
  readonly rank: "main" | "other";
}

interface HorizonLineProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly horizon: HorizonMark;
  /** Right end of the label, default that of the line; its baseline, default just above the interval. */
  readonly labelX?: number;
  readonly labelY?: number;
}

/** A horizon across the plate: the main one in rust with the band of its interval, others dotted in ink. */
export function HorizonLine(props: HorizonLineProps): ReactElement | null {
  const { x, width, y, horizon } = props;
  const { heightM, lowM = heightM, highM = heightM, rank } = horizon;
  if (!isInFrame(y, heightM)) return null;
  const band = clippedSpan(y, lowM, highM);
  const colour = rank === "main" ? COLOURS.rust : COLOURS.ink;
  const stroke = rank === "main" ? { strokeWidth: 0.9 } : { strokeWidth: 0.6, strokeDasharray: "0.8 2" };
  return (
    <g>
      {band && highM > lowM && (
        <path
          d={boxPath(x, band.top, width, band.bottom - band.top)}
          fill={colour}
          opacity={rank === "main" ? 0.13 : 0.07}
        />
      )}
      <path d={`M${round(x)} ${round(y(heightM))}h${round(width)}`} stroke={colour} {...stroke} />
      {horizon.label !== "" && <HorizonLabel {...props} colour={colour} />}
    </g>
  );
}

function HorizonLabel(props: HorizonLineProps & { readonly colour: string }): ReactElement {
  const {
    x,
    width,
    y,
    horizon,
    labelX = x + width,
    labelY = y(horizon.highM ?? horizon.heightM) - 2.6,
    colour,
  } = props;
  const length = textWidth(horizon.label, TEXT.unit);
  return (
    <>
      <path
        d={boxPath(labelX - length - 1.5, labelY - 6, length + 3, 7.6)}
        fill={COLOURS.paper}
        opacity={0.72}
      />
      <PlateText x={labelX} y={labelY} style={TEXT.unit} anchor="end" colour={colour}>
        {horizon.label}
      </PlateText>
    </>
  );
}

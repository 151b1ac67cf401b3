import type { ReactElement } from "react";
import { fontAttributes } from "./faces.ts";
import { round } from "./numbers.ts";
import type { TextStyle } from "./text.ts";
import { COLOURS } from "./theme.ts";

interface PlateTextProps {
  readonly x: number;
  readonly y: number;
  readonly style: TextStyle;
  readonly children: string;
  readonly anchor?: "start" | "middle" | "end";
  readonly colour?: string;
  /** Degrees clockwise about the text's own beginning. */
  readonly turn?: number;
}

/** A line of text; `y` is its baseline. */
export function PlateText({ x, y, style, children, anchor, colour, turn }: PlateTextProps): ReactElement {
  const place =
    turn === undefined
      ? { x: round(x), y: round(y) }
      : { transform: `translate(${round(x)} ${round(y)}) rotate(${round(turn)})` };
  return (
    <text
      {...place}
      {...fontAttributes(style.face)}
      fontSize={style.size}
      fill={colour ?? COLOURS.ink}
      textAnchor={anchor === "start" ? undefined : anchor}
    >
      {children}
    </text>
  );
}

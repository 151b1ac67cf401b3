import type { ReactElement } from "react";
import { PlateText } from "./plate-text.tsx";
import { wrapText } from "./text.ts";
import { COLOURS, TEXT } from "./theme.ts";

const LINE = 9.5;

export function creditLines(credits: readonly string[], width: number): readonly string[] {
  return wrapText(credits.join("  "), width, TEXT.unit);
}

export function creditsDepth(lines: readonly string[]): number {
  return lines.length * LINE;
}

interface CreditsProps {
  readonly x: number;
  /** Baseline of the first line. */
  readonly y: number;
  readonly lines: readonly string[];
}

/** Sources of colours and patterns, and whatever else a plate owes. */
export function Credits({ x, y, lines }: CreditsProps): ReactElement {
  return (
    <g>
      {lines.map((line, i) => (
        <PlateText key={line} x={x} y={y + i * LINE} style={TEXT.unit} colour={COLOURS.soft}>
          {line}
        </PlateText>
      ))}
    </g>
  );
}

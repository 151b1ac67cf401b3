import type { MarkerHorizon } from "../../core/markers/result.ts";
import { axisTicks } from "../height-axis.tsx";
import { isInFrame } from "../height-scale.ts";
import type { PlacedPost } from "./post-panel.tsx";
import { ownReading } from "./section-frame.ts";

/** One horizon tied between two neighbouring sections: y at the left and at the right, with its interval. */
export interface Tie {
  readonly horizon: string;
  readonly from: TieEnd;
  readonly to: TieEnd;
  /** Where the rock begins, if the tie can go on level to it. */
  readonly rockX?: number;
  readonly isDatum: boolean;
  /** Whether the sections were lined up on it. */
  readonly isUsed: boolean;
}

export interface TieEnd {
  readonly x: number;
  readonly y: number;
  readonly top: number;
  readonly bottom: number;
}

/** Ties between neighbours that place the same horizon; `used` are the horizons of the alignment, the datum first. */
export function correlations(panels: readonly PlacedPost[], used: readonly string[]): readonly Tie[] {
  return panels.slice(1).flatMap((right, i) => {
    const left = panels[i];
    return left.horizons.flatMap((horizon) => {
      const other = right.horizons.find((candidate) => candidate.horizon === horizon.horizon);
      if (
        other === undefined ||
        !isInFrame(left.y, horizon.positionM) ||
        !isInFrame(right.y, other.positionM)
      )
        return [];
      return [
        {
          horizon: horizon.horizon,
          from: tieEnd(left, horizon, left.right),
          to: tieEnd(right, other, right.left - CLEAR),
          rockX: isFigureFree(right, other) ? right.rockLeft : undefined,
          isDatum: horizon.horizon === used[0],
          isUsed: used.includes(horizon.horizon),
        },
      ];
    });
  });
}

const FIGURE_CLEAR = 5.5;
const CLEAR = 2;

/** Whether no figure of the axis stands at this height. */
function isFigureFree({ y, section }: PlacedPost, { positionM }: MarkerHorizon): boolean {
  const at = y(positionM);
  const figures = axisTicks(y, ownReading(section)).labelled;
  return figures.every((tick) => Math.abs(tick.y - at) >= FIGURE_CLEAR);
}

function tieEnd({ y }: PlacedPost, { positionM, lowM, highM }: MarkerHorizon, x: number): TieEnd {
  return { x, y: y(positionM), top: y(highM), bottom: y(lowM) };
}

import type { ReactElement } from "react";
import { clippedSpan, type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { boxPath } from "../marks/mark-path.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import { ColumnHead } from "./column-head.tsx";

export interface PolaritySample {
  readonly heightM: number;
  readonly isNormal: boolean;
}

interface PolarityColumnProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly samples: readonly PolaritySample[];
}

/**
 * Polarity: black normal, white reversed, from the lowest to the highest sample of each run; between runs, where nobody can say, the
 * ground shows. Samples are ticks at the right.
 */
export function PolarityColumn({ x, width, y, samples }: PolarityColumnProps): ReactElement {
  const { top, bottom } = spanOf(y);
  const bar = width - 5;
  const shown = samples.filter((sample) => isInFrame(y, sample.heightM));
  const ticks = shown.map((sample) => `M${round(x + bar + 1.5)} ${round(y(sample.heightM))}h3.5`).join("");
  return (
    <g>
      <ColumnHead x={x} top={top} title="Polarity" />
      <path d={boxPath(x, top, bar, bottom - top)} fill={COLOURS.band} />
      {polarityRuns(samples).map(({ isNormal, baseM, topM }) => {
        const span = clippedSpan(y, baseM, topM);
        if (span === undefined) return null;
        const box = boxPath(x, span.top, bar, Math.max(0.6, span.bottom - span.top));
        return <path key={baseM} d={box} fill={isNormal ? COLOURS.ink : COLOURS.paper} />;
      })}
      <path d={boxPath(x, top, bar, bottom - top)} fill="none" stroke={COLOURS.ink} strokeWidth={0.45} />
      {ticks !== "" && <path d={ticks} stroke={COLOURS.soft} strokeWidth={0.4} />}
    </g>
  );
}

interface PolarityRun {
  readonly isNormal: boolean;
  readonly baseM: number;
  readonly topM: number;
}

export function polarityRuns(samples: readonly PolaritySample[]): readonly PolarityRun[] {
  const runs: PolarityRun[] = [];
  for (const { heightM, isNormal } of samples.toSorted((a, b) => a.heightM - b.heightM)) {
    const run = runs.at(-1);
    if (run !== undefined && run.isNormal === isNormal) runs[runs.length - 1] = { ...run, topM: heightM };
    else runs.push({ isNormal, baseM: heightM, topM: heightM });
  }
  return runs;
}

import { range } from "d3";
import type { ReactElement } from "react";
import type { HeightScale, Lens } from "../height-scale.ts";
import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";

interface LensBreakProps {
  readonly x: number;
  readonly width: number;
  readonly y: HeightScale;
  readonly lens: Lens;
}

const STEP = 4;

/** The two breaks where a lens begins and ends: the scale is another between them. */
export function LensBreak({ x, width, y, lens }: LensBreakProps): ReactElement {
  const count = Math.max(1, Math.floor(width / (2 * STEP)));
  const breaks = [lens.baseM, lens.topM].map((heightM) => {
    const teeth = range(count).map(() => `l${STEP} -1.4l${STEP} 1.4`);
    return `M${round(x)} ${round(y(heightM))}${teeth.join("")}`;
  });
  return <path d={breaks.join("")} fill="none" stroke={COLOURS.soft} strokeWidth={0.5} />;
}

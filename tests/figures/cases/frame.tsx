import type { ReactElement, ReactNode } from "react";
import { heightScale } from "../../../src/figures/height-scale.ts";
import type { PatternId } from "../../../src/figures/lithology/pattern-tiles.ts";
import { Plate } from "../../../src/figures/plate.tsx";

/** A section from -10 to 8 m about a horizon, 180 points tall. */
export const y = heightScale({ bottomM: -10, topM: 8, top: 40, bottom: 220 });

interface FrameOptions {
  readonly width?: number;
  readonly height?: number;
  readonly patterns?: readonly PatternId[];
}

/** A small plate about one primitive. */
export function frame(id: string, children: ReactNode, options: FrameOptions = {}): ReactElement {
  const { width = 120, height = 240, patterns = [] } = options;
  return (
    <Plate
      id={id}
      title={id}
      description={`The primitive ${id}.`}
      width={width}
      height={height}
      patterns={patterns}
    >
      {children}
    </Plate>
  );
}

import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { type HeightScale, isInFrame } from "../height-scale.ts";
import { WAS_PAINT } from "../legend-timing-swatch.tsx";
import { round } from "../numbers.ts";
import type { SectionView } from "./drawing.ts";

interface WasHorizonsProps {
  readonly analysis: Analysis;
  readonly view: SectionView;
  readonly y: HeightScale;
  readonly left: number;
  readonly right: number;
}

/** Thin lines where horizons stood before a choice that is only tried. */
export function WasHorizons({ analysis, view, y, left, right }: WasHorizonsProps): ReactElement | null {
  const placed = (one: Analysis) =>
    one.markers.horizons.filter(({ section }) => section === view.section).map(({ positionM }) => positionM);
  const moved = view.was === undefined ? [] : wasAndIsNot(placed(view.was), namedNow(analysis, view));
  const shown = moved.filter((heightM) => isInFrame(y, heightM));
  if (shown.length === 0) return null;
  const lines = shown.map((heightM) => `M${round(left)} ${round(y(heightM))}H${round(right)}`).join("");
  return <path d={lines} {...WAS_PAINT} />;
}

/** Heights of the horizons as each name is placed now: a pick by hand stands for the automatic one of its name. */
function namedNow({ markers }: Analysis, { section }: SectionView): ReadonlySet<number> {
  const here = markers.horizons.filter((horizon) => horizon.section === section);
  const byHand = new Set(here.filter(({ source }) => source === "manual").map(({ horizon }) => horizon));
  const standing = here.filter(({ source, horizon }) => source === "manual" || !byHand.has(horizon));
  return new Set(standing.map(({ positionM }) => positionM));
}

const wasAndIsNot = (was: readonly number[], now: ReadonlySet<number>): readonly number[] =>
  was.filter((heightM) => !now.has(heightM));

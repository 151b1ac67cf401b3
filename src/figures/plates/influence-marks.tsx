import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { mostInfluential } from "../../core/timing/influential.ts";
import { type HeightScale, isInFrame } from "../height-scale.ts";
import { INFLUENTIAL_PAINT } from "../legend-timing-swatch.tsx";
import { markPath } from "../marks/mark-path.ts";
import type { TaxaLayout } from "./taxa-block.tsx";

interface InfluenceMarksProps {
  readonly analysis: Analysis;
  readonly view: { readonly section: string; readonly set: string };
  readonly layout: Pick<TaxaLayout, "places">;
  readonly y: HeightScale;
}

const RADIUS = 3.6;

/** Rings about the last finds whose removal, or that of their taxon, moves the level most. */
export function InfluenceMarks({ analysis, view, layout, y }: InfluenceMarksProps): ReactElement | null {
  const names = new Set(mostInfluential(analysis.timing.influence, view).map(({ taxon }) => taxon));
  const rings = layout.places
    .filter(({ taxon }) => names.has(taxon.taxon) && isInFrame(y, taxon.lastM))
    .map(({ taxon, x }) => markPath("circle", x, y(taxon.lastM), RADIUS))
    .join("");
  return rings === "" ? null : <path d={rings} {...INFLUENTIAL_PAINT} />;
}

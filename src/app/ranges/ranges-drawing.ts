import type { Analysis } from "../../core/analysis-result.ts";
import type { RangeTapers } from "../../core/ranges/asked-ends.ts";
import { chartedTaxa } from "../../figures/plates/charted-taxa.ts";
import type { Drawing, View } from "../../figures/plates/drawing.ts";
import { comparisonWidth, methodComparison } from "../../figures/plates/method-comparison.tsx";
import { rangeChartPage } from "../../figures/plates/range-chart.tsx";
import type { AsideFind, RangeView } from "../../figures/plates/range-view.ts";
import type { RangesPlace } from "./ranges-place.ts";

export interface RangesAsked {
  readonly section: string;
  readonly place: RangesPlace;
  readonly view: View;
  readonly aside: readonly AsideFind[];
  readonly tapers?: readonly RangeTapers[];
  /** Points that a page may be wide. */
  readonly pageWidth: number;
}

/** A page of what the station shows, and how many there are. */
export interface RangesPage {
  readonly drawing: Drawing;
  readonly page: number;
  readonly pages: number;
}

/** The range chart, or its ends by every method, as the address asks for it. */
export function rangesPage(analysis: Analysis, asked: RangesAsked): RangesPage {
  const { place, section, view, aside, tapers, pageWidth } = asked;
  const rangeView: RangeView = {
    ...view,
    section,
    ...(place.method === undefined ? {} : { method: place.method }),
    ...(tapers === undefined ? {} : { tapers }),
    order: place.order,
    folded: new Set(place.folded),
    ...(place.taxon === undefined ? {} : { focus: place.taxon }),
    aside,
    isLeaningShown: place.isLeaningShown,
  };
  return place.isCompared
    ? comparisonPage(analysis, rangeView, asked)
    : rangeChartPage(analysis, { ...rangeView, pageWidth }, place.page);
}

/** Points that axis, log and search rail take at the left of a comparison, and the horizons' names at its right. */
const BESIDE = 300;
const BOUNDS = 9;

function comparisonPage(analysis: Analysis, view: RangeView, { place, pageWidth }: RangesAsked): RangesPage {
  const names = chartedTaxa(analysis, view).map(({ taxon }) => taxon);
  const asked = place.taxon !== undefined && names.includes(place.taxon) ? [place.taxon] : names;
  const methods = analysis.study.settings.ranges.methods.length;
  const perPage = Math.max(1, Math.floor((pageWidth - BESIDE) / comparisonWidth(methods, BOUNDS)));
  const pages = Math.max(1, Math.ceil(asked.length / perPage));
  const page = Math.min(place.page, pages);
  const taxa = asked.slice((page - 1) * perPage, page * perPage);
  return { drawing: methodComparison(analysis, { ...view, taxa }), page, pages };
}

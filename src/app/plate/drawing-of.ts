import type { Analysis } from "../../core/analysis-result.ts";
import type { Drawing, View } from "../../figures/plates/drawing.ts";
import { fenceDiagram } from "../../figures/plates/fence-diagram.tsx";
import { markerPlate } from "../../figures/plates/marker-plate.tsx";
import { rangeChart } from "../../figures/plates/range-chart.tsx";
import { timingPlate } from "../../figures/plates/timing-plate.tsx";
import type { Focus } from "../state/focus.ts";
import type { Beside } from "../state/page-state.ts";

/**
 * The plate of a station for what is in focus; undefined where it has none.
 * @param beside what a timing plate shows beside its ranges.
 */
export function drawingOf(
  focus: Focus,
  analysis: Analysis,
  { beside, ...view }: View & { readonly beside?: Beside },
): Drawing | undefined {
  const { station, section, set } = focus;
  if (section === undefined || station === "tables") return undefined;
  switch (station) {
    case "markers":
      return markerPlate(analysis, { section: section.name, ...view });
    case "fence":
      return fenceDiagram(analysis, view);
    case "ranges":
      return rangeChart(analysis, { section: section.name, ...view });
    case "timing":
      return set === undefined
        ? undefined
        : timingPlate(analysis, { section: section.name, set: set.set, ...view, ...beside });
    default:
      return station satisfies never;
  }
}

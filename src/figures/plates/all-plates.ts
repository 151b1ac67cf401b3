import type { Analysis } from "../../core/analysis-result.ts";
import type { Drawing, View } from "./drawing.ts";
import { fenceDiagram } from "./fence-diagram.tsx";
import { markerPlate } from "./marker-plate.tsx";
import { rangeChartPages } from "./range-chart.tsx";
import { MAIN_SETS, timingPlate } from "./timing-plate.tsx";

/** A plate with the place it is written to, and what it speaks of. */
export interface PlateFile {
  readonly subject: "fence" | "ranges" | "markers" | "timing";
  readonly section?: string;
  readonly set?: string;
  readonly file: string;
  readonly drawing: Drawing;
}

/** Every plate of a run: a fence, and for each section its range chart, its markers and the timing of its main sets. */
export function plates(analysis: Analysis, view: View = {}): readonly PlateFile[] {
  const declared = Object.keys(analysis.study.settings.timing.sets);
  const wanted = new Set<string>([...MAIN_SETS, ...declared]);
  const ofSections = analysis.study.sections.flatMap(({ name, measurements }) => {
    const sets = analysis.timing.sets.filter((set) => set.section === name && wanted.has(set.set));
    return [
      ...rangeChartPages(analysis, { ...view, section: name }).map((drawing) =>
        filed({ subject: "ranges", section: name, drawing }),
      ),
      ...(measurements.length > 0
        ? [
            filed({
              subject: "markers",
              section: name,
              drawing: markerPlate(analysis, { ...view, section: name }),
            }),
          ]
        : []),
      ...sets.map(({ set }) =>
        filed({
          subject: "timing",
          section: name,
          set,
          drawing: timingPlate(analysis, { ...view, section: name, set }),
        }),
      ),
    ];
  });
  const fence = analysis.study.sections.length > 1 ? [fenceDiagram(analysis, view)] : [];
  return [...fence.map((drawing) => filed({ subject: "fence", drawing })), ...ofSections];
}

const filed = (plate: Omit<PlateFile, "file">): PlateFile => ({
  ...plate,
  file: `figures/${plate.drawing.id}.svg`,
});

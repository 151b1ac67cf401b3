import type { Analysis } from "../../core/analysis-result.ts";
import { formatGiven } from "../../core/study/heights.ts";
import { TICK_LABEL_DEPTH } from "../columns/column-ground.tsx";
import { LensBreak } from "../marks/lens-break.tsx";
import { analyteColumns, errorBarNotes } from "./analyte-columns.tsx";
import { axisWords } from "./axis-words.ts";
import { defaultLens } from "./default-lens.ts";
import type { Drawing, SectionView } from "./drawing.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { lensNotes } from "./lens-notes.ts";
import { axisColumns, lineLeft, logColumns } from "./log-columns.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { scaleColumn } from "./scale-column.tsx";
import { type SectionFrame, sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";

const BODY_HEIGHT = 420;

/** Everything measured in one section against height, with a magnified band about the main horizon and where it was placed. */
export function markerPlate(analysis: Analysis, view: SectionView): Drawing {
  const names = analysis.study.sections.map((section) => section.name);
  const id = `markers-${slugOf(view.section, names, "section")}`;
  const span = { top: BODY_TOP, bottom: BODY_TOP + (view.bodyHeight ?? BODY_HEIGHT) };
  const lens = view.lens ?? (view.frame ? undefined : defaultLens(analysis, view.section));
  const frame = sectionFrame(analysis, view.section, { view: { ...view, lens }, span });
  const analytes = analyteColumns(analysis, frame, { width: 40 });
  const { placed, right } = placeColumns(
    [...axisColumns(frame), ...logColumns(id, frame), ...analytes, scaleColumn(frame.y, frame.lens)],
    MARGIN,
  );
  const horizons = drawnHorizons(analysis, frame, { hasRivals: true });
  const { section, y } = frame;
  const left = lineLeft(placed);
  return setSheet({
    id,
    title: `${section.title}: markers`,
    subtitle: axisWords(frame),
    description: describe(frame),
    right: right + 4 + horizonLabelsWidth(horizons),
    bottom: span.bottom + TICK_LABEL_DEPTH,
    columns: placed,
    body: (
      <g data-section={section.name}>
        {frame.lens && <LensBreak x={left} width={right - left} y={y} lens={frame.lens} />}
        <Horizons left={left} right={right + 4} y={y} horizons={horizons} />
      </g>
    ),
    legend: horizonLegend(horizons),
    notes: [...emptyNotes(frame), ...errorBarNotes(frame), ...lensNotes(frame)],
    panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
    view,
  });
}

function emptyNotes({ section }: SectionFrame): readonly string[] {
  return section.measurements.length === 0 ? ["Nothing was measured in this section."] : [];
}

function describe({ section, main }: SectionFrame): string {
  if (main === undefined) return `What was measured in ${section.title}; no main horizon is placed here.`;
  const interval = `${formatGiven(main.lowM, section)} to ${formatGiven(main.highM, section)}`;
  return `What was measured in ${section.title}; ${main.horizon} is ${main.source} at ${formatGiven(main.positionM, section)} (${interval}).`;
}

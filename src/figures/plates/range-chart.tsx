import type { Analysis } from "../../core/analysis-result.ts";
import { formatGiven } from "../../core/study/heights.ts";
import { TICK_LABEL_DEPTH } from "../columns/column-ground.tsx";
import { LensBreak } from "../marks/lens-break.tsx";
import { analyteColumns, errorBarNotes } from "./analyte-columns.tsx";
import { axisWords } from "./axis-words.ts";
import type { Drawing, SectionView } from "./drawing.ts";
import { type DrawnTaxon, drawnTaxa, namesWithoutRange } from "./drawn-taxa.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { lensNotes } from "./lens-notes.ts";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { scaleColumn } from "./scale-column.tsx";
import { groupSigns } from "./searched-groups.ts";
import { type SectionFrame, sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";
import { groupLegend, layTaxa, TaxaBlock } from "./taxa-block.tsx";
import { PITCH, rangeLegend } from "./taxon-range.tsx";

const BODY_HEIGHT = 400;
const MARKER_COLUMNS = ["iridium", "shocked-quartz", "spherules"];

/** Everything found in one section against height, with who looked, the markers, and how far each range may truly reach. */
export function rangeChart(analysis: Analysis, view: SectionView): Drawing {
  const taxa = drawnTaxa(analysis, view.section, groupSigns(analysis));
  return chartPage(analysis, view, { taxa, page: 1, pages: 1 });
}

export interface PagedView extends SectionView {
  /** Widest page, in points; default the width of an A3 page lying down, less its margins. */
  readonly pageWidth?: number;
}

const PAGE_WIDTH = 1120;

/** The range chart on as many pages as the width given asks for: names are never set smaller. */
export function rangeChartPages(analysis: Analysis, view: PagedView): readonly Drawing[] {
  const { pageWidth = PAGE_WIDTH } = view;
  const whole = rangeChart(analysis, view);
  if (whole.width <= pageWidth) return [whole];
  const taxa = drawnTaxa(analysis, view.section, groupSigns(analysis));
  const perPage = Math.max(1, Math.floor(taxa.length - (whole.width - pageWidth) / PITCH));
  const pages = Math.ceil(taxa.length / perPage);
  const evenly = Math.ceil(taxa.length / pages);
  return Array.from({ length: pages }, (_, i) =>
    chartPage(analysis, view, { taxa: taxa.slice(i * evenly, (i + 1) * evenly), page: i + 1, pages }),
  );
}

interface Page {
  readonly taxa: readonly DrawnTaxon[];
  readonly page: number;
  readonly pages: number;
}

function chartPage(analysis: Analysis, view: SectionView, { taxa, page, pages }: Page): Drawing {
  const id = chartId(analysis, view.section, { page, pages });
  const span = { top: BODY_TOP, bottom: BODY_TOP + (view.bodyHeight ?? BODY_HEIGHT) };
  const frame = sectionFrame(analysis, view.section, { view, span });
  const { section, y, lens } = frame;
  const { placed, right: columnsRight } = placeColumns(
    [
      ...axisColumns(frame),
      ...logColumns(id, frame),
      ...railColumn(id, analysis, frame),
      ...analyteColumns(analysis, frame, { only: MARKER_COLUMNS }),
      ...(lens ? [scaleColumn(y, lens)] : []),
    ],
    MARGIN,
  );
  const left = columnsRight + 10;
  const layout = layTaxa(taxa, left);
  const horizons = drawnHorizons(analysis, frame);
  const right = Math.max(layout.right, left + 60) + 4;
  const from = placed[0]?.x ?? MARGIN;
  return setSheet({
    id,
    title:
      pages > 1 ? `${section.title}: range chart, page ${page} of ${pages}` : `${section.title}: range chart`,
    subtitle: axisWords(frame),
    description: describe(section.title, taxa, frame),
    right: Math.max(right + horizonLabelsWidth(horizons), layout.namesRight),
    bottom: span.bottom + Math.max(TICK_LABEL_DEPTH, layout.namesDepth),
    columns: placed,
    body: (
      <g data-section={section.name}>
        <TaxaBlock {...{ analysis, layout, left, y }} title={taxa.length > 0 ? "Ranges" : ""} />
        {lens && <LensBreak x={from} width={right - from} y={y} lens={lens} />}
        <Horizons left={lineLeft(placed)} right={right} y={y} horizons={horizons} />
      </g>
    ),
    legend: [...groupLegend(analysis, layout), ...rangeLegend(taxa, y), ...horizonLegend(horizons)],
    notes: [
      ...chartNotes(analysis, section.name, taxa),
      ...errorBarNotes(frame, MARKER_COLUMNS),
      ...lensNotes(frame),
    ],
    panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
    view,
  });
}

function chartId(analysis: Analysis, section: string, { page, pages }: Omit<Page, "taxa">): string {
  const names = analysis.study.sections.map((candidate) => candidate.name);
  return `range-chart-${slugOf(section, names, "section")}${pages > 1 ? `-page-${page}` : ""}`;
}

const MOST_NAMES = 12;

function chartNotes(analysis: Analysis, section: string, taxa: readonly DrawnTaxon[]): readonly string[] {
  const names = namesWithoutRange(analysis, section);
  const listed = names.slice(0, MOST_NAMES).map((name) => name.slice(0, 80));
  const more = names.length > MOST_NAMES ? ` and ${names.length - MOST_NAMES} more` : "";
  return [
    ...(taxa.length === 0 ? ["No taxon has a find that counts in this section."] : []),
    ...(names.length > 0 ? [`Not drawn, since every find is set aside: ${listed.join(", ")}${more}.`] : []),
  ];
}

function describe(title: string, taxa: readonly DrawnTaxon[], { main, section }: SectionFrame): string {
  const survivors = taxa.filter((taxon) => taxon.role === "survivor").length;
  const count = `${taxa.length} ${taxa.length === 1 ? "taxon" : "taxa"} in ${title}`;
  if (main === undefined) return `${count}; no main horizon is placed here.`;
  return `${count}, ${survivors} of them found above ${main.horizon} at ${formatGiven(main.positionM, section)}.`;
}

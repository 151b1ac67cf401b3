import type { Analysis } from "../../core/analysis-result.ts";
import { formatGiven } from "../../core/study/heights.ts";
import { TICK_LABEL_DEPTH } from "../columns/column-ground.tsx";
import type { LegendEntry } from "../legend.tsx";
import { LensBreak } from "../marks/lens-break.tsx";
import { COLOURS } from "../theme.ts";
import { analyteColumns, errorBarNotes } from "./analyte-columns.tsx";
import { axisWords } from "./axis-words.ts";
import { ChartBlock, chartHeadWidth } from "./chart-block.tsx";
import { type ChartItem, chartItems, layChart, pitchOf } from "./chart-layout.ts";
import { type ChartedTaxon, chartedTaxa } from "./charted-taxa.ts";
import type { Drawing } from "./drawing.ts";
import { namesWithoutRange } from "./drawn-taxa.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { lensNotes } from "./lens-notes.ts";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { rangeLegend } from "./range-legend.ts";
import type { PagedView, RangeView } from "./range-view.ts";
import { scaleColumn } from "./scale-column.tsx";
import { type SectionFrame, sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";
import { groupLegend } from "./taxa-block.tsx";
import { isInQuestion, PITCH } from "./taxon-range.tsx";

const BODY_HEIGHT = 400;
const MARKER_COLUMNS = ["iridium", "shocked-quartz", "spherules"];

/** Everything found in one section against height, with who looked, the markers, and how far each range may truly reach. */
export function rangeChart(analysis: Analysis, view: RangeView): Drawing {
  return chartPage(analysis, view, { items: itemsOf(analysis, view), page: 1, pages: 1 });
}

const itemsOf = (analysis: Analysis, view: RangeView): readonly ChartItem[] =>
  chartItems(chartedTaxa(analysis, view), view);

const PAGE_WIDTH = 1120;

/** The range chart on as many pages as the width given asks for: names are never set smaller. */
export function rangeChartPages(analysis: Analysis, view: PagedView): readonly Drawing[] {
  const pages = itemPages(analysis, view);
  return pages.map((items, i) => chartPage(analysis, view, { items, page: i + 1, pages: pages.length }));
}

/** One page of the range chart, counted from 1, and how many there are; past the last, the last. */
export function rangeChartPage(
  analysis: Analysis,
  view: PagedView,
  asked: number,
): { readonly drawing: Drawing; readonly page: number; readonly pages: number } {
  const all = itemPages(analysis, view);
  const page = Math.min(Math.max(1, asked), all.length);
  const items = all[page - 1] ?? [];
  return {
    drawing: chartPage(analysis, view, { items, page, pages: all.length }),
    page,
    pages: all.length,
  };
}

/** The items that stand on each page: as many on one as on another. */
function itemPages(analysis: Analysis, view: PagedView): readonly (readonly ChartItem[])[] {
  const { pageWidth = PAGE_WIDTH } = view;
  const items = itemsOf(analysis, view);
  const whole = chartPage(analysis, view, { items, page: 1, pages: 1 });
  if (whole.width <= pageWidth || items.length === 0) return [items];
  const total = items.reduce((sum, item) => sum + pitchOf(item), 0);
  const room = Math.max(PITCH, total - (whole.width - pageWidth));
  const perPage = Math.max(1, Math.floor((items.length * room) / total));
  const pages = Math.ceil(items.length / perPage);
  const evenly = Math.ceil(items.length / pages);
  return Array.from({ length: pages }, (_, i) => items.slice(i * evenly, (i + 1) * evenly)).filter(
    (page) => page.length > 0,
  );
}

interface Page {
  readonly items: readonly ChartItem[];
  readonly page: number;
  readonly pages: number;
}

const taxaOf = (items: readonly ChartItem[]): readonly ChartedTaxon[] =>
  items.flatMap((item) => (item.kind === "taxon" ? [item.taxon] : item.taxa));

function chartPage(analysis: Analysis, view: RangeView, { items, page, pages }: Page): Drawing {
  const taxa = taxaOf(items);
  const drawn = items.flatMap((item) => (item.kind === "taxon" ? [item.taxon] : []));
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
  const layout = layChart(items, { left, isByGroup: (view.order ?? "group") === "group" });
  const horizons = drawnHorizons(analysis, frame);
  const [title, words] = taxa.length > 0 ? ["Ranges", methodWords(view, drawn)] : ["", ""];
  const right = Math.max(layout.right, left + 60) + 4;
  const from = placed[0]?.x ?? MARGIN;
  return setSheet({
    id,
    title:
      pages > 1 ? `${section.title}: range chart, page ${page} of ${pages}` : `${section.title}: range chart`,
    subtitle: axisWords(frame),
    description: describe(section.title, taxa, frame),
    right: Math.max(
      right + horizonLabelsWidth(horizons),
      layout.namesRight,
      left + chartHeadWidth(title, words),
    ),
    bottom: span.bottom + Math.max(TICK_LABEL_DEPTH, layout.namesDepth),
    columns: placed,
    body: (
      <g data-section={section.name}>
        <ChartBlock {...{ analysis, layout, left, y }} title={title} words={words} />
        {lens && <LensBreak x={from} width={right - from} y={y} lens={lens} />}
        <Horizons left={lineLeft(placed)} right={right} y={y} horizons={horizons} />
      </g>
    ),
    legend: [
      ...groupLegend(analysis, layout),
      ...rangeLegend(drawn, y),
      ...foldedLegend(items),
      ...horizonLegend(horizons),
    ],
    notes: [
      ...chartNotes(analysis, section.name, taxa),
      ...standInNotes(view, drawn),
      ...errorBarNotes(frame, MARKER_COLUMNS),
      ...lensNotes(frame),
    ],
    panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
    view,
  });
}

function chartId(analysis: Analysis, section: string, { page, pages }: Omit<Page, "items">): string {
  const names = analysis.study.sections.map((candidate) => candidate.name);
  return `range-chart-${slugOf(section, names, "section")}${pages > 1 ? `-page-${page}` : ""}`;
}

/** Whose tapers and ends are drawn, in words. */
function methodWords({ method }: RangeView, drawn: readonly ChartedTaxon[]): string {
  if (method !== undefined) return `ends by ${method}`;
  const by = drawn.filter(isInQuestion).flatMap(({ top }) => (top === undefined ? [] : [top.method]));
  const most = by.toSorted((a, b) => countOf(by, b) - countOf(by, a))[0];
  return most === undefined ? "" : `ends by ${most}, which leads here`;
}

const countOf = <T,>(list: readonly T[], one: T): number => list.filter((each) => each === one).length;

function foldedLegend(items: readonly ChartItem[]): readonly LegendEntry[] {
  return items.some(({ kind }) => kind === "folded")
    ? [
        {
          sign: { kind: "folded", colour: COLOURS.soft },
          label: "group folded: its last finds, dashed where the end is not in question",
        },
      ]
    : [];
}

/** Where the leading method says nothing of an end, the one that stands in for it is named. */
function standInNotes({ method }: RangeView, drawn: readonly ChartedTaxon[]): readonly string[] {
  if (method !== undefined) return [];
  const tapered = drawn.filter((taxon) => isInQuestion(taxon) && taxon.taper !== undefined);
  const [leading] = tapered
    .map(({ taper }) => taper?.method)
    .toSorted((a, b) => countTapers(tapered, b) - countTapers(tapered, a));
  const others = tapered.filter(({ taper }) => taper?.method !== leading);
  if (leading === undefined || others.length === 0) return [];
  const names = others.slice(0, MOST_NAMES).map(({ taxon }) => taxon.slice(0, 80));
  const more = others.length > MOST_NAMES ? ` and ${others.length - MOST_NAMES} more` : "";
  return [
    `Where ${leading} says nothing, ${others[0]?.taper?.method ?? ""} stands in: ${names.join(", ")}${more}.`,
  ];
}

const countTapers = (taxa: readonly ChartedTaxon[], method: string | undefined): number =>
  taxa.filter(({ taper }) => taper?.method === method).length;

const MOST_NAMES = 12;

function chartNotes(analysis: Analysis, section: string, taxa: readonly ChartedTaxon[]): readonly string[] {
  const names = namesWithoutRange(analysis, section);
  const listed = names.slice(0, MOST_NAMES).map((name) => name.slice(0, 80));
  const more = names.length > MOST_NAMES ? ` and ${names.length - MOST_NAMES} more` : "";
  return [
    ...(taxa.length === 0 ? ["No taxon has a find that counts in this section."] : []),
    ...(names.length > 0 ? [`Not drawn, since every find is set aside: ${listed.join(", ")}${more}.`] : []),
  ];
}

function describe(title: string, taxa: readonly ChartedTaxon[], { main, section }: SectionFrame): string {
  const survivors = taxa.filter((taxon) => taxon.role === "survivor").length;
  const count = `${taxa.length} ${taxa.length === 1 ? "taxon" : "taxa"} in ${title}`;
  if (main === undefined) return `${count}; no main horizon is placed here.`;
  return `${count}, ${survivors} of them found above ${main.horizon} at ${formatGiven(main.positionM, section)}.`;
}

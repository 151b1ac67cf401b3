import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { RecoveryStance } from "../../core/ranges/leading.ts";
import { type HeightScale, spanOf } from "../height-scale.ts";
import { slantedDepth, slantedOverhang } from "../layout/slanted-names.ts";
import type { LegendEntry } from "../legend.tsx";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { axisWords } from "./axis-words.ts";
import { chartedTaxa } from "./charted-taxa.ts";
import { boundName, type ComparedTaxon, comparedTaxon } from "./compared-ends.ts";
import { comparisonLegend } from "./comparison-legend.ts";
import type { Drawing } from "./drawing.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { LANE, LEANING_NAME, LeaningLanes, MethodLane } from "./method-lanes.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import type { RangeView } from "./range-view.ts";
import { groupSigns } from "./searched-groups.ts";
import { sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";
import { LONGEST_NAME, TaxonRange } from "./taxon-range.tsx";

const BODY_HEIGHT = 400;
const PANEL_GAP = 22;
const BLOCK_GAP = 9;
const NAMES_DROP = 8;

export interface ComparisonView extends RangeView {
  /** The taxa compared, side by side. */
  readonly taxa: readonly string[];
}

const STANCE_WORDS: Readonly<Record<RecoveryStance, string>> = {
  "holds-under-decline": "hold under decline",
  "fits-recovery": "fit recovery",
  "even-recovery": "take recovery as even",
};

/** Both ends of a few taxa by every method on the shared axis, and how far each leans on the shape of recovery. */
export function methodComparison(analysis: Analysis, view: ComparisonView): Drawing {
  const names = new Set(view.taxa);
  const { method: _, tapers: __, ...plain } = view;
  const compared = chartedTaxa(analysis, { ...plain, isLeaningShown: false })
    .filter(({ taxon }) => names.has(taxon))
    .map((taxon) => comparedTaxon(analysis, view.section, taxon));
  const sections = analysis.study.sections.map(({ name }) => name);
  const id = `compare-methods-${slugOf(view.section, sections, "section")}`;
  const span = { top: BODY_TOP, bottom: BODY_TOP + (view.bodyHeight ?? BODY_HEIGHT) };
  const frame = sectionFrame(analysis, view.section, { view, span });
  const { section, y } = frame;
  const { placed, right: columnsRight } = placeColumns(
    [...axisColumns(frame), ...logColumns(id, frame), ...railColumn(id, analysis, frame)],
    MARGIN,
  );
  const panels = layPanels(compared, columnsRight + 10);
  const horizons = drawnHorizons(analysis, frame);
  const right = Math.max(columnsRight + 60, ...panels.map((panel) => panel.right));
  const signs = groupSigns(analysis);
  return setSheet({
    id,
    title: `${section.title}: ends by every method`,
    subtitle: axisWords(frame),
    description: describe(section.title, compared),
    right: Math.max(right + horizonLabelsWidth(horizons), ...panels.map((panel) => panel.namesRight)),
    bottom: span.bottom + Math.max(0, ...panels.map((panel) => panel.namesDepth)),
    columns: placed,
    body: (
      <g data-section={section.name}>
        {panels.map((panel) => (
          <PanelBody
            key={panel.compared.taxon.taxon}
            panel={panel}
            y={y}
            colour={signs.get(panel.compared.taxon.group)?.colour ?? ""}
          />
        ))}
        <Horizons left={lineLeft(placed)} right={right} y={y} horizons={horizons} />
      </g>
    ),
    legend: [...comparisonLegend(compared, y), ...horizonLegend(horizons)] satisfies readonly LegendEntry[],
    notes: compared.length === 0 ? ["No taxon is chosen to be compared."] : [],
    panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
    view,
  });
}

interface ComparisonPanel {
  readonly compared: ComparedTaxon;
  readonly left: number;
  /** Middle of the bar of finds, of each method's lane and of the first lane of the leaning. */
  readonly barX: number;
  readonly lanes: readonly number[];
  readonly leaningX: number;
  readonly right: number;
  readonly namesRight: number;
  readonly namesDepth: number;
}

/** Points that one panel takes on a plate, so that a page holds whole ones. */
export function comparisonWidth(methods: number, bounds: number): number {
  return (methods + bounds + 2) * LANE + 4 * BLOCK_GAP + PANEL_GAP;
}

function layPanels(compared: readonly ComparedTaxon[], from: number): readonly ComparisonPanel[] {
  const panels: ComparisonPanel[] = [];
  let left = from;
  for (const each of compared) {
    const barX = left + LANE / 2;
    let x = barX;
    const lanes = each.methods.map(({ stance }, i) => {
      x += LANE + (stance === each.methods[i - 1]?.stance ? 0 : BLOCK_GAP);
      return x;
    });
    const bounds = each.leaning?.bounds ?? [];
    const leaningX = x + LANE + BLOCK_GAP;
    const right = leaningX + bounds.length * LANE + LANE / 2;
    const names = [
      { text: fitText(each.taxon.taxon, LONGEST_NAME, TEXT.taxon), x: barX, style: TEXT.taxon },
      ...each.methods.map(({ method }, i) => ({ text: method, x: lanes[i], style: TEXT.labelStrong })),
      { text: LEANING_NAME, x: leaningX, style: TEXT.labelStrong },
      ...bounds.map((bound, i) => ({
        text: boundName(bound),
        x: leaningX + (i + 1) * LANE,
        style: TEXT.label,
      })),
    ];
    panels.push({
      compared: each,
      left,
      barX,
      lanes,
      leaningX,
      right,
      namesRight: Math.max(...names.map(({ text, x: at, style }) => at + slantedOverhang(text, style))),
      namesDepth: NAMES_DROP + Math.max(...names.map(({ text, style }) => slantedDepth([text], style))),
    });
    left = right + PANEL_GAP;
  }
  return panels;
}

interface PanelBodyProps {
  readonly panel: ComparisonPanel;
  readonly y: HeightScale;
  readonly colour: string;
}

const HEAD_LIFT = 8;
const BLOCK_LIFT = 4;

function PanelBody({ panel, y, colour }: PanelBodyProps): ReactElement {
  const { compared, left, barX, lanes, leaningX, right } = panel;
  const { top } = spanOf(y);
  const blocks = [...new Set(compared.methods.map(({ stance }) => stance))].map((stance) => {
    const own = lanes.filter((_, i) => compared.methods[i].stance === stance);
    return { words: STANCE_WORDS[stance], from: own[0] - LANE / 2, to: own[own.length - 1] + LANE / 2 };
  });
  const leaning = { words: "leaning on recovery", from: leaningX - LANE / 2, to: right };
  const name = fitText(compared.taxon.taxon, right - left, TEXT.taxon);
  return (
    <g>
      <PlateText x={left} y={top - HEAD_LIFT - 19} style={TEXT.taxon}>
        {name}
      </PlateText>
      {[...blocks, ...(compared.leaning === undefined ? [] : [leaning])].map((block) => (
        <BlockHead key={block.words} {...block} y={top - BLOCK_LIFT} />
      ))}
      <TaxonRange x={barX} y={y} colour={colour} taxon={compared.taxon} />
      {compared.methods.map((method, i) => (
        <MethodLane key={method.method} x={lanes[i]} {...{ y, colour, compared }} of={method} />
      ))}
      <LeaningLanes x={leaningX} {...{ y, colour, compared }} />
    </g>
  );
}

interface BlockHeadProps {
  readonly words: string;
  readonly from: number;
  readonly to: number;
  readonly y: number;
}

/** What the methods of a block take recovery to be, over a line as wide as they are; in two lines where that is narrow. */
function BlockHead({ words, from, to, y }: BlockHeadProps): ReactElement {
  const width = to - from;
  const parts = textWidth(words, TEXT.unit) <= width ? [words] : halves(words);
  return (
    <g>
      <path d={`M${round(from)} ${round(y)}H${round(to - 2)}`} stroke={COLOURS.soft} strokeWidth={0.6} />
      {parts.map((part, i) => (
        <PlateText
          key={part}
          x={from}
          y={y - 3 - (parts.length - 1 - i) * 8}
          style={TEXT.unit}
          colour={COLOURS.soft}
        >
          {fitText(part, width + BLOCK_GAP - 2, TEXT.unit)}
        </PlateText>
      ))}
    </g>
  );
}

function halves(words: string): readonly string[] {
  const at = words.indexOf(" ", Math.floor(words.length / 2) - 3);
  return at < 0 ? [words] : [words.slice(0, at), words.slice(at + 1)];
}

function describe(title: string, compared: readonly ComparedTaxon[]): string {
  const parts = compared.map(({ taxon, methods, leaning }) => {
    const closed = methods.filter(({ top }) => top?.outcome === "closed").length;
    const spread =
      leaning?.nearestM === undefined || leaning.furthestM === undefined
        ? ""
        : `; as the shape of recovery changes its upper bound moves over ${round(leaning.furthestM - leaning.nearestM)} m`;
    return `${taxon.taxon}: ${closed} of ${methods.length} methods bound its upper end inside ${title}${spread}`;
  });
  return parts.length === 0 ? `${title}: nothing is compared.` : `${parts.join(". ")}.`;
}

import type { Analysis } from "../../core/analysis-result.ts";
import { mostInfluential } from "../../core/timing/influential.ts";
import { TICK_LABEL_DEPTH } from "../columns/column-ground.tsx";
import { LensBreak } from "../marks/lens-break.tsx";
import { axisWords } from "./axis-words.ts";
import { defaultLens } from "./default-lens.ts";
import type { Drawing, SectionView } from "./drawing.ts";
import { drawnTaxa } from "./drawn-taxa.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { InfluenceMarks } from "./influence-marks.tsx";
import { lensNotes } from "./lens-notes.ts";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { rangeLegend } from "./range-legend.ts";
import { groupSigns } from "./searched-groups.ts";
import { sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";
import { SurvivorLine, survivorDepth, survivorLines } from "./survivor-line.tsx";
import { groupLegend, layTaxa, TaxaBlock } from "./taxa-block.tsx";
import { type Answered, answerColumns, type TimingAsked } from "./timing-columns.tsx";
import { drawnTiming, timingNotes } from "./timing-words.ts";
import { WasHorizons } from "./was-horizons.tsx";

/** `set`: name of the set of taxa: `candidates`, `candidates-closed`, a group or a declared list. */
export interface TimingView extends SectionView, TimingAsked {}

const BODY_HEIGHT = 320;
const SURVIVOR_WIDTH = 420;
const NAMES_CLEAR = 14;

/** Could the taxa of a set have ended together, where, and over what height: their tapers against the horizons. */
export function timingPlate(analysis: Analysis, view: TimingView): Drawing {
  const id = timingId(analysis, view);
  const members = new Set(setOf(analysis, view)?.taxa);
  const all = drawnTaxa(analysis, view.section, groupSigns(analysis));
  const taxa = all.filter((taxon) => members.has(taxon.taxon));
  const survivors = all.filter((taxon) => taxon.role === "survivor").map((taxon) => taxon.taxon);
  const lines = survivorLines(survivors, SURVIVOR_WIDTH);
  const top = BODY_TOP + survivorDepth(lines);
  const span = { top, bottom: top + (view.bodyHeight ?? BODY_HEIGHT) };
  const magnified = view.lens ?? (view.frame ? undefined : defaultLens(analysis, view.section));
  const frame = sectionFrame(analysis, view.section, { view: { ...view, lens: magnified }, span });
  const { section, y, lens } = frame;
  const timing = drawnTiming(answersOf(analysis, view));
  const columns = placeColumns(
    [...axisColumns(frame), ...logColumns(id, frame), ...railColumn(id, analysis, frame)],
    MARGIN,
  );
  const left = columns.right + 10;
  const layout = layTaxa(taxa, left);
  const answers = placeColumns(
    answerColumns(analysis, view, { timing, taxa, frame }),
    Math.max(layout.right, left + 40) + NAMES_CLEAR,
  );
  const horizons = drawnHorizons(analysis, frame);
  const right = answers.right + 6;
  const from = lineLeft(columns.placed);
  return setSheet({
    id,
    title: `${section.title}: timing, ${setWords(view.set)}`,
    subtitle: axisWords(frame),
    description: `${taxa.length} taxa of ${section.title}. ${timingNotes(timing, section, analysis.study.settings.confidence)[0]}`,
    right: Math.max(right + horizonLabelsWidth(horizons), layout.namesRight, MARGIN + SURVIVOR_WIDTH),
    bottom: span.bottom + Math.max(TICK_LABEL_DEPTH, layout.namesDepth),
    columns: [...columns.placed, ...answers.placed],
    body: (
      <g data-section={section.name}>
        <SurvivorLine x={MARGIN} y={MARGIN + 33} lines={lines} />
        <TaxaBlock {...{ analysis, layout, left, y }} title="" />
        <InfluenceMarks {...{ analysis, view, layout, y }} />
        {lens && <LensBreak x={from} width={right - from} y={y} lens={lens} />}
        <WasHorizons analysis={analysis} view={view} y={y} left={from} right={right} />
        <Horizons left={from} right={right} y={y} horizons={horizons} />
      </g>
    ),
    legend: [
      ...groupLegend(analysis, layout),
      ...rangeLegend(taxa, y),
      ...horizonLegend(horizons),
      ...(mostInfluential(analysis.timing.influence, view).length > 0
        ? [{ sign: { kind: "influential" }, label: "without it the level moves most" } as const]
        : []),
      ...(view.was === undefined ? [] : [{ sign: { kind: "was" }, label: "as it was" } as const]),
    ],
    notes: [...notesOf(analysis, view.set, { taxa, timing, frame }), ...lensNotes(frame)],
    panels: [{ section: section.name, left: MARGIN, right, ...span, scale: y }],
    view,
  });
}

function setOf({ timing }: Analysis, { section, set }: TimingView) {
  return timing.sets.find((candidate) => candidate.section === section && candidate.set === set);
}

function answersOf({ timing }: Analysis, { section, set }: TimingView) {
  return timing.answers.filter(
    (answer) => answer.section === section && answer.set === set && answer.taxon === undefined,
  );
}

function timingId({ study }: Analysis, { section, set }: TimingView): string {
  const sections = study.sections.map((candidate) => candidate.name);
  return `timing-${slugOf(section, sections, "section")}-${slugOf(set, [...MAIN_SETS, ...Object.keys(study.settings.timing.sets), set], "set")}`;
}

/** The sets that every section with taxa in question has. */
export const MAIN_SETS = ["candidates", "candidates-closed"] as const;

function setWords(set: string): string {
  if (set === "candidates") return "candidates";
  if (set === "candidates-closed") return "candidates that do not reach the top";
  return set.replace(/^group:/, "group ");
}

function notesOf(analysis: Analysis, set: string, { taxa, timing, frame }: Answered): readonly string[] {
  const { section } = frame;
  if (taxa.length === 0)
    return ["No taxon of this set is in question in this section: nothing can be asked."];
  const distrusted = analysis.timing.distrusted.some((one) => one.section === section.name && one.set === set)
    ? [
        "Recovery of these taxa declines upward (centroid): the levels and durations given here must not be trusted.",
      ]
    : [];
  return [...distrusted, ...timingNotes(timing, section, analysis.study.settings.confidence)];
}

import type { Analysis } from "../../core/analysis-result.ts";
import { TICK_LABEL_DEPTH } from "../columns/column-ground.tsx";
import { columnHeadWidth } from "../columns/column-head.tsx";
import { DURATION_WIDTH, DurationColumn } from "../columns/duration-column.tsx";
import { LevelColumn, levelColumnWidth } from "../columns/level-column.tsx";
import type { LegendEntry } from "../legend.tsx";
import { LensBreak } from "../marks/lens-break.tsx";
import { axisWords } from "./axis-words.ts";
import { defaultLens } from "./default-lens.ts";
import type { Drawing, SectionView } from "./drawing.ts";
import { type DrawnTaxon, drawnTaxa } from "./drawn-taxa.ts";
import { drawnHorizons, Horizons, horizonLabelsWidth, horizonLegend } from "./horizon-labels.tsx";
import { lensNotes } from "./lens-notes.ts";
import { axisColumns, lineLeft, logColumns, railColumn } from "./log-columns.tsx";
import { type PlateColumn, placeColumns } from "./plate-columns.ts";
import { BODY_TOP, MARGIN, setSheet } from "./plate-sheet.tsx";
import { scaleColumn } from "./scale-column.tsx";
import { groupSigns } from "./searched-groups.ts";
import { type SectionFrame, sectionFrame } from "./section-frame.ts";
import { slugOf } from "./slugs.ts";
import { SurvivorLine, survivorDepth, survivorLines } from "./survivor-line.tsx";
import { groupLegend, layTaxa, TaxaBlock } from "./taxa-block.tsx";
import { rangeLegend } from "./taxon-range.tsx";
import { type DrawnTiming, drawnTiming, timingNotes } from "./timing-words.ts";

export interface TimingView extends SectionView {
  /** Name of the set of taxa: `candidates`, `candidates-closed`, a group or a declared list. */
  readonly set: string;
}

const BODY_HEIGHT = 320;
const LEVEL_WIDTH = 46;
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
        {lens && <LensBreak x={from} width={right - from} y={y} lens={lens} />}
        <Horizons left={from} right={right} y={y} horizons={horizons} />
      </g>
    ),
    legend: [...groupLegend(analysis, layout), ...rangeLegend(taxa, y), ...horizonLegend(horizons)],
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

interface Answered {
  readonly timing: DrawnTiming;
  readonly taxa: readonly DrawnTaxon[];
  readonly frame: SectionFrame;
}

function answerColumns(
  analysis: Analysis,
  view: TimingView,
  { timing, taxa, frame }: Answered,
): readonly PlateColumn[] {
  const { y } = frame;
  const level = levelColumn(analysis, view, { timing, taxa, frame });
  const { durationLower, durationBoxes } = timing;
  const leastM = durationLower?.low;
  const mostM = durationBoxes[0]?.high;
  const scale = frame.lens ? [scaleColumn(y, frame.lens)] : [];
  if (taxa.length === 0 || (leastM === undefined && mostM === undefined)) return [...level, ...scale];
  const fromM = Math.max(...taxa.map((taxon) => taxon.lastM));
  const duration: PlateColumn = {
    key: "duration",
    width: Math.max(DURATION_WIDTH, columnHeadWidth("Duration", "least, most")),
    draw: (x) => <DurationColumn {...{ x, y, fromM, leastM, mostM }} />,
    legend: [{ sign: { kind: "duration" }, label: "height between the first and the last disappearance" }],
  };
  return [...level, duration, ...scale];
}

function levelColumn(
  analysis: Analysis,
  view: TimingView,
  { timing, frame }: Answered,
): readonly PlateColumn[] {
  const curve = analysis.timing.curves.find(
    ({ section, set }) => section === view.section && set === view.set,
  );
  const toSet = ({ low, high }: { readonly low?: number; readonly high?: number } = {}) =>
    low === undefined ? [] : [{ baseM: low, topM: high ?? frame.section.topM }];
  const [ifOne, joint] = [toSet(timing.ifOne), timing.joint.flatMap(toSet)];
  const points = curve?.heightsM.map((heightM, i) => ({ heightM, p: curve.p[i] })) ?? [];
  if (points.length === 0 && ifOne.length === 0 && joint.length === 0) return [];
  const { y } = frame;
  const limit = 1 - analysis.study.settings.confidence;
  const [title, unit] = ["One level", "p of ending here"];
  return [
    {
      key: "level",
      width: Math.max(levelColumnWidth(LEVEL_WIDTH), columnHeadWidth(title, unit)),
      draw: (x) => (
        <LevelColumn
          {...{ x, y, title, unit, limit, joint }}
          width={LEVEL_WIDTH}
          curve={points}
          ifOne={ifOne[0]}
        />
      ),
      legend: levelLegend({
        limit,
        hasCurve: points.length > 0,
        hasIfOne: ifOne.length > 0,
        hasJoint: joint.length > 0,
      }),
    },
  ];
}

interface LevelSigns {
  /** The p below which a level is refuted. */
  readonly limit: number;
  readonly hasCurve: boolean;
  readonly hasIfOne: boolean;
  readonly hasJoint: boolean;
}

function levelLegend({ limit, hasCurve, hasIfOne, hasJoint }: LevelSigns): readonly LegendEntry[] {
  const limitWords = `p = ${Number(limit.toPrecision(3))}`;
  return [
    ...(hasCurve ? [{ sign: { kind: "density" }, label: "p that all ended at this level" } as const] : []),
    ...(hasCurve ? [{ sign: { kind: "level-limit" }, label: limitWords } as const] : []),
    ...(hasIfOne ? [{ sign: { kind: "set-if-one" }, label: "where, if there was one level" } as const] : []),
    ...(hasJoint ? [{ sign: { kind: "set-joint" }, label: "levels not excluded" } as const] : []),
  ];
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

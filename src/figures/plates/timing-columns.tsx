import type { Analysis } from "../../core/analysis-result.ts";
import type { Scenario } from "../../core/timing/result.ts";
import { columnHeadWidth } from "../columns/column-head.tsx";
import { DURATION_WIDTH, DurationColumn } from "../columns/duration-column.tsx";
import { LastFindsColumn } from "../columns/last-finds-column.tsx";
import { LevelColumn, levelColumnWidth } from "../columns/level-column.tsx";
import { PosteriorColumn } from "../columns/posterior-column.tsx";
import type { LegendEntry } from "../legend.tsx";
import type { DrawnTaxon } from "./drawn-taxa.ts";
import type { PlateColumn } from "./plate-columns.ts";
import { scaleColumn } from "./scale-column.tsx";
import type { SectionFrame } from "./section-frame.ts";
import type { DrawnTiming } from "./timing-words.ts";

/** What a timing plate shows beside its ranges. */
export interface TimingAsked {
  readonly section: string;
  readonly set: string;
  /** Where the levels lie (the default), or the last-occurrence curve against one common end. */
  readonly shows?: "levels" | "last-finds";
  /** The scenario whose levels are drawn; default the one with levels that has the most weight. */
  readonly scenario?: Scenario;
  readonly was?: Analysis;
}

export interface Answered {
  readonly timing: DrawnTiming;
  readonly taxa: readonly DrawnTaxon[];
  readonly frame: SectionFrame;
}

const LEVEL_WIDTH = 46;
const POSTERIOR_WIDTH = 46;
const LASTS_WIDTH = 96;

/** The columns at the right of the ranges: densities of levels, p along the section, durations; or the last finds. */
export function answerColumns(
  analysis: Analysis,
  asked: TimingAsked,
  answered: Answered,
): readonly PlateColumn[] {
  const { y, lens } = answered.frame;
  const scale = lens ? [scaleColumn(y, lens)] : [];
  if (asked.shows === "last-finds") return [...lastFindsColumn(analysis, asked, answered), ...scale];
  return [
    ...posteriorColumn(analysis, asked, answered),
    ...levelColumn(analysis, asked, answered),
    ...durationColumn(answered),
    ...scale,
  ];
}

const titles: Readonly<Partial<Record<Scenario, string>>> = {
  single: "if one level",
  "pulses-2": "if two pulses",
  "pulses-3": "if three pulses",
  "pulses-4": "if four pulses",
};

function posteriorColumn(
  analysis: Analysis,
  asked: TimingAsked,
  { frame: { y } }: Answered,
): readonly PlateColumn[] {
  const here = analysis.timing.densities.filter(
    (one) => one.section === asked.section && one.set === asked.set,
  );
  const isThere = here.some((one) => one.scenario === asked.scenario);
  const scenario = isThere ? asked.scenario : leadingLevels(analysis, asked);
  const levels = here.filter((one) => one.scenario === scenario);
  if (scenario === undefined || levels.length === 0) return [];
  const [title, unit] = ["Where", titles[scenario] ?? ""];
  return [
    {
      key: "posterior",
      width: Math.max(POSTERIOR_WIDTH, columnHeadWidth(title, unit)),
      draw: (x) => <PosteriorColumn {...{ x, y, title, unit, levels }} width={POSTERIOR_WIDTH} />,
      legend: [{ sign: { kind: "posterior" }, label: `density of each level, ${unit}` }],
    },
  ];
}

/** The scenario with levels of its own that has the most weight; one level where none is weighed. */
export function leadingLevels(
  { timing }: Analysis,
  { section, set }: Pick<TimingAsked, "section" | "set">,
): Scenario | undefined {
  const isHere = (one: { readonly section: string; readonly set: string }) =>
    one.section === section && one.set === set;
  const drawn = [...new Set(timing.densities.filter(isHere).map(({ scenario }) => scenario))];
  const weightOf = (scenario: Scenario) =>
    timing.scenarios
      .filter((row) => isHere(row) && row.variant === undefined && isOf(row.scenario, scenario))
      .reduce((sum, { probability = 0 }) => sum + probability, 0);
  return drawn.toSorted((a, b) => weightOf(b) - weightOf(a))[0];
}

const isOf = (scenario: Scenario, levels: Scenario): boolean =>
  scenario === levels || (levels === "single" && scenario === "at-horizon");

function durationColumn({ timing, taxa, frame: { y } }: Answered): readonly PlateColumn[] {
  const leastM = timing.durationLower?.low;
  const mostM = timing.durationBoxes[0]?.high;
  if (taxa.length === 0 || (leastM === undefined && mostM === undefined)) return [];
  const fromM = Math.max(...taxa.map((taxon) => taxon.lastM));
  return [
    {
      key: "duration",
      width: Math.max(DURATION_WIDTH, columnHeadWidth("Duration", "least, most")),
      draw: (x) => <DurationColumn {...{ x, y, fromM, leastM, mostM }} />,
      legend: [{ sign: { kind: "duration" }, label: "height between the first and the last disappearance" }],
    },
  ];
}

function levelColumn(
  analysis: Analysis,
  asked: TimingAsked,
  { timing, frame }: Answered,
): readonly PlateColumn[] {
  const curveOf = (one: Analysis) =>
    one.timing.curves.find(({ section, set }) => section === asked.section && set === asked.set);
  const pointsOf = (one: Analysis) => {
    const curve = curveOf(one);
    return curve?.heightsM.map((heightM, i) => ({ heightM, p: curve.p[i] ?? 0 })) ?? [];
  };
  const toSet = ({ low, high }: { readonly low?: number; readonly high?: number } = {}) =>
    low === undefined ? [] : [{ baseM: low, topM: high ?? frame.section.topM }];
  const [ifOne, joint] = [toSet(timing.ifOne), timing.joint.flatMap(toSet)];
  const points = pointsOf(analysis);
  const ghost = asked.was && curveOf(asked.was) !== curveOf(analysis) ? pointsOf(asked.was) : [];
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
          {...{ x, y, title, unit, limit, joint, ghost }}
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

function lastFindsColumn(
  analysis: Analysis,
  { section, set }: TimingAsked,
  { frame: { y } }: Answered,
): readonly PlateColumn[] {
  const points = analysis.timing.lastFinds
    .filter((point) => point.section === section && point.set === set)
    .toSorted((a, b) => a.positionM - b.positionM);
  if (points.length === 0) return [];
  const [title, unit] = ["Last finds", "number above each level"];
  const level = `${Number((100 * (points[0]?.level ?? 0)).toPrecision(4))}\u00a0%`;
  return [
    {
      key: "last-finds",
      width: Math.max(LASTS_WIDTH, columnHeadWidth(title, unit)),
      draw: (x) => <LastFindsColumn {...{ x, y, title, unit, points }} width={LASTS_WIDTH} />,
      legend: [
        { sign: { kind: "observed-lasts" }, label: "last finds above" },
        { sign: { kind: "expected-lasts" }, label: "expected of one common end" },
        { sign: { kind: "band-each" }, label: `${level} at each level` },
        { sign: { kind: "band-all" }, label: `${level} at all levels together` },
      ],
    },
  ];
}

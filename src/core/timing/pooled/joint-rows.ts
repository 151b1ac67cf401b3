import { exp } from "../../numeric/elementary.ts";
import { note } from "../../ranges/range-case.ts";
import type { LeftOut, Offset, ScenarioWeight, TimingAnswer } from "../result.ts";
import { DOUBLED, HALVED, OWN } from "../scenarios/evidence.ts";
import type { LevelPosterior } from "../scenarios/level-posterior.ts";
import { highestDensity } from "./highest-density.ts";
import type { JointSet } from "./joint-set.ts";
import { taxaOf } from "./pooled-sets.ts";
import type { PooledTarget } from "./pooled-targets.ts";

/** The section of rows about all sections together. */
export const JOINT = "joint";

/** What every row about a set in several sections shares. */
function commonOf({ set, target }: JointSet) {
  const taxa = taxaOf(set).length;
  return {
    section: JOINT,
    set: set.set,
    ...(set.group === undefined ? {} : { group: set.group }),
    horizon: target.horizon,
    taxa,
    taxaOfSet: taxa,
  } as const satisfies Partial<TimingAnswer>;
}

const namesOf = ({ set }: JointSet) => set.cases.map(({ section }) => section.name).join(", ");

/** `one-level: common-end` over sections: could the sections share one level? */
export function oneLevelRow(joint: JointSet): TimingAnswer {
  const { between, isExact } = joint;
  const fields = { ...commonOf(joint), question: "one-level", method: "common-end" } as const;
  if (between === undefined)
    return { ...fields, outcome: "undefined", note: "fewer than two sections with an informative range" };
  return {
    ...fields,
    ...(isExact ? { testStatistic: between.statistic, df: between.df } : {}),
    p: between.p,
    outcome: "closed",
    note: note(
      `between ${between.sections} sections, each pooled as one`,
      !isExact && "the largest p over the intervals of their picks",
    ),
  };
}

/** Median, ends of an equal-tailed interval and chance of being younger, from a level of the scale. */
function summaryOf(posterior: LevelPosterior, confidence: number, origin: number) {
  const tail = 0.5 * (1 - confidence);
  return {
    median: posterior.quantile(0.5) - origin,
    low: posterior.quantile(tail) - origin,
    high: posterior.quantile(1 - tail) - origin,
    probabilityAfter: Math.min(1, Math.max(0, 1 - posterior.cdf(origin))),
  };
}

/** `where`: the level that all share, equal-tailed and densest, and without each section. */
export function whereRows(joint: JointSet): TimingAnswer[] {
  const { level, target, confidence } = joint;
  const { unit } = target.scale;
  const fields = { ...commonOf(joint), question: "where", level: confidence, unit } as const;
  const { posterior } = level;
  const sections = `${joint.set.cases.length} sections: ${namesOf(joint)}`;
  if (posterior === undefined)
    return [{ ...fields, method: "pooled-offset", outcome: "empty", note: note("no level fits", sections) }];
  const { median, low, high } = summaryOf(posterior, confidence, target.origin);
  const densest = highestDensity(posterior, confidence);
  return [
    { ...fields, method: "pooled-offset", estimate: median, low, high, outcome: "closed", note: sections },
    ...densest.map(
      (piece, i): TimingAnswer => ({
        ...fields,
        method: "pooled-offset-densest",
        ...(densest.length > 1 ? { part: i + 1 } : {}),
        low: piece.low - target.origin,
        high: piece.high - target.origin,
        outcome: "closed",
        note: sections,
      }),
    ),
    ...sampledRow(joint, fields),
    ...leftOutOf(joint).map(
      (one): TimingAnswer => ({
        ...fields,
        method: "pooled-offset-without",
        estimate: one.median,
        low: one.low,
        high: one.high,
        outcome: "closed",
        note: `without ${one.without}`,
      }),
    ),
  ];
}

type WhereFields = Omit<TimingAnswer, "method" | "outcome" | "note">;

/** The same from the horizons searched, which a level can only lie between. */
function sampledRow({ sampled, confidence, target }: JointSet, fields: WhereFields): TimingAnswer[] {
  if (sampled === undefined) return [];
  const { median, low, high } = summaryOf(sampled, confidence, target.origin);
  return [
    {
      ...fields,
      method: "pooled-offset-sampled",
      estimate: median,
      low,
      high,
      outcome: "closed",
      note: "from the horizons searched, found or barren",
    },
  ];
}

export function leftOutOf({ set, level, target, confidence }: JointSet): LeftOut[] {
  return level.without.flatMap(({ section, posterior }) =>
    posterior === undefined
      ? []
      : [
          {
            set: set.set,
            without: section,
            horizon: target.horizon,
            ...summaryOf(posterior, confidence, target.origin),
            level: confidence,
            unit: target.scale.unit,
          },
        ],
  );
}

export function offsetOf(
  { set, confidence }: JointSet,
  { horizon, scale, origin }: PooledTarget,
  posterior: LevelPosterior | undefined,
): Offset[] {
  if (posterior === undefined) return [];
  return [
    {
      section: JOINT,
      set: set.set,
      scenario: "single",
      horizon,
      ...summaryOf(posterior, confidence, origin),
      level: confidence,
      unit: scale.unit,
    },
  ];
}

const variants = [
  { top: OWN },
  { top: HALVED, variant: "window-halved" },
  { top: DOUBLED, variant: "window-doubled" },
] as const;

/**
 * One level common to all sections (`single`) against a level of its own in each (`independent`), equally likely
 * beforehand, with the window's reach above the highest last find as declared, halved and doubled.
 */
export function weightsOf(joint: JointSet): ScenarioWeight[] {
  return variants.flatMap(({ top, ...variant }): ScenarioWeight[] => {
    const common = joint.level.common[top];
    const free = joint.level.free[top];
    const fields = { section: JOINT, set: joint.set.set, ...variant, prior: 0.5 };
    const row = (scenario: "single" | "independent", own: number, other: number): ScenarioWeight => ({
      ...fields,
      scenario,
      ...(Number.isFinite(own) ? { logEvidence: own } : {}),
      ...(Number.isFinite(own) || Number.isFinite(other) ? { probability: shareOf(own, other) } : {}),
      note:
        scenario === "single"
          ? "one level common to all sections"
          : "one level a section, each free of the others",
    });
    return [row("single", common, free), row("independent", free, common)];
  });
}

/** Probability of one of two ideas that were equally likely, from ln of their evidence. */
export function shareOf(own: number, other: number): number {
  if (own === Number.NEGATIVE_INFINITY) return 0;
  return 1 / (1 + exp(Math.min(700, other - own)));
}

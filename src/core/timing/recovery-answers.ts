import { type Centroid, centroid, rescaledInterior } from "../ranges/checks/centroid.ts";
import { detectableDecline } from "../ranges/checks/detectable-decline.ts";
import { distance } from "../ranges/checks/distance.ts";
import { gapTrend } from "../ranges/checks/gap-trend.ts";
import { gapsOf } from "../ranges/checks/gaps.ts";
import { largestGap } from "../ranges/checks/largest-gap.ts";
import { fisherPooled } from "../ranges/checks/pooled.ts";
import { gapRuns } from "../ranges/checks/runs.ts";
import { note } from "../ranges/range-case.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TimingAnswer, TimingMethod } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";
import { allCandidates } from "./sets.ts";

export { DECLINE_GATE } from "../ranges/checks/decline.ts";

/** Centroid of all interior finds of a set. */
export function pooledCentroid(ranges: readonly TaxonRange[]): Centroid | undefined {
  return centroid(ranges.flatMap((range) => rescaledInterior(range.levels)));
}

interface Check {
  readonly statistic: number;
  readonly df?: number;
  readonly p: number;
  readonly words: string;
}

interface CheckedTaxon {
  readonly levels: readonly number[];
  readonly test: Check;
}

/** One pre-check of constant recovery: of one taxon, and of several together. */
interface Precheck {
  readonly method: TimingMethod;
  readonly ofTaxon: (levels: readonly number[]) => Check | undefined;
  readonly pooled: (taxa: readonly CheckedTaxon[]) => Check | undefined;
  readonly reason: string;
}

const withoutInterior = "no find between the first and the last";

const checks: readonly Precheck[] = [
  {
    method: "centroid",
    ofTaxon: (levels) => centroidCheck(rescaledInterior(levels)),
    pooled: (taxa) => withDetectable(centroidCheck(interiorOf(taxa)), taxa),
    reason: withoutInterior,
  },
  {
    method: "distance",
    ofTaxon: (levels) => distanceCheck(rescaledInterior(levels)),
    pooled: (taxa) => distanceCheck(interiorOf(taxa)),
    reason: withoutInterior,
  },
  {
    method: "gap-trend",
    ofTaxon: gapTrendCheck,
    pooled: (taxa) => fisherCheck(taxa, "gaps that lengthen upward"),
    reason: "fewer than two unequal gaps",
  },
  {
    method: "runs",
    ofTaxon: runsCheck,
    pooled: (taxa) => fisherCheck(taxa, "few runs"),
    reason: "no gaps on both sides of their median",
  },
  {
    method: "largest-gap",
    ofTaxon: largestGapCheck,
    pooled: (taxa) => fisherCheck(taxa, "a gap as long as this"),
    reason: "fewer than two gaps",
  },
];

/** `recovery`: is it constant, and does it decline upward? Pooled for every set, taxon by taxon for the candidates. */
export function recoveryAnswers(setCase: SetCase): TimingAnswer[] {
  const { ranges, set } = setCase.set;
  return checks.flatMap((check) => {
    const tests = ranges.map(({ levels }) => ({ levels, test: check.ofTaxon(levels) }));
    const entered = tests.flatMap(({ levels, test }) => (test === undefined ? [] : [{ levels, test }]));
    const pooled = answer(setCase, check, { taxa: entered.length, test: check.pooled(entered) });
    if (set !== allCandidates) return [pooled];
    const single = ranges.map(({ group, taxon }, i) => ({
      ...answer(setCase, check, { taxa: 1, test: tests[i].test }),
      group,
      taxon,
    }));
    return [pooled, ...single];
  });
}

interface Checked {
  readonly taxa: number;
  readonly test: Check | undefined;
}

function answer(setCase: SetCase, { method, reason }: Precheck, { taxa, test }: Checked): TimingAnswer {
  const fields = { ...commonFields(setCase, taxa), question: "recovery", method } as const;
  if (test === undefined) return { ...fields, outcome: "undefined", note: reason };
  const df = test.df === undefined ? {} : { df: test.df };
  return { ...fields, testStatistic: test.statistic, ...df, p: test.p, outcome: "closed", note: test.words };
}

function centroidCheck(interior: readonly number[]): Check | undefined {
  const test = centroid(interior);
  return (
    test && {
      statistic: test.z,
      p: test.p,
      words: `${test.finds} finds between first and last; p is for decline upward`,
    }
  );
}

/** A large p says little where only a steep decline would have been seen: how steep is told. */
function withDetectable(check: Check | undefined, taxa: readonly CheckedTaxon[]): Check | undefined {
  if (check === undefined) return undefined;
  const mu = detectableDecline(taxa.map(({ levels }) => levels.length));
  const words =
    mu === undefined
      ? "no decline would be seen with 80% power"
      : `least decline seen with 80% power: (1 - x)^${mu.toFixed(2)}`;
  return { ...check, words: note(check.words, words) };
}

function distanceCheck(interior: readonly number[]): Check | undefined {
  const test = distance(interior);
  return (
    test && { statistic: test.statistic, p: test.p, words: `${test.finds} finds between first and last` }
  );
}

function gapTrendCheck(levels: readonly number[]): Check | undefined {
  const test = gapTrend(gapsOf(levels));
  return (
    test && {
      statistic: test.tau,
      p: test.p,
      words: `Kendall's tau of ${test.gaps} gaps, Spearman's rho ${test.rho.toFixed(3)}; p is for gaps that lengthen upward`,
    }
  );
}

function runsCheck(levels: readonly number[]): Check | undefined {
  const test = gapRuns(gapsOf(levels));
  return (
    test && {
      statistic: test.runs,
      p: test.p,
      words: `${test.longer} gaps above and ${test.shorter} below the median; p is for few runs`,
    }
  );
}

function largestGapCheck(levels: readonly number[]): Check | undefined {
  const test = largestGap(gapsOf(levels));
  return (
    test && { statistic: test.share, p: test.p, words: "share of the range; p is for a gap as long as this" }
  );
}

function fisherCheck(taxa: readonly CheckedTaxon[], what: string): Check | undefined {
  const pooled = fisherPooled(taxa.map(({ test }) => test.p));
  return pooled && { ...pooled, words: `Fisher's combination of ${taxa.length} taxa; p is for ${what}` };
}

const interiorOf = (taxa: readonly CheckedTaxon[]) => taxa.flatMap(({ levels }) => rescaledInterior(levels));

import type { Study } from "../study/model.ts";
import { oneLevelAnswer, whereAnswers } from "./common-end-answers.ts";
import { levelTest } from "./confidence-levels.ts";
import { durationAnswers } from "./duration-answers.ts";
import { horizonAnswers } from "./horizon-answers.ts";
import { levelCurve } from "./level-curve.ts";
import type { LevelCurve, TimingAnswer } from "./result.ts";
import { sectionCases, type TimingInput } from "./section-cases.ts";
import { stepsAnswers } from "./steps-answers.ts";
import { halfIntervalsWhere, twoHighestWhere } from "./where-answers.ts";

/** Steps of the curve of p while it follows a hand. */
const COARSE = 20;

export interface ExactAnswers {
  readonly answers: readonly TimingAnswer[];
  readonly curves: readonly LevelCurve[];
}

export interface AskedSet {
  readonly section: string;
  readonly set: string;
  /** The curve of p, which leans on the finds alone, is left out where it is not wanted. */
  readonly isCurveWanted?: boolean;
}

/**
 * The answers about one set that have a closed form: one level, where, at which horizon, how gradual, steps apart, and the
 * curve of p. Nothing is drawn at random and nothing integrated, so that they follow the hand.
 */
export function exactAnswers(study: Study, input: TimingInput, asked: AskedSet): ExactAnswers {
  const found = caseOf(study, input, asked);
  if (found === undefined) return { answers: [], curves: [] };
  const { setCase, window } = found;
  return {
    answers: [
      oneLevelAnswer(setCase),
      ...whereAnswers(setCase),
      halfIntervalsWhere(setCase),
      ...twoHighestWhere(setCase),
      ...horizonAnswers(setCase),
      ...durationAnswers(setCase),
      ...stepsAnswers(setCase),
    ],
    curves:
      window === undefined || asked.isCurveWanted === false
        ? []
        : [levelCurve(setCase, window, COARSE) ?? []].flat(),
  };
}

/** What is said of one level at which all taxa of a set might have ended. */
export interface LevelFacts {
  /** p of `confidence-levels` at this level; absent where no range is informative. */
  readonly p?: number;
  /** Taxa found above it. */
  readonly above: number;
  readonly taxa: number;
}

/** Could all taxa of a set have ended at this height? Undefined where the section has no such set. */
export function levelFacts(
  study: Study,
  input: TimingInput,
  { heightM, ...asked }: AskedSet & { readonly heightM: number },
): LevelFacts | undefined {
  const found = caseOf(study, input, asked);
  if (found === undefined) return undefined;
  const { set, coordinate } = found.setCase;
  const test = levelTest(set.ranges, coordinate.toEffective(heightM));
  return {
    ...(test === undefined ? {} : { p: test.p }),
    above: set.ranges.filter(({ lastM }) => lastM > heightM).length,
    taxa: set.ranges.length,
  };
}

function caseOf(study: Study, input: TimingInput, { section: name, set }: AskedSet) {
  const section = study.sections.find((candidate) => candidate.name === name);
  if (section === undefined) return undefined;
  const candidates = input.candidates.filter((candidate) => candidate.section === name);
  const { cases, window } = sectionCases(section, study, { ...input, candidates });
  const setCase = cases.find((one) => one.set.set === set);
  return setCase && { setCase, window };
}

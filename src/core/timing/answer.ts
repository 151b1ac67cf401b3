import type { Caution, Progress } from "../basis.ts";
import type { Section, Study } from "../study/model.ts";
import { timingBasis } from "./basis.ts";
import { besideCautions, comparedCautions, setCaseCautions, topCautions } from "./cautions.ts";
import { influence } from "./influence.ts";
import { lastFindsCurve } from "./last-finds-curve.ts";
import { levelCurve } from "./level-curve.ts";
import { jointAnswers } from "./pooled/joint-answers.ts";
import { DECLINE_GATE, pooledCentroid } from "./recovery-answers.ts";
import type { LevelCurve, Timing, TimingAnswer } from "./result.ts";
import { type ScenarioAnswers, scenarioAnswers } from "./scenarios/answers.ts";
import { sectionCases, type TimingInput } from "./section-cases.ts";
import { answerSet } from "./set-answers.ts";
import type { SetCase } from "./set-case.ts";
import { sharedRecoveryCautions } from "./set-coordinate.ts";
import { allCandidates, setCautions } from "./sets.ts";
import { stepCautions } from "./steps.ts";
import type { TimingWindow } from "./window.ts";

/**
 * The questions about assemblages, section by section and set by set: could the taxa have ended together, where, at
 * which horizon, how gradually, and can the methods be trusted there. Only candidates enter; others are named beside.
 */
export function answerTiming(study: Study, input: TimingInput, progress?: Progress): Timing {
  const answered = study.sections.map((section, index) => {
    progress?.(`timing: ${section.name}`, index, study.sections.length);
    return answerSection(section, study, { ...input, progress });
  });
  const joint = jointAnswers(
    answered.flatMap((a) => a.cases),
    study,
    { ...input, progress },
  );
  return {
    sets: [
      ...answered.flatMap((a) => a.cases.map(({ set: { ranges: _ranges, ...set } }) => set)),
      ...joint.sets,
    ],
    answers: [...answered.flatMap((a) => [...a.answers, ...a.compared.answers]), ...joint.answers],
    curves: answered.flatMap((a) => a.curves),
    scenarios: [...answered.flatMap((a) => a.compared.scenarios), ...joint.scenarios],
    offsets: [...answered.flatMap((a) => a.compared.offsets), ...joint.offsets],
    membership: answered.flatMap((a) => a.compared.membership),
    densities: [...answered.flatMap((a) => a.compared.densities), ...joint.densities],
    leftOut: joint.leftOut,
    lastFinds: answered.flatMap((a) => a.lastFinds),
    influence: answered.flatMap((a) => a.influence),
    distrusted: answered.flatMap((a) => a.distrusted),
    cautions: [...answered.flatMap((a) => [...a.cautions, ...a.compared.cautions]), ...joint.cautions],
    basis: timingBasis,
  };
}

interface AnsweredSection {
  readonly cases: readonly SetCase[];
  readonly answers: readonly TimingAnswer[];
  readonly compared: ScenarioAnswers;
  readonly curves: readonly LevelCurve[];
  readonly lastFinds: Timing["lastFinds"];
  readonly influence: Timing["influence"];
  readonly distrusted: Timing["distrusted"];
  readonly cautions: readonly Caution[];
}

interface SectionInput extends TimingInput {
  readonly progress: Progress | undefined;
}

function answerSection(section: Section, study: Study, input: SectionInput): AnsweredSection {
  const candidates = input.candidates.filter((c) => c.section === section.name);
  const beside = besideCautions(section.name, candidates);
  const { cases, window } = sectionCases(section, study, { ...input, candidates });
  const declared = study.settings.timing.sets;
  const ranges = cases.find(({ set }) => set.set === allCandidates)?.set.ranges ?? [];
  const cautions = [
    ...cases.flatMap(setCaseCautions),
    ...topCautions(cases),
    ...comparedCautions(cases),
    ...windowCautions(section, window),
    ...setCautions(section.name, ranges, declared),
    ...sharedRecoveryCautions(
      section.name,
      cases.map(({ set }) => set),
      study.settings,
    ),
    ...stepCautions(section.name, ranges, study.settings),
    ...beside,
  ];
  return {
    cases,
    answers: cases.flatMap(answerSet),
    compared: scenarioAnswers(cases, { window, taxa: input.taxa, progress: input.progress }),
    curves: cases.flatMap((setCase) => (window === undefined ? [] : (levelCurve(setCase, window) ?? []))),
    lastFinds: cases.flatMap(lastFindsCurve),
    influence: window === undefined ? [] : cases.flatMap((setCase) => influenceIn(setCase, window)),
    distrusted: cases
      .filter(({ set }) => declines(set.ranges))
      .map(({ set }) => ({ section: section.name, set: set.set })),
    cautions,
  };
}

/** Of the candidates and each declared list: leaving out one taxon after another takes its time. */
function influenceIn(
  { section, set, coordinate, settings }: SetCase,
  { lowM, highM }: TimingWindow,
): Timing["influence"] {
  const isAsked = set.set === allCandidates || set.set in settings.timing.sets;
  if (!isAsked || set.ranges.length < FEWEST_LEFT) return [];
  return influence(set.ranges, { section: section.name, set: set.set, coordinate, lowM, highM });
}

/** Without one of them at least two taxa are left. */
const FEWEST_LEFT = 3;

/** True where the pre-check of these taxa says that recovery falls upward. */
function declines(ranges: Parameters<typeof pooledCentroid>[0]): boolean {
  const pooled = pooledCentroid(ranges);
  return pooled !== undefined && pooled.p < DECLINE_GATE;
}

function windowCautions(section: Section, window: TimingWindow | undefined): Caution[] {
  if (window === undefined || !window.isWidened) return [];
  const { lowM, highM } = window;
  return [{ code: "timing-window-widened", section: section.name, numbers: { lowM, highM } }];
}

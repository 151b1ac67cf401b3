import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import type { Offset, ScenarioWeight, TimingAnswer, TimingMethod } from "../../core/timing/result.ts";

/** What is told of one set in one section, gathered from the rows about it. */
export interface TimingCase {
  readonly analysis: Analysis;
  readonly section: Section;
  readonly set: string;
  readonly answers: readonly TimingAnswer[];
  readonly by: (method: TimingMethod) => TimingAnswer | undefined;
  /** The scenarios compared under the declared priors, the likeliest first. */
  readonly weights: readonly Weight[];
  /** Of the scenario of most weight with levels of its own, from each horizon. */
  readonly offsets: readonly Offset[];
  /** The name of the main horizon here. */
  readonly main?: string;
  readonly isDistrusted: boolean;
}

export interface Weight extends ScenarioWeight {
  readonly prior: number;
  readonly probability: number;
}

export function timingCase(analysis: Analysis, section: Section, set: string): TimingCase {
  const { timing, markers } = analysis;
  const isHere = (one: { readonly section?: string; readonly set?: string }) =>
    one.section === section.name && one.set === set;
  const answers = timing.answers.filter((answer) => isHere(answer) && answer.taxon === undefined);
  const weights = timing.scenarios
    .flatMap((row): readonly Weight[] => {
      const { variant, prior = 0, probability } = row;
      const isCompared = isHere(row) && variant === undefined && prior > 0;
      return isCompared && probability !== undefined ? [{ ...row, prior, probability }] : [];
    })
    .toSorted((a, b) => b.probability - a.probability);
  const levels = leadOf(weights)?.kind ?? "one-level";
  const scenario = levels === "one-level" || levels === "gradual" ? "single" : levels;
  return {
    analysis,
    section,
    set,
    answers,
    by: (method) => answers.find((answer) => answer.method === method),
    weights,
    offsets: timing.offsets.filter((offset) => isHere(offset) && offset.scenario === scenario),
    main: markers.main.bySection.get(section.name)?.horizon,
    isDistrusted: timing.distrusted.some(isHere),
  };
}

/** Scenarios of one kind together: one level, anywhere or at a horizon; so many pulses; a gradual end. */
export interface Lead {
  readonly kind: "one-level" | "gradual" | "independent" | "pulses-2" | "pulses-3" | "pulses-4";
  readonly prior: number;
  readonly probability: number;
  /** Of one level, the horizon that holds more than half of the weight of all. */
  readonly horizon?: string;
}

/** The kinds of scenarios with their weight, the heaviest first. */
export function leadsOf(weights: readonly Weight[]): readonly Lead[] {
  const kinds = [...new Set(weights.map(({ scenario }) => kindOf(scenario)))];
  return kinds
    .map((kind): Lead => {
      const own = weights.filter(({ scenario }) => kindOf(scenario) === kind);
      const sum = (of: (weight: Weight) => number) => own.reduce((total, one) => total + of(one), 0);
      const horizon = own.find((one) => one.horizon !== undefined && one.probability > 0.5)?.horizon;
      return {
        kind,
        prior: sum(({ prior }) => prior),
        probability: Math.min(
          1,
          sum(({ probability }) => probability),
        ),
        ...(horizon === undefined ? {} : { horizon }),
      };
    })
    .toSorted((a, b) => b.probability - a.probability);
}

export const leadOf = (weights: readonly Weight[]): Lead | undefined => leadsOf(weights)[0];

function kindOf(scenario: ScenarioWeight["scenario"]): Lead["kind"] {
  return scenario === "single" || scenario === "at-horizon" || scenario === "among-horizons"
    ? "one-level"
    : scenario;
}

import type { Caution, Progress } from "../../basis.ts";
import type { LocalTaxon } from "../../study/finds-result.ts";
import type { Membership, Offset, ScenarioDensity, ScenarioWeight, TimingAnswer } from "../result.ts";
import type { SetCase } from "../set-case.ts";
import { allCandidates, untrimmedCandidates, withoutIsolated } from "../sets.ts";
import type { TimingWindow } from "../window.ts";
import { scenarioCautions } from "./cautions.ts";
import { OWN, type ScenarioProblem, scenarioEvidence } from "./evidence.ts";
import { densitiesOf, levelsOf, membershipOf, offsetsOf } from "./level-rows.ts";
import { problemOf, withConstantRecovery, withSampledHorizons } from "./problem.ts";
import { durationAnswer, pulsesAnswers } from "./timing-rows.ts";
import { ownVariant, type Variant, variantsOf } from "./variants.ts";
import { atMostRows, weigh, weightRows } from "./weights.ts";

export interface ScenarioAnswers {
  readonly answers: readonly TimingAnswer[];
  readonly scenarios: readonly ScenarioWeight[];
  readonly offsets: readonly Offset[];
  readonly membership: readonly Membership[];
  readonly densities: readonly ScenarioDensity[];
  readonly cautions: readonly Caution[];
}

interface Inputs {
  readonly window: TimingWindow | undefined;
  /** The taxa of the section, for the horizons searched. */
  readonly taxa: readonly LocalTaxon[];
  readonly progress?: Progress | undefined;
}

/** Sets that repeat the candidates with another judgement about single finds: the other answers tell whether it matters. */
const judged: ReadonlySet<string> = new Set([withoutIsolated, untrimmedCandidates]);

const nothing: ScenarioAnswers = {
  answers: [],
  scenarios: [],
  offsets: [],
  membership: [],
  densities: [],
  cautions: [],
};

/**
 * The scenarios of every set of at least two taxa compared: their evidence under declared priors and under each change of
 * them, the levels, offsets, memberships and duration that they imply, and what weakens the comparison. `progress` is
 * called between steps of long work.
 */
export function scenarioAnswers(cases: readonly SetCase[], inputs: Inputs): ScenarioAnswers {
  const { window } = inputs;
  if (window === undefined) return nothing;
  const each = cases
    .filter(({ set }) => set.ranges.length >= 2 && !judged.has(set.set))
    .map((setCase) => answersOf(setCase, { ...inputs, window }));
  return {
    answers: each.flatMap((a) => a.answers),
    scenarios: each.flatMap((a) => a.scenarios),
    offsets: each.flatMap((a) => a.offsets),
    membership: each.flatMap((a) => a.membership),
    densities: each.flatMap((a) => a.densities),
    cautions: each.flatMap((a) => a.cautions),
  };
}

function answersOf(
  setCase: SetCase,
  { window, taxa, progress }: Inputs & { readonly window: TimingWindow },
): ScenarioAnswers {
  const { section, set, settings, confidence } = setCase;
  const name = `scenarios: ${section.name}, ${set.set}`;
  const step = progress && ((done: number, total: number) => progress(name, done, total));
  step?.(0, 1);
  const anywhere = problemOf(setCase, window, step);
  const searched = withSampledHorizons(anywhere, setCase, taxa);
  const isSearched = searched !== undefined && isFromSearches(setCase);
  const problem = isSearched ? searched : anywhere;
  const evidence = scenarioEvidence(problem);
  const constant = withConstantRecovery(anywhere, setCase);
  const variants = [
    ...variantsOf(evidence),
    ...otherForm(setCase, "constant-recovery", constant),
    ...(isSearched ? otherForm(setCase, "continuous", anywhere) : otherForm(setCase, "sampled", searched)),
  ];
  const place = { section: section.name, set: set.set };
  const weighed = variants.map((variant) => weigh(variant, problem.horizons, settings.timing));
  const levels = levelsOf(evidence);
  return {
    answers: [...durationAnswer(setCase, evidence), ...pulsesAnswers(setCase, weighed[OWN])],
    scenarios: [
      ...variants.flatMap((variant, v) =>
        weightRows(place, variant, { weighed: weighed[v], horizons: problem.horizons }),
      ),
      ...atMostRows(place, evidence, set.ranges.length),
    ],
    offsets: offsetsOf(place, levels, { horizons: setCase.horizons, confidence }),
    membership: membershipOf(place, evidence, set.taxa),
    densities: densitiesOf(place, levels),
    cautions: scenarioCautions(setCase, { problem, evidence, variants, weighed }),
  };
}

/**
 * Whether a taxon can have been found in the samples searched for its group alone, so that nothing is known of an end
 * between two of them: searches are listed, and neither recovery by facies or table nor misplaced finds are declared,
 * which only finds that could lie anywhere can follow.
 */
function isFromSearches({ section, set, settings }: SetCase): boolean {
  const groups = new Set(set.ranges.map((range) => range.group));
  const { recovery } = settings.ranges;
  return (
    (recovery === "uniform" || recovery === "effort") &&
    settings.timing.contamination === 0 &&
    section.searches.every((search) => !search.derived || !groups.has(search.group))
  );
}

/** The comparison under another form of the finds: for all candidates alone. */
function otherForm({ set }: SetCase, name: string, problem: ScenarioProblem | undefined): readonly Variant[] {
  return problem === undefined || set.set !== allCandidates
    ? []
    : [ownVariant(name, scenarioEvidence(problem, "none"))];
}

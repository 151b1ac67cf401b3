import type { Caution, Progress } from "../../basis.ts";
import type { LocalTaxon } from "../../study/finds-result.ts";
import type { Study } from "../../study/model.ts";
import type { LeftOut, Offset, ScenarioDensity, ScenarioWeight, TaxonSet, TimingAnswer } from "../result.ts";
import type { LevelPosterior } from "../scenarios/level-posterior.ts";
import { densitiesOf } from "../scenarios/level-rows.ts";
import type { TimingInput } from "../section-cases.ts";
import type { SetCase } from "../set-case.ts";
import { allCandidates } from "../sets.ts";
import { timingWindow } from "../window.ts";
import { betweenSections } from "./between-sections.ts";
import type { CommonScale } from "./common-scale.ts";
import { jointCautions, placingCautions } from "./joint-cautions.ts";
import { JOINT, leftOutOf, offsetOf, oneLevelRow, weightsOf, whereRows } from "./joint-rows.ts";
import type { JointSet } from "./joint-set.ts";
import { commonLevel, type PooledLevel, pooledLevel } from "./pooled-level.ts";
import { endsOnScale, isExact, pooledProblem, type Windows } from "./pooled-problem.ts";
import { type PooledSet, pooledSets, taxaOf } from "./pooled-sets.ts";
import { casesOnScale, pooledTargets, type TargetInput } from "./pooled-targets.ts";

export interface JointAnswers {
  readonly sets: readonly TaxonSet[];
  readonly answers: readonly TimingAnswer[];
  readonly scenarios: readonly ScenarioWeight[];
  readonly offsets: readonly Offset[];
  readonly densities: readonly ScenarioDensity[];
  readonly leftOut: readonly LeftOut[];
  readonly cautions: readonly Caution[];
}

interface JointInput extends TimingInput {
  readonly progress: Progress | undefined;
}

/**
 * Several sections answered together: the level of a common scale at which the taxa of a set disappeared in these
 * sections, if they all share one; whether they do; and the level without each section. Sections enter where the main
 * horizon, or what else the scale needs, is placed. Nothing where the main horizon is not one horizon.
 */
export function jointAnswers(
  cases: readonly SetCase[],
  { settings }: Study,
  { markers, alignment, candidates, taxa, progress }: JointInput,
): JointAnswers {
  const input: TargetInput = { markers, alignment, settings };
  const placed = markers.main.isShared ? casesOnScale(cases, input) : [];
  const windows = windowsOf(placed, input);
  const sets = pooledSets(placed);
  const answered = sets.map((set, index) => {
    progress?.(`sections together: ${set.set}`, index, sets.length);
    return answerJoint(set, { ...input, windows, taxa });
  });
  return {
    sets: sets.map((set) => ({
      section: JOINT,
      set: set.set,
      ...(set.group === undefined ? {} : { group: set.group }),
      taxa: taxaOf(set),
    })),
    answers: answered.flatMap((a) => a.answers),
    scenarios: answered.flatMap((a) => a.scenarios),
    offsets: answered.flatMap((a) => a.offsets),
    densities: answered.flatMap((a) => a.densities),
    leftOut: answered.flatMap((a) => a.leftOut),
    cautions: [
      ...placingCautions(cases, placed, { ...input, candidates, windows }),
      ...answered.flatMap((a) => a.cautions),
    ],
  };
}

interface SetInput extends TargetInput {
  readonly windows: Windows;
  readonly taxa: readonly LocalTaxon[];
}

function answerJoint(set: PooledSet, input: SetInput): Omit<JointAnswers, "sets"> {
  const levelOn = solver(set, input);
  const targets = pooledTargets(set.cases, input);
  const [target] = targets;
  const { level, highest, top } = levelOn(target.scale);
  const sampled = sampledLevel(set, target.scale, input);
  const { confidence } = input.settings;
  const joint: JointSet = {
    set,
    target,
    level,
    ...(sampled === undefined ? {} : { sampled }),
    highest,
    top,
    confidence,
    isExact: isExact(set.cases, target.scale),
    between: betweenSections(endsOnScale(set.cases, target.scale, confidence)),
  };
  const { posterior } = level;
  const place = { section: JOINT, set: set.set };
  const densities = posterior === undefined ? [] : densitiesOf(place, [{ scenario: "single", posterior }]);
  return {
    answers: [oneLevelRow(joint), ...whereRows(joint)],
    scenarios: weightsOf(joint),
    offsets: targets.flatMap((one) => offsetOf(joint, one, levelOn(one.scale).level.posterior)),
    densities: densities.map((one) => ({
      ...one,
      heightsM: one.heightsM.map((heightM) => heightM - target.origin),
    })),
    leftOut: leftOutOf(joint),
    cautions: jointCautions(joint),
  };
}

/** From the horizons searched, where they are listed and each section has one map: steps times many maps take too long. */
function sampledLevel({ cases }: PooledSet, scale: CommonScale, input: SetInput): LevelPosterior | undefined {
  if (cases.some(({ section }) => scale.mapsOf(section.name).length > 1)) return undefined;
  const problem = pooledProblem(cases, { ...input, scale, searchedFor: input.taxa });
  return problem && commonLevel(problem);
}

interface SolvedLevel {
  readonly level: PooledLevel;
  readonly highest: number;
  readonly top: number;
}

/** The common level of one set on a scale, worked out once a scale. */
function solver({ cases }: PooledSet, input: SetInput): (scale: CommonScale) => SolvedLevel {
  const solved = new Map<CommonScale, SolvedLevel>();
  return (scale) => {
    const known = solved.get(scale);
    if (known !== undefined) return known;
    const problem = pooledProblem(cases, { ...input, scale });
    if (problem === undefined)
      throw new Error("jointAnswers: expected a window of every section, got a section without");
    const found = { level: pooledLevel(problem), highest: problem.highest, top: problem.tops[0] };
    solved.set(scale, found);
    return found;
  };
}

/** Windows of the sections, from all their candidates as in the answers one by one. */
function windowsOf(cases: readonly SetCase[], { markers, settings }: TargetInput): Windows {
  return new Map(
    cases
      .filter(({ set }) => set.set === allCandidates)
      .map(({ section, set }) => {
        const horizon = markers.main.bySection.get(section.name);
        return [section.name, timingWindow(settings.timing.window, set.ranges, { section, horizon })];
      }),
  );
}

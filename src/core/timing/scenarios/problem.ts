import { type Coordinate, uniformCoordinate } from "../../ranges/coordinate.ts";
import { type SampledHorizon, sampledHorizons, sampledRange } from "../../ranges/sampled-horizons.ts";
import { isUnequal, searchEffort } from "../../ranges/search-effort.ts";
import type { LocalTaxon } from "../../study/finds-result.ts";
import type { Section } from "../../study/model.ts";
import type { TaxonRange } from "../range-data.ts";
import type { SetCase } from "../set-case.ts";
import type { TimingWindow } from "../window.ts";
import { type Contamination, type EndLikelihood, endLikelihood } from "./end-likelihood.ts";
import type { CandidateHorizon, ScenarioProblem } from "./evidence.ts";
import { horizonLaw } from "./horizon-law.ts";
import { horizonShares } from "./priors.ts";
import { sampledLikelihood } from "./sampled-likelihood.ts";
import type { Step } from "./sampled-pulses.ts";

/** The comparison of scenarios for one set, as declared. */
export function problemOf(
  setCase: SetCase,
  { lowM, highM }: TimingWindow,
  step: Step | undefined,
): ScenarioProblem {
  const { timing, seed } = setCase.settings;
  const window = { lowM, highM: timing.contamination > 0 ? cutAtTop(setCase, highM) : highM };
  return {
    taxa: setCase.set.ranges.map((range) => likelihoodOf(range, setCase, window.highM)),
    ...window,
    longestM: timing.longestDuration,
    pulses: timing.pulses,
    horizons: candidateHorizons(setCase, window),
    seed,
    ...(step === undefined ? {} : { step }),
  };
}

/** A misplaced find may lie anywhere up to the section's top, so no end is looked for above it. */
function cutAtTop({ section, set }: SetCase, highM: number): number {
  const highestM = Math.max(...set.ranges.map((range) => range.lastM));
  return section.topM > highestM ? Math.min(highM, section.topM) : highM;
}

function likelihoodOf(range: TaxonRange, setCase: SetCase, highM: number): EndLikelihood {
  const { coordinate, section, settings } = setCase;
  const chance = settings.timing.contamination;
  const second = secondHighest(range, coordinate);
  if (chance === 0 || second === undefined) return endLikelihood(range, coordinate);
  const top = coordinate.toEffective(Math.max(section.topM, highM));
  const contamination: Contamination = { chance, secondM: second, top };
  return endLikelihood(range, coordinate, contamination);
}

/** Undefined where a range was published without its finds. */
function secondHighest(range: TaxonRange, coordinate: Coordinate): number | undefined {
  if (range.levels.length === 0) return undefined;
  if (range.levels.length === 1) return range.baseM;
  return coordinate.toHeight(range.levels[range.levels.length - 2], "lower");
}

/** The marker horizons that lie in the window. */
function candidateHorizons(
  { horizons, settings }: SetCase,
  { lowM, highM }: { readonly lowM: number; readonly highM: number },
): readonly CandidateHorizon[] {
  const inside = horizons.filter(({ marker }) => marker.positionM >= lowM && marker.positionM <= highM);
  const shares = horizonShares(
    inside.map(({ name }) => name),
    settings.timing,
  );
  return inside.map(({ name, marker }, j) => ({ name, law: horizonLaw(marker), share: shares[j] }));
}

/** The same with recovery taken as constant. Undefined where it is. */
export function withConstantRecovery(
  problem: ScenarioProblem,
  setCase: SetCase,
): ScenarioProblem | undefined {
  const { coordinate, set } = setCase;
  if (coordinate === uniformCoordinate) return undefined;
  const taxa = set.ranges.map((range) =>
    endLikelihood({ ...range, base: range.baseM, last: range.lastM }, uniformCoordinate),
  );
  return { ...problem, taxa };
}

/**
 * The same from the horizons searched for each group. Undefined where the finds of a taxon lie in no sample searched for
 * its group.
 */
export function withSampledHorizons(
  problem: ScenarioProblem,
  { section, coordinate, set }: SetCase,
  taxa: readonly LocalTaxon[],
): ScenarioProblem | undefined {
  const byName = new Map(taxa.filter((t) => t.section === section.name).map((t) => [t.taxon, t]));
  const groups = new Map(
    [...new Set(set.ranges.map((range) => range.group))].map((group) => [
      group,
      withEffort(section, group, sampledHorizons(section, group, coordinate)),
    ]),
  );
  const sampled: EndLikelihood[] = [];
  for (const range of set.ranges) {
    const taxon = byName.get(range.taxon);
    const found = taxon && sampledRange(taxon, range, groups.get(range.group) ?? []);
    if (found === undefined) return undefined;
    sampled.push(sampledLikelihood(range, found));
  }
  return { ...problem, taxa: sampled };
}

/** Efforts where they are known and differ; else every horizon counts alike. */
function withEffort(
  section: Section,
  group: string,
  horizons: readonly SampledHorizon[],
): readonly SampledHorizon[] {
  const effort = searchEffort(section, group, horizons);
  return isUnequal(effort) ? horizons.map((h, i) => ({ ...h, effort: effort.efforts[i] })) : horizons;
}

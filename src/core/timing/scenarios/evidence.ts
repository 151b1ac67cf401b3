import { log } from "../../numeric/elementary.ts";
import { logSumExp } from "../../numeric/sums.ts";
import type { Scenario } from "../result.ts";
import { atHorizon } from "./at-horizon.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { type PulsesEvidence, pulsesUpTo } from "./exact-pulses.ts";
import { type Gradual, gradual } from "./gradual.ts";
import type { HorizonLaw } from "./horizon-law.ts";
import type { Step } from "./sampled-pulses.ts";
import { type EvidenceByTop, independentEnds, type SingleLevel, singleLevel } from "./single-level.ts";

/** What the scenarios of one set are compared from. */
export interface ScenarioProblem {
  readonly taxa: readonly EndLikelihood[];
  readonly lowM: number;
  readonly highM: number;
  readonly longestM: number;
  /** Most pulses. */
  readonly pulses: number;
  readonly horizons: readonly CandidateHorizon[];
  readonly seed: number;
  readonly step?: Step;
}

/** A marker horizon inside the window. */
export interface CandidateHorizon {
  readonly name: string;
  readonly law: HorizonLaw;
  /** Its share among the candidate horizons; they add to 1. */
  readonly share: number;
}

/** ln of the evidence of one scenario; -Infinity where nothing inside the window fits. */
export interface Evidence {
  readonly scenario: Scenario;
  readonly horizon?: string;
  readonly log: number;
  readonly error?: number;
}

export interface ScenarioEvidence {
  readonly single: SingleLevel;
  readonly pulses: readonly PulsesEvidence[];
  readonly gradual: Gradual;
  readonly atHorizons: readonly Evidence[];
  readonly independent: EvidenceByTop;
}

/** Places of the tops of the window and of the longest durations in the evidences. */
export const OWN = 0;
export const HALVED = 1;
export const DOUBLED = 2;

/**
 * Every scenario of one set, with the window's reach above the highest last find, and the longest duration, as declared,
 * halved and doubled; or as declared alone.
 */
export function scenarioEvidence(
  problem: ScenarioProblem,
  changes: "all" | "none" = "all",
): ScenarioEvidence {
  const { taxa, lowM, highM, longestM, pulses: most, horizons, seed, step } = problem;
  const highestM = Math.max(...taxa.map((taxon) => taxon.lastM));
  const reachM = highM - highestM;
  const isAlone = changes === "none";
  const topsM = isAlone ? [highM] : [highM, highestM + reachM / 2, highestM + 2 * reachM];
  const window = { lowM, topsM };
  const single = singleLevel(taxa, window);
  const options = { single: single.logEvidence, most, seed, ...(step === undefined ? {} : { step }) };
  return {
    single,
    pulses: pulsesUpTo(taxa, window, options),
    gradual: gradual(taxa, window, isAlone ? [longestM] : [longestM, longestM / 2, 2 * longestM]),
    atHorizons: horizons.map(({ name, law }) => ({
      scenario: "at-horizon",
      horizon: name,
      log: atHorizon(taxa, law),
    })),
    independent: independentEnds(taxa, window),
  };
}

/** One level at one of the candidate horizons: Z = sum of their shares times their evidences. */
export function amongHorizons(horizons: readonly CandidateHorizon[], evidences: readonly Evidence[]): number {
  return logSumExp(evidences.map((evidence, j) => log(horizons[j].share) + evidence.log));
}

import { exp, log } from "../../numeric/elementary.ts";
import { logSumExp } from "../../numeric/sums.ts";
import type { Settings } from "../../study/settings.ts";
import type { ScenarioWeight } from "../result.ts";
import {
  amongHorizons,
  type CandidateHorizon,
  type Evidence,
  OWN,
  type ScenarioEvidence,
} from "./evidence.ts";
import { atMostFromExactly } from "./from-at-most.ts";
import { priorsOf } from "./priors.ts";
import { pulsesScenario, type Variant } from "./variants.ts";

/** A scenario with its prior and posterior probability. */
export interface Weighed extends Evidence {
  readonly prior?: number;
  readonly probability?: number;
}

/** Posterior probabilities over the scenarios of one variant. */
export function weigh(
  { evidences }: Variant,
  horizons: readonly CandidateHorizon[],
  timing: Settings["timing"],
): readonly Weighed[] {
  const priors = priorsOf(evidences, horizons, timing);
  if (priors === undefined) return evidences;
  const total = logSumExp(evidences.map((evidence, j) => log(priors[j]) + evidence.log));
  if (!Number.isFinite(total)) return evidences.map((evidence, j) => ({ ...evidence, prior: priors[j] }));
  return evidences.map((evidence, j) => ({
    ...evidence,
    prior: priors[j],
    probability: priors[j] === 0 ? 0 : exp(log(priors[j]) + evidence.log - total),
  }));
}

export interface SetName {
  readonly section: string;
  readonly set: string;
}

/** Rows of scenarios.csv of one variant. */
export function weightRows(
  place: SetName,
  variant: Variant,
  {
    weighed,
    horizons,
  }: { readonly weighed: readonly Weighed[]; readonly horizons: readonly CandidateHorizon[] },
): ScenarioWeight[] {
  const named = variant.name === undefined ? {} : { variant: variant.name };
  const rows = weighed.map((one): ScenarioWeight => {
    const { log: logEvidence, ...rest } = one;
    const fits = Number.isFinite(logEvidence);
    return {
      ...place,
      ...named,
      ...rest,
      ...(fits ? { logEvidence } : {}),
      note: fits ? noteOf(one) : noFit,
    };
  });
  const among = amongRow(place, weighed, horizons);
  return among === undefined ? rows : [...rows, { ...among, ...named }];
}

const noFit = "no level that it allows fits the last finds";

function noteOf({ scenario, error }: Weighed): string {
  if (scenario === "independent")
    return "each taxon at its own level; compared only where a prior is declared";
  return error === undefined ? "" : "by importance sampling";
}

/** One level at one of the horizons: its probability is that of its rows together, and not counted a second time. */
function amongRow(
  place: SetName,
  weighed: readonly Weighed[],
  horizons: readonly CandidateHorizon[],
): ScenarioWeight | undefined {
  const rows = weighed.filter((one) => one.scenario === "at-horizon");
  if (rows.length === 0) return undefined;
  const logEvidence = amongHorizons(horizons, rows);
  const sum = rows.reduce((total, row) => total + (row.probability ?? 0), 0);
  const words = `the rows at-horizon together, probability ${Number(sum.toPrecision(3))}; not counted again`;
  return {
    ...place,
    scenario: "among-horizons",
    ...(Number.isFinite(logEvidence) ? { logEvidence } : {}),
    note: words,
  };
}

/** Evidence of at most K pulses, empty ones allowed: printed beside, not compared. */
export function atMostRows(place: SetName, evidence: ScenarioEvidence, taxa: number): ScenarioWeight[] {
  const exactly = [evidence.single.logEvidence[OWN]];
  return evidence.pulses.flatMap((found): ScenarioWeight[] => {
    exactly.push(found.logEvidence[OWN]);
    const logEvidence = atMostFromExactly(exactly, taxa);
    if (!Number.isFinite(logEvidence)) return [];
    const scenario = pulsesScenario(found.pulses);
    const note = "empty pulses allowed; beside, not compared";
    return [{ ...place, scenario, variant: "at-most", logEvidence, note }];
  });
}

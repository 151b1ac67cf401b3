import type { Caution } from "../../basis.ts";
import { exp } from "../../numeric/elementary.ts";
import { DECLINE_GATE, pooledCentroid } from "../recovery-answers.ts";
import type { SetCase } from "../set-case.ts";
import type { ScenarioEvidence, ScenarioProblem } from "./evidence.ts";
import type { Variant } from "./variants.ts";
import { weightedQuantiles } from "./weighted.ts";
import type { Weighed } from "./weights.ts";

export interface Compared {
  readonly problem: ScenarioProblem;
  readonly evidence: ScenarioEvidence;
  readonly variants: readonly Variant[];
  readonly weighed: readonly (readonly Weighed[])[];
}

/** What weakens the comparison of scenarios in one set. */
export function scenarioCautions(setCase: SetCase, compared: Compared): Caution[] {
  const place = { section: setCase.section.name, subject: setCase.set.set };
  return [
    ...sensitivityCautions(compared),
    ...separationCautions(setCase, compared),
    ...edgeCautions(compared),
    ...declineCautions(setCase, compared),
    ...horizonCautions(compared),
    ...mixedLevelCautions(setCase, compared),
  ].map((caution) => ({ ...caution, ...place }));
}

/** How a scenario is called in a caution. */
export function scenarioName({ scenario, horizon }: Pick<Weighed, "scenario" | "horizon">): string {
  return horizon === undefined ? scenario : `${scenario} ${horizon}`;
}

export function bestOf(weighed: readonly Weighed[]): Weighed | undefined {
  let best: Weighed | undefined;
  for (const one of weighed) if ((one.probability ?? 0) > (best?.probability ?? 0)) best = one;
  return best;
}

/** Changes of priors or forms under which another scenario comes first. */
function sensitivityCautions({ variants, weighed }: Compared): Caution[] {
  const best = bestOf(weighed[0]);
  if (best === undefined) return [];
  const changed = variants.flatMap(({ name }, v) => {
    const other = bestOf(weighed[v]);
    if (name === undefined || other === undefined || scenarioName(other) === scenarioName(best)) return [];
    return [`${name} (${scenarioName(other)})`];
  });
  if (changed.length === 0) return [];
  const numbers = { best: scenarioName(best), changes: changed.join(", ") };
  return [{ code: "scenario-order-changes", numbers }];
}

/** Pulses nearer to each other than this share of the mean range are not told apart by such data. */
const RESOLVED_SHARE = 0.15;
/** Told where two pulses are neither out of the question nor settled. */
const LEAST = 0.1;
const SETTLED = 0.9;

function separationCautions({ set }: SetCase, { evidence, weighed }: Compared): Caution[] {
  const two = weighed[0].find((one) => one.scenario === "pulses-2");
  const separation = evidence.pulses[0]?.posterior?.separation;
  const probability = two?.probability ?? 0;
  if (separation === undefined || probability < LEAST || probability > SETTLED) return [];
  const [median] = weightedQuantiles(separation, [0.5]);
  const ranges = set.ranges.map((range) => range.lastM - range.baseM).filter((lengthM) => lengthM > 0);
  const limitM = (RESOLVED_SHARE * ranges.reduce((sum, x) => sum + x, 0)) / ranges.length;
  return median < limitM ? [{ code: "scenario-pulses-too-near", numbers: { medianM: median, limitM } }] : [];
}

/** Share of the window at its top, and the posterior mass there that shows it to be cut off. */
const EDGE_SHARE = 0.1;
const EDGE_MASS = 0.05;

function edgeCautions({ problem, evidence }: Compared): Caution[] {
  const posterior = evidence.single.posterior;
  if (posterior === undefined) return [];
  const highestM = Math.max(...problem.taxa.map((taxon) => taxon.lastM));
  const mass = 1 - posterior.cdf(problem.highM - EDGE_SHARE * (problem.highM - highestM));
  return mass > EDGE_MASS ? [{ code: "scenario-mass-at-edge", numbers: { mass } }] : [];
}

function declineCautions({ set }: SetCase, { weighed }: Compared): Caution[] {
  const pooled = pooledCentroid(set.ranges);
  const best = bestOf(weighed[0]);
  if (pooled === undefined || pooled.p >= DECLINE_GATE || best === undefined) return [];
  return [{ code: "scenario-leans-on-recovery", numbers: { p: pooled.p, best: scenarioName(best) } }];
}

/** Two pulses this much less likely than one level, both free, are out of the question. */
const REFUTED = 0.1;

/**
 * One level at a horizon is spared the price of an unknown level, two pulses pay it twice, and no scenario has one pulse
 * at a horizon and one elsewhere. So where one level at a horizon comes first, two pulses are set against one level
 * with all levels free: told unless that refutes them.
 */
function horizonCautions({ weighed }: Compared): Caution[] {
  const one = weighed[0].find(({ scenario }) => scenario === "single");
  const two = weighed[0].find(({ scenario }) => scenario === "pulses-2");
  if (bestOf(weighed[0])?.scenario !== "at-horizon" || one === undefined || two === undefined) return [];
  const ratio = exp(two.log - one.log);
  return ratio < REFUTED ? [] : [{ code: "scenario-horizon-favoured", numbers: { ratio } }];
}

/** Mass of the one level below a smeared layer from which on it is said to lie there. */
const AWAY = 0.975;
const LIKELY = 0.5;

/**
 * Finds that mixing carried above a marker are taken out there, up to the reworking ceiling; at a level without a marker
 * nobody can tell them, and they lift it.
 */
function mixedLevelCautions({ horizons }: SetCase, { evidence, weighed }: Compared): Caution[] {
  const layer = horizons.find(({ marker }) => marker.mixing !== undefined);
  const mixing = layer?.marker.mixing;
  if (layer === undefined || mixing === undefined) return [];
  const isBelow = (evidence.single.posterior?.cdf(mixing.baseM - mixing.lengthM) ?? 0) > AWAY;
  const two = weighed[0].find(({ scenario }) => scenario === "pulses-2")?.probability ?? 0;
  if (!isBelow && two < LIKELY) return [];
  return [{ code: "scenario-level-mixed", numbers: { lengthM: mixing.lengthM, horizon: layer.name } }];
}

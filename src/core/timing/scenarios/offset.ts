import { exp } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { findRoot } from "../../numeric/roots.ts";
import { type HorizonLaw, lawEdges, logLaw } from "./horizon-law.ts";
import type { LevelPosterior } from "./level-posterior.ts";

export interface OffsetSummary {
  readonly median: number;
  readonly low: number;
  readonly high: number;
  readonly probabilityAfter: number;
}

/**
 * A level minus a horizon, both uncertain: P(tau - mu <= d) = integral of law(mu) P(tau <= mu + d), in metres. After means
 * younger: P(tau > mu).
 */
export function offsetFrom(posterior: LevelPosterior, law: HorizonLaw, confidence: number): OffsetSummary {
  const below = differenceCdf(posterior, law);
  const tail = 0.5 * (1 - confidence);
  const edges = lawEdges(law);
  const lowest = posterior.edgesM[0] - edges[edges.length - 1] - 1e-6;
  const highest = posterior.edgesM[posterior.edgesM.length - 1] - edges[0] + 1e-6;
  const quantile = (p: number) =>
    findRoot((d) => below(d) - p, lowest, highest, { tolerance: 1e-9 * (highest - lowest) });
  return {
    median: quantile(0.5),
    low: quantile(tail),
    high: quantile(1 - tail),
    probabilityAfter: Math.min(1, Math.max(0, 1 - below(0))),
  };
}

const NODES = 8;

/** P(tau - mu <= d): nodes over the law of the horizon, finer where it is wide. */
function differenceCdf({ cdf }: LevelPosterior, law: HorizonLaw): (d: number) => number {
  if (law.kind === "point") return (d) => cdf(law.atM + d);
  const edges = lawEdges(law);
  const parts = law.kind === "uniform" ? UNIFORM_PARTS : NORMAL_PARTS;
  const rule = gaussLegendre(NODES);
  const places: { heightM: number; weight: number }[] = [];
  for (let e = 1; e < edges.length; e++) {
    const width = (edges[e] - edges[e - 1]) / parts;
    for (let part = 0; part < parts; part++)
      for (let n = 0; n < NODES; n++) {
        const heightM = edges[e - 1] + width * (part + 0.5 * (1 + rule.nodes[n]));
        places.push({ heightM, weight: 0.5 * width * rule.weights[n] * exp(logLaw(law, heightM)) });
      }
  }
  const total = places.reduce((sum, { weight }) => sum + weight, 0);
  return (d) => places.reduce((sum, { heightM, weight }) => sum + weight * cdf(heightM + d), 0) / total;
}

/** Panels between the edges of a law. */
const UNIFORM_PARTS = 16;
const NORMAL_PARTS = 2;

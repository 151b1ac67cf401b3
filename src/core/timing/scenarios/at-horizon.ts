import { log } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { logSumExp } from "../../numeric/sums.ts";
import { endGrid, floorOf } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { type HorizonLaw, lawEdges, logLaw } from "./horizon-law.ts";

/** The integral of a normal law goes on this many standard deviations above the lowest possible level. */
const REACH = 9;
const NODES = 12;

/**
 * One level, at a marker horizon known with its own uncertainty: Z = integral of law(tau) prod_i L_i(tau); at an exact
 * horizon prod_i L_i there. What the law has below the highest last find counts against the horizon: it is not
 * renormalised.
 */
export function atHorizon(taxa: readonly EndLikelihood[], law: HorizonLaw): number {
  if (law.kind === "point") return logProductAt(taxa, law.atM);
  const floorM = floorOf(taxa);
  const edges = lawEdges(law);
  const lowM = Math.max(floorM, edges[0]);
  const highest = edges[edges.length - 1];
  const highM = law.kind === "normal" ? Math.max(highest, floorM + REACH * law.sdM) : highest;
  if (!(lowM < highM)) return Number.NEGATIVE_INFINITY;
  const steep = law.kind === "normal" ? tailEdges(law, lowM, highM) : [];
  const { panels } = endGrid(taxa, { lowM, highM, breaksM: [...edges, ...steep] });
  const rule = gaussLegendre(NODES);
  const terms: number[] = [];
  for (const panel of panels) {
    const half = 0.5 * (panel.highM - panel.lowM);
    for (let n = 0; n < NODES; n++) {
      const heightM = panel.lowM + half * (1 + rule.nodes[n]);
      terms.push(log(half * rule.weights[n]) + logLaw(law, heightM) + logProductAt(taxa, heightM));
    }
  }
  return logSumExp(terms);
}

/** Far above its mean a normal law falls by e within sd^2 / (distance from the mean). */
function tailEdges(
  { meanM, sdM }: Extract<HorizonLaw, { kind: "normal" }>,
  lowM: number,
  highM: number,
): readonly number[] {
  const scaleM = (sdM * sdM) / Math.max(sdM, lowM - meanM);
  const edges: number[] = [];
  for (let x = lowM + scaleM; x < highM && edges.length < 40; x += 2 * scaleM) edges.push(x);
  return edges;
}

function logProductAt(taxa: readonly EndLikelihood[], heightM: number): number {
  let sum = 0;
  for (const taxon of taxa) sum += taxon.log(heightM);
  return sum;
}

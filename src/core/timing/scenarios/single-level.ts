import { exp, log } from "../../numeric/elementary.ts";
import { logSumExp } from "../../numeric/sums.ts";
import { type EndGrid, endGrid, floorOf } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import { type LevelPosterior, posteriorBuilder } from "./level-posterior.ts";

/** Evidence of one scenario with the window of end levels cut at each of its tops. */
export type EvidenceByTop = readonly number[];

export interface SingleLevel {
  /** ln of the evidence for each top of the window; -Infinity where no level inside it fits. */
  readonly logEvidence: EvidenceByTop;
  /** Of the level, under the window's own top; absent where no level inside it fits. */
  readonly posterior?: LevelPosterior;
}

const singleNodes = () => 16;

/**
 * One level: Z = integral over the window of pi(tau) prod_i L_i(tau), pi flat in height.
 */
export function singleLevel(taxa: readonly EndLikelihood[], window: EndWindow): SingleLevel {
  const floorM = Math.max(window.lowM, floorOf(taxa));
  const highM = Math.max(...window.topsM);
  if (!(floorM < highM)) return { logEvidence: window.topsM.map(() => Number.NEGATIVE_INFINITY) };
  const grid = endGrid(taxa, { lowM: floorM, highM, breaksM: window.topsM, nodesFor: singleNodes });
  const logs = nodeProducts(grid);
  const logEvidence = window.topsM.map((topM) => {
    const inside = logs.filter((_, node) => belowTop(grid, node, topM));
    return logSumExp(inside) - log(topM - window.lowM);
  });
  if (!Number.isFinite(logEvidence[0])) return { logEvidence };
  return { logEvidence, posterior: posteriorOfNodes(grid, logs, window.topsM[0]) };
}

/** ln (weight times prod_i L_i) at every node. */
function nodeProducts({ heights, weights, taxa, logs }: EndGrid): Float64Array {
  return Float64Array.from(heights, (_, node) => {
    let sum = log(weights[node]);
    for (let i = 0; i < taxa; i++) sum += logs[node * taxa + i];
    return sum;
  });
}

function posteriorOfNodes(grid: EndGrid, logs: Float64Array, topM: number): LevelPosterior {
  const largest = Math.max(...logs);
  const builder = posteriorBuilder(grid);
  for (let node = 0; node < logs.length; node++)
    if (belowTop(grid, node, topM))
      builder.add(grid.panelOf[node], grid.heights[node], exp(logs[node] - largest));
  return builder.build();
}

/** Ends independent of each other, each flat over the window: Z = prod_i integral of pi L_i. */
export function independentEnds(taxa: readonly EndLikelihood[], window: EndWindow): EvidenceByTop {
  return window.topsM.map((topM) => {
    let sum = 0;
    for (const taxon of taxa) sum += log(taxon.area(window.lowM, topM) / (topM - window.lowM));
    return sum;
  });
}

import { exp, log } from "../../numeric/elementary.ts";
import { allocationBound, allocationSum } from "./allocations.ts";
import { coarseNodes, type EndGrid, endGrid, floorOf, logRows } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import type { Step } from "./sampled-pulses.ts";
import type { EvidenceByTop } from "./single-level.ts";

export interface AtMostPulses {
  /** ln of the evidence for each top of the window, by Dirichlet shares and by equal ones. */
  readonly atMost: EvidenceByTop;
  readonly atMostEqual: EvidenceByTop;
}

/** Triples whose bound is under this share of the sum so far are left out. */
const NEGLIGIBLE = 1e-11;

/**
 * At most three pulses, independent and flat over the window, memberships by flat Dirichlet shares:
 * Z_3 = integral of pi pi pi E_omega prod_i sum_g omega_g L_i(tau_g), over unordered triples of nodes.
 * Cost: nodes^3 times taxa times nodes of the shares, less the triples that cannot matter; `step` is called between.
 */
export function threePulses(taxa: readonly EndLikelihood[], window: EndWindow, step?: Step): AtMostPulses {
  const highM = Math.max(...window.topsM);
  const grid = endGrid(taxa, { lowM: window.lowM, highM, breaksM: window.topsM, nodesFor: coarseNodes });
  const floorM = Math.max(window.lowM, floorOf(taxa));
  const isUpper = (node: number) => grid.panels[grid.panelOf[node]].lowM >= floorM;
  const uppers = Array.from(grid.heights, (_, node) => node).filter(isUpper);
  const logScale = largestBound(logRows(grid), uppers);
  const sums = window.topsM.map(() => ({ dirichlet: 0, equal: 0 }));
  const add = triplesBelow(grid, logScale);
  uppers.forEach((upper, done) => {
    step?.(done, uppers.length);
    const { dirichlet, equal } = add(upper);
    sums.forEach((sum, t) => {
      if (!belowTop(grid, upper, window.topsM[t])) return;
      sum.dirichlet += dirichlet;
      sum.equal += equal;
    });
  });
  const width = (t: number) => 3 * log(window.topsM[t] - window.lowM);
  return {
    atMost: sums.map(({ dirichlet }, t) => logScale + log(dirichlet) - width(t)),
    atMostEqual: sums.map(({ equal }, t) => logScale + log(equal) - width(t)),
  };
}

/** The sum over the triples with a given uppermost node. */
function triplesBelow(grid: EndGrid, logScale: number) {
  const rows = logRows(grid);
  const { weights } = grid;
  const weigh = allocationSum(3, grid.taxa);
  let [allDirichlet, allEqual] = [0, 0];
  return (upper: number) => {
    const sum = { dirichlet: 0, equal: 0 };
    for (let middle = 0; middle <= upper; middle++)
      for (let lower = 0; lower <= middle; lower++) {
        const triple = [rows[lower], rows[middle], rows[upper]];
        const weight = waysOf(lower, middle, upper) * weights[lower] * weights[middle] * weights[upper];
        const scale = weight * exp(allocationBound(triple) - logScale);
        if (scale < NEGLIGIBLE * Math.min(allDirichlet, allEqual)) continue;
        const { dirichlet, equal } = weigh(triple);
        sum.dirichlet += scale * dirichlet;
        sum.equal += scale * equal;
        allDirichlet += scale * dirichlet;
        allEqual += scale * equal;
      }
    return sum;
  };
}

/** Ordered triples behind an unordered one. */
function waysOf(lower: number, middle: number, upper: number): number {
  if (lower === upper) return 1;
  return lower === middle || middle === upper ? 3 : 6;
}

/** ln of the largest bound over pairs of levels: no triple's bound lies much above it. */
function largestBound(rows: readonly Float64Array[], uppers: readonly number[]): number {
  let largest = Number.NEGATIVE_INFINITY;
  for (const upper of uppers)
    for (let lower = 0; lower <= upper; lower++)
      largest = Math.max(largest, allocationBound([rows[lower], rows[upper]]));
  return largest;
}

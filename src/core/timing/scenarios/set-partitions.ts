import { logChoose } from "../../numeric/binomial.ts";
import { exp, log } from "../../numeric/elementary.ts";
import { logGamma } from "../../numeric/log-gamma.ts";
import { type EndGrid, endGrid } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import type { EvidenceByTop } from "./single-level.ts";

export interface ExactPulses {
  readonly logEvidence: EvidenceByTop;
  readonly logEvidenceEqual: EvidenceByTop;
}

/** Nodes a panel: one-dimensional integrals are cheap. */
const NODES = 12;
/** The set-partition form is offered up to this many taxa: its work grows as 3^k. */
export const MOST_PARTITION_TAXA = 14;

/**
 * Exactly K pulses from one-dimensional integrals alone: with I(B) the integral of pi prod_(i in B) L_i, the sum over all
 * partitions of the taxa into K blocks of prod |B|! I(B), times K! / (k! C(k - 1, K - 1)); with equal allocations the
 * mean of prod I(B) over the S(k, K) partitions. 2^k integrals and O(K 3^k) steps.
 * @throws RangeError with more than 14 taxa.
 */
export function pulsesByPartitions(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  pulses: number,
): ExactPulses {
  const k = taxa.length;
  if (k > MOST_PARTITION_TAXA)
    throw new RangeError(`pulsesByPartitions: expected up to ${MOST_PARTITION_TAXA} taxa, got ${k}`);
  const none = window.topsM.map(() => Number.NEGATIVE_INFINITY);
  if (k < pulses) return { logEvidence: none, logEvidenceEqual: none };
  const blocks = blockIntegrals(taxa, window);
  const sizes = Float64Array.from({ length: 1 << k }, (_, set) => logGamma(bits(set) + 1));
  const factor = logGamma(pulses + 1) - logGamma(k + 1) - logChoose(k - 1, pulses - 1);
  return {
    logEvidence: blocks.map(
      (logs) =>
        factor +
        partitionSum(
          logs.map((x, set) => x + sizes[set]),
          k,
          pulses,
        ),
    ),
    logEvidenceEqual: blocks.map((logs) => partitionSum(logs, k, pulses) - log(stirlingSecond(k, pulses))),
  };
}

/** ln I(B) for every set of taxa (bit mask), for each top of the window. */
function blockIntegrals(taxa: readonly EndLikelihood[], window: EndWindow): Float64Array[] {
  const lowM = Math.max(window.lowM, Math.min(...taxa.map((taxon) => taxon.fromM)));
  const grid = endGrid(taxa, {
    lowM,
    highM: Math.max(...window.topsM),
    breaksM: window.topsM,
    nodesFor: () => NODES,
  });
  const largest = new Float64Array(1 << taxa.length).fill(Number.NEGATIVE_INFINITY);
  forEachProduct(grid, (_, set, logProduct) => {
    if (logProduct > largest[set]) largest[set] = logProduct;
  });
  const sums = window.topsM.map(() => new Float64Array(largest.length));
  forEachProduct(grid, (node, set, logProduct) => {
    const term = exp(logProduct - largest[set]);
    for (let t = 0; t < sums.length; t++) if (belowTop(grid, node, window.topsM[t])) sums[t][set] += term;
  });
  return sums.map((sum, t) =>
    sum.map((x, set) => largest[set] + log(x) - log(window.topsM[t] - window.lowM)),
  );
}

/** ln of weight times the product of L over every set of taxa, at every node where it is not 0. */
function forEachProduct(grid: EndGrid, use: (node: number, set: number, logProduct: number) => void): void {
  const sums = new Float64Array(1 << grid.taxa);
  for (let node = 0; node < grid.heights.length; node++) {
    sums[0] = log(grid.weights[node]);
    for (let set = 1; set < sums.length; set++) {
      const top = 31 - Math.clz32(set);
      sums[set] = sums[set ^ (1 << top)] + grid.logs[node * grid.taxa + top];
      if (sums[set] !== Number.NEGATIVE_INFINITY) use(node, set, sums[set]);
    }
  }
}

/** ln of the sum over partitions of all k taxa into blocks, of the product of the blocks' values. */
function partitionSum(logs: Float64Array, k: number, pulses: number): number {
  const shift = scaleOf(logs, k);
  const values = logs.map((x, set) => (set === 0 ? 0 : exp(x - shift * bits(set))));
  let sums = new Float64Array(1 << k);
  sums[0] = 1;
  for (let pulse = 0; pulse < pulses; pulse++) sums = addBlock(sums, values);
  return log(sums[(1 << k) - 1]) + shift * k;
}

const LEAST_SHIFT = -40;

/** Logs are measured from this much per taxon, so that products stay in range. */
function scaleOf(logs: Float64Array, k: number): number {
  const whole = logs[(1 << k) - 1];
  return Number.isFinite(whole) ? Math.max(LEAST_SHIFT, whole / k) : 0;
}

/** One more block, which holds the lowest taxon of the set that is left. */
function addBlock(sums: Float64Array, values: Float64Array): Float64Array<ArrayBuffer> {
  const next = new Float64Array(sums.length);
  for (let set = 1; set < sums.length; set++) {
    const lowest = set & -set;
    const rest = set ^ lowest;
    let part = rest;
    for (;;) {
      next[set] += values[part | lowest] * sums[rest ^ part];
      if (part === 0) break;
      part = (part - 1) & rest;
    }
  }
  return next;
}

function bits(set: number): number {
  let count = 0;
  for (let rest = set; rest !== 0; rest &= rest - 1) count++;
  return count;
}

/** Number of ways to split k things into K blocks. */
export function stirlingSecond(k: number, pulses: number): number {
  const counts = new Float64Array(pulses + 1);
  counts[0] = 1;
  for (let n = 1; n <= k; n++) {
    for (let j = Math.min(n, pulses); j >= 1; j--) counts[j] = j * counts[j] + counts[j - 1];
    counts[0] = 0;
  }
  return counts[pulses];
}

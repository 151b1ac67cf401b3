import { logChoose } from "../../numeric/binomial.ts";
import { exp, log } from "../../numeric/elementary.ts";
import { blockGenerator, type Generator } from "../../numeric/streams.ts";
import { allocationBound, allocationSum, occupiedSum } from "./allocations.ts";
import { coarseNodes, type EndGrid, endGrid, floorOf, logRows } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import { ontoShare } from "./from-at-most.ts";
import type { WeightedLevels } from "./pulses-summary.ts";
import type { EvidenceByTop } from "./single-level.ts";

/** Called between steps of long work; throws when the caller wants it to stop. */
export type Step = (done: number, total: number) => void;

export interface SampledPulses {
  readonly grid: EndGrid;
  /** Exactly K pulses, by Dirichlet shares and with equal allocations. */
  readonly logEvidence: EvidenceByTop;
  readonly logEvidenceEqual: EvidenceByTop;
  /** Monte Carlo standard error of `logEvidence`. */
  readonly errors: readonly number[];
  /** Levels drawn, with weights that make them stand for the posterior under the window's own top. */
  readonly drawn: readonly WeightedLevels[];
}

export interface SampledPulsesOptions {
  readonly pulses: 3 | 4;
  readonly draws: number;
  readonly seed: number;
  readonly step?: Step;
}

/**
 * Exactly three or four pulses by importance sampling over the nodes of a grid: two levels are drawn from the posterior
 * of at most two pulses, the others from the window, most of them among the last finds, and the weight is the sum over
 * allocations that leave no level empty, over the density that they were drawn with. Draws are fixed by the seed.
 * Undefined where no two levels inside the window fit.
 */
export function sampledPulses(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  options: SampledPulsesOptions,
): SampledPulses | undefined {
  const highM = Math.max(...window.topsM);
  const floorM = Math.max(window.lowM, floorOf(taxa));
  if (!(floorM < highM)) return undefined;
  const grid = endGrid(taxa, { lowM: window.lowM, highM, breaksM: window.topsM, nodesFor: coarseNodes });
  const pairs = pairMasses(grid, floorM);
  const core = coreDensity(grid, [Math.min(...taxa.map((taxon) => taxon.fromM)), floorM]);
  const draw = drawer({ grid, pairs, core }, options.pulses - 2);
  const weigh = weigher(grid, core, options.pulses);
  const generator = blockGenerator(options.seed, "extinctionTiming", FIRST_BLOCK + options.pulses);
  const drawn: Drawn[] = [];
  for (let n = 0; n < options.draws; n++) {
    if (n % STRIDE === 0) options.step?.(n, options.draws);
    const nodes = draw(generator);
    drawn.push({ nodes, ...weigh(nodes) });
  }
  return summed(grid, window, { pairs, drawn, pulses: options.pulses });
}

/** Far from the blocks of replicates of the same stream. */
const FIRST_BLOCK = 4_000_000;
const STRIDE = 64;

interface PairMasses {
  /** Two nodes each, the lower one first. */
  readonly nodes: Int32Array;
  readonly masses: Float64Array;
  /** Masses are relative to e to this. */
  readonly logScale: number;
}

function pairMasses(grid: EndGrid, floorM: number): PairMasses {
  const rows = logRows(grid);
  const weigh = allocationSum(2, grid.taxa);
  const pairs: { lower: number; upper: number; bound: number }[] = [];
  let logScale = Number.NEGATIVE_INFINITY;
  for (let upper = 0; upper < rows.length; upper++) {
    if (grid.panels[grid.panelOf[upper]].lowM < floorM) continue;
    for (let lower = 0; lower <= upper; lower++) {
      const bound = allocationBound([rows[lower], rows[upper]]);
      logScale = Math.max(logScale, bound);
      pairs.push({ lower, upper, bound });
    }
  }
  const masses = Float64Array.from(pairs, ({ lower, upper, bound }) => {
    const ways = lower === upper ? 1 : 2;
    const scale = exp(bound - logScale) * ways * grid.weights[lower] * grid.weights[upper];
    return scale > 0 ? scale * weigh([rows[lower], rows[upper]]).dirichlet : 0;
  });
  return { nodes: Int32Array.from(pairs.flatMap(({ lower, upper }) => [lower, upper])), masses, logScale };
}

interface Drawn {
  /** From the lowest. */
  readonly nodes: readonly number[];
  readonly dirichlet: number;
  readonly equal: number;
}

/** Density of a further level at each node, over that of the window's nodes: most lie among the last finds. */
function coreDensity({ heights, weights }: EndGrid, [lowM, floorM]: readonly [number, number]): Float64Array {
  const reachM = floorM + REACH * (floorM - lowM);
  const isCore = (node: number) => heights[node] >= lowM && heights[node] <= reachM;
  const all = sumOf(weights);
  const core = sumOf(weights.filter((_, node) => isCore(node)));
  const share = core > 0 ? CORE_SHARE : 0;
  return heights.map((_, node) => (1 - share) / all + (isCore(node) ? share / core : 0));
}

/** Further levels: this share of them between the lowest last find and a little above the highest. */
const CORE_SHARE = 0.75;
const REACH = 0.1;

interface Proposal {
  readonly grid: EndGrid;
  readonly pairs: PairMasses;
  readonly core: Float64Array;
}

function drawer({ grid, pairs, core }: Proposal, further: number) {
  const sums = running(pairs.masses);
  const levels = running(grid.weights.map((weight, node) => weight * core[node]));
  return (generator: Generator): number[] => {
    const pair = firstAbove(sums, generator.uniform());
    const drawn = [pairs.nodes[2 * pair], pairs.nodes[2 * pair + 1]];
    for (let g = 0; g < further; g++) drawn.push(firstAbove(levels, generator.uniform()));
    return drawn.toSorted((a, b) => a - b);
  };
}

/** The sum over allocations, over the mean of E_2 times the densities of the others over all pairs of levels. */
function weigher(grid: EndGrid, core: Float64Array, pulses: number) {
  const rows = logRows(grid);
  const two = allocationSum(2, grid.taxa);
  const all = occupiedSum(pulses, grid.taxa);
  const pairs = (pulses * (pulses - 1)) / 2;
  return (nodes: readonly number[]) => {
    const levels = nodes.map((node) => rows[node]);
    const top = all(levels);
    let mean = 0;
    for (let b = 1; b < pulses; b++)
      for (let a = 0; a < b; a++) {
        const part = two([levels[a], levels[b]]);
        const others = nodes.reduce(
          (product, node, g) => (g === a || g === b ? product : product * core[node]),
          1,
        );
        mean += (part.dirichlet * exp(part.bound - top.bound) * others) / pairs;
      }
    return { dirichlet: top.dirichlet / mean, equal: top.equal / mean };
  };
}

interface Draws {
  readonly pairs: PairMasses;
  readonly drawn: readonly Drawn[];
  readonly pulses: number;
}

function summed(grid: EndGrid, window: EndWindow, { pairs, drawn, pulses }: Draws): SampledPulses {
  const k = grid.taxa;
  const factor = pairs.logScale + log(sumOf(pairs.masses));
  const dirichlet = factor + logChoose(k + pulses - 1, pulses - 1) - logChoose(k - 1, pulses - 1);
  const equal = factor - log(ontoShare(k, pulses, pulses));
  const isIn = (nodes: readonly number[], topM: number) => belowTop(grid, nodes[pulses - 1], topM);
  const means = window.topsM.map((topM) => ({
    dirichlet: meanAndError(drawn.map((d) => (isIn(d.nodes, topM) ? d.dirichlet : 0))),
    equal: meanAndError(drawn.map((d) => (isIn(d.nodes, topM) ? d.equal : 0))),
  }));
  const width = (t: number) => pulses * log(window.topsM[t] - window.lowM);
  return {
    grid,
    logEvidence: means.map((mean, t) => dirichlet + log(mean.dirichlet.mean) - width(t)),
    logEvidenceEqual: means.map((mean, t) => equal + log(mean.equal.mean) - width(t)),
    errors: means.map((mean) => mean.dirichlet.error / mean.dirichlet.mean),
    drawn: drawn
      .filter(({ nodes }) => isIn(nodes, window.topsM[0]))
      .map((d) => ({ nodes: d.nodes, mass: d.dirichlet })),
  };
}

function meanAndError(values: readonly number[]): { mean: number; error: number } {
  const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
  const squares = values.reduce((sum, x) => sum + (x - mean) * (x - mean), 0);
  return { mean, error: Math.sqrt(squares / (values.length - 1) / values.length) };
}

function running(masses: Float64Array): Float64Array {
  const total = sumOf(masses);
  let sum = 0;
  return masses.map((mass) => {
    sum += mass / total;
    return sum;
  });
}

function sumOf(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum;
}

function firstAbove(sums: Float64Array, value: number): number {
  let low = 0;
  let high = sums.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sums[middle] > value) high = middle;
    else low = middle + 1;
  }
  return low;
}

import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import type { EndLikelihood } from "./end-likelihood.ts";

/** A stretch of heights with its own quadrature nodes. */
export interface Panel {
  readonly lowM: number;
  readonly highM: number;
  /** Index of its first node. */
  readonly first: number;
  readonly count: number;
}

/** Quadrature nodes over heights, and ln L of every taxon at every node (node by node). */
export interface EndGrid {
  readonly panels: readonly Panel[];
  readonly heights: Float64Array;
  readonly weights: Float64Array;
  readonly panelOf: Int32Array;
  readonly taxa: number;
  readonly logs: Float64Array;
}

export interface GridOptions {
  readonly lowM: number;
  readonly highM: number;
  /** Further heights at which panels end. */
  readonly breaksM?: readonly number[];
  /** Nodes of a panel by how far ln of the product of L falls across it. */
  readonly nodesFor?: (fall: number) => number;
}

/**
 * Across a panel ln of the product of L falls by at most this, or by this share of its fall since the last edge where a
 * likelihood begins: taxa that matter still, so far from there, are those that fall slowly.
 */
const LARGEST_FALL = 8;
const SHARE_OF_FALL = 1 / 3;
/** Geometric panels towards the highest last find end at this power of 1/4 of the way to the top. */
const GEOMETRIC_STEPS = 6;
/** A panel is not split beyond this share of the whole. */
const SMALLEST_SHARE = 1e-12;
/** Limits from inside a panel are taken this share of its width from its ends. */
const INSIDE = 1e-9;

/** Nodes that integrate exp(-fall x) over (0, 1) to a relative 1e-8 or so. */
const fineNodes = (fall: number) =>
  fall < 0.05 ? 2 : fall < 0.3 ? 3 : fall < 1 ? 4 : fall < 2.5 ? 5 : fall < 4.5 ? 6 : 8;

/** Nodes where five digits do. */
export const coarseNodes = (fall: number) =>
  fall < 0.02 ? 1 : fall < 0.3 ? 2 : fall < 1.2 ? 3 : fall < 4 ? 4 : 6;

/**
 * Composite Gauss-Legendre nodes for integrals over the height at which taxa end: panels end where a likelihood begins
 * or has a kink, and at M* + (top - M*) 4^-q above the highest last find M*; a panel across which the product of L falls
 * far is split towards its base, so that every panel sees a smooth function.
 */
export function endGrid(taxa: readonly EndLikelihood[], options: GridOptions): EndGrid {
  const edges = splitSteep(taxa, startingEdges(taxa, options));
  const nodesFor = options.nodesFor ?? fineNodes;
  const panels: Panel[] = [];
  let first = 0;
  for (let i = 1; i < edges.length; i++) {
    const [lowM, highM] = [edges[i - 1], edges[i]];
    const count = nodesFor(fallAcross(taxa, lowM, highM));
    panels.push({ lowM, highM, first, count });
    first += count;
  }
  return fill(taxa, panels, first);
}

/** ln L of every taxon at one height. */
export function logsAt(taxa: readonly EndLikelihood[], heightM: number): Float64Array {
  return Float64Array.from(taxa, (taxon) => taxon.log(heightM));
}

/** The rows of `logs`, one a node. */
export function logRows({ heights, taxa, logs }: EndGrid): readonly Float64Array[] {
  return Array.from(heights, (_, node) => logs.subarray(node * taxa, node * taxa + taxa));
}

/** Lowest height at which all of them may have ended: the highest of the lowest heights. */
export function floorOf(taxa: readonly EndLikelihood[]): number {
  return Math.max(...taxa.map((taxon) => taxon.fromM));
}

function fill(taxa: readonly EndLikelihood[], panels: readonly Panel[], size: number): EndGrid {
  const k = taxa.length;
  const heights = new Float64Array(size);
  const weights = new Float64Array(size);
  const panelOf = new Int32Array(size);
  const logs = new Float64Array(size * k);
  panels.forEach(({ lowM, highM, first, count }, panel) => {
    const rule = gaussLegendre(count);
    const half = 0.5 * (highM - lowM);
    for (let n = 0; n < count; n++) {
      const node = first + n;
      heights[node] = lowM + half * (1 + rule.nodes[n]);
      weights[node] = half * rule.weights[n];
      panelOf[node] = panel;
      for (let i = 0; i < k; i++) logs[node * k + i] = taxa[i].log(heights[node]);
    }
  });
  return { panels, heights, weights, panelOf, taxa: k, logs };
}

function startingEdges(
  taxa: readonly EndLikelihood[],
  { lowM, highM, breaksM = [] }: GridOptions,
): readonly number[] {
  const highest = Math.max(...taxa.map((taxon) => taxon.lastM));
  const geometric = Array.from(
    { length: GEOMETRIC_STEPS },
    (_, q) => highest + (highM - highest) / 4 ** (q + 1),
  );
  const kinks = taxa.flatMap((taxon) => [taxon.fromM, ...taxon.kinksM]);
  const inside = [...kinks, ...geometric, ...breaksM].filter((x) => x > lowM && x < highM);
  return [...new Set([lowM, ...inside, highM])].toSorted((a, b) => a - b);
}

function splitSteep(taxa: readonly EndLikelihood[], edges: readonly number[]): readonly number[] {
  const least = SMALLEST_SHARE * (edges[edges.length - 1] - edges[0]);
  const begins = new Set(taxa.flatMap((taxon) => [taxon.fromM, ...taxon.kinksM]));
  const split: number[] = [edges[0]];
  let fallen = 0;
  const visit = (lowM: number, highM: number): void => {
    const middle = lowM + 0.25 * (highM - lowM);
    const fall = fallAcross(taxa, lowM, highM);
    if (highM - lowM > least && middle > lowM && fall > Math.max(LARGEST_FALL, SHARE_OF_FALL * fallen)) {
      visit(lowM, middle);
      visit(middle, highM);
    } else {
      split.push(highM);
      fallen += fall;
    }
  };
  for (let i = 1; i < edges.length; i++) {
    if (begins.has(edges[i - 1])) fallen = 0;
    visit(edges[i - 1], edges[i]);
  }
  return split;
}

/** How far ln of the product of L falls across a panel, over the taxa that may end in it. */
function fallAcross(taxa: readonly EndLikelihood[], lowM: number, highM: number): number {
  const inset = INSIDE * (highM - lowM);
  let fall = 0;
  for (const taxon of taxa)
    if (taxon.fromM <= lowM) fall += taxon.log(lowM + inset) - taxon.log(highM - inset);
  return Math.abs(fall);
}

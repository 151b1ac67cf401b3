import { log } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { type EndGrid, endGrid, floorOf } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import { type LogSum, logSum } from "./log-sum.ts";
import type { EvidenceByTop } from "./single-level.ts";
import { type StartPanel, startPanels } from "./start-panels.ts";
import { massBins, type Weighted } from "./weighted.ts";

export interface Gradual {
  /** For the longest duration, and for each other one asked for: ln of the evidence at each top of the window. */
  readonly logEvidence: readonly EvidenceByTop[];
  /** The disappearance may not begin below the window: durations up to min(longest, top - window base). */
  readonly logEvidenceConfined: EvidenceByTop;
  /** Durations and their masses under the window's own top and the longest duration; absent where nothing fits. */
  readonly durations?: Weighted;
}

const topNodes = (fall: number) => (fall < 0.05 ? 2 : fall < 0.4 ? 4 : fall < 1.5 ? 6 : 8);
/** Panels of the top narrow by 1/4 towards the lowest possible top this often. */
const STEEP_STEPS = 9;

/**
 * Ends spread evenly: the top t flat over the window, the duration D flat on (0, longest), taxon ends independent and
 * uniform on (t - D, t): Z = integral of pi(t) (1 / longest) prod_i [(1 / D) integral of L_i over (t - D, t)] dD dt. Not
 * cut at the base of the window unless confined.
 *
 * Nodes in t and in the height s = t - D at which the disappearance begins. The integral of each L_i from s to t is a sum
 * of closed forms over panels, so nothing cancels.
 *
 * @param longestM the longest duration thought possible in metres, then others for which the evidence is wanted too.
 */
export function gradual(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  longestM: readonly number[],
): Gradual {
  const floorM = Math.max(window.lowM, floorOf(taxa));
  const highM = Math.max(...window.topsM);
  if (!(floorM < highM)) return nothingFits(window, longestM);
  const grid = endGrid(taxa, {
    lowM: floorM,
    highM,
    breaksM: [...window.topsM, ...topBreaks(taxa, window, { longestM: longestM[0], floorM, highM })],
    nodesFor: topNodes,
  });
  const starts = startPanels(taxa, grid, [floorM - Math.max(...longestM), window.lowM]);
  return sumOverTops(taxa, { grid, starts, window, longestM });
}

function nothingFits(window: EndWindow, longestM: readonly number[]): Gradual {
  const none = window.topsM.map(() => Number.NEGATIVE_INFINITY);
  return { logEvidence: longestM.map(() => none), logEvidenceConfined: none };
}

/** With more taxa the kinks in t are weak beside the product of the others. */
const MOST_WITH_KINKS = 12;
/** Higher tops are left out once a top adds less than this share, in ln, of the largest. */
const NEGLIGIBLE = 45;

interface TopRange {
  readonly longestM: number;
  readonly floorM: number;
  readonly highM: number;
}

/** The integrand in t has kinks where t - longest meets a kink of a likelihood, and is steep above the floor. */
function topBreaks(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  { longestM, floorM, highM }: TopRange,
): readonly number[] {
  const few = taxa.length <= MOST_WITH_KINKS ? taxa : [];
  const kinks = few.flatMap((taxon) => [taxon.fromM, ...taxon.kinksM].map((x) => x + longestM));
  const steep = Array.from({ length: STEEP_STEPS }, (_, q) => floorM + (highM - floorM) / 4 ** (q + 1));
  return [...kinks, ...steep, window.lowM + longestM];
}

interface Spread {
  readonly grid: EndGrid;
  readonly starts: readonly StartPanel[];
  readonly window: EndWindow;
  readonly longestM: readonly number[];
}

/** One sum for each longest duration (and one confined) by each top of the window. */
function sumOverTops(taxa: readonly EndLikelihood[], spread: Spread): Gradual {
  const { grid, window, longestM } = spread;
  const sums = longestM.map(() => window.topsM.map(() => logSum()));
  const confined = window.topsM.map(() => logSum());
  const bins = massBins(longestM[0]);
  const highestM = Math.max(...taxa.map((taxon) => taxon.lastM));
  let largest = Number.NEGATIVE_INFINITY;
  for (let node = 0; node < grid.heights.length; node++) {
    const topM = grid.heights[node];
    const logWeight = log(grid.weights[node]);
    const isOwn = belowTop(grid, node, window.topsM[0]);
    const within = longestM.map(() => logSum());
    const inWindow = logSum();
    visitStarts(taxa, spread, topM, (startM, logMass) => {
      const durationM = topM - startM;
      for (let d = 0; d < longestM.length; d++) if (durationM < longestM[d]) within[d].add(logMass);
      if (!(durationM < longestM[0])) return;
      if (startM > window.lowM) inWindow.add(logMass);
      if (isOwn) bins.add(durationM, logMass + logWeight);
    });
    const add = (sum: LogSum[], log1: number) => {
      window.topsM.forEach((edgeM, t) => {
        if (belowTop(grid, node, edgeM)) sum[t].add(log1);
      });
    };
    const logOwn = Math.max(...within.map((sum) => sum.log()));
    largest = Math.max(largest, logOwn);
    if (logOwn < largest - NEGLIGIBLE && topM > highestM) break;
    within.forEach((sum, d) => add(sums[d], sum.log() + logWeight - log(longestM[d])));
    add(confined, inWindow.log() + logWeight - log(Math.min(longestM[0], topM - window.lowM)));
  }
  const evidence = (sum: readonly LogSum[]) =>
    sum.map((s, t) => s.log() - log(window.topsM[t] - window.lowM));
  const durations = bins.build();
  return {
    logEvidence: sums.map(evidence),
    logEvidenceConfined: evidence(confined),
    ...(durations === undefined ? {} : { durations }),
  };
}

type UseStart = (startM: number, logMass: number) => void;

/** From the top downward; `above` holds each taxon's integral from the top of the current panel to t. */
function visitStarts(
  taxa: readonly EndLikelihood[],
  { starts, longestM }: Spread,
  topM: number,
  use: UseStart,
): void {
  const cutsM = longestM.map((longest) => topM - longest);
  const lowestM = Math.min(...cutsM);
  const above = new Float64Array(taxa.length);
  for (let p = starts.length - 1; p >= 0; p--) {
    const panel = starts[p];
    if (panel.lowM >= topM) continue;
    if (panel.highM <= lowestM) return;
    const isCut = panel.highM > topM || cutsM.some((x) => x > panel.lowM && x < panel.highM);
    if (isCut) useParts(taxa, panel, { above, topM, cutsM, lowestM }, use);
    else useWhole(panel, above, topM, use);
  }
}

function useWhole(panel: StartPanel, above: Float64Array, topM: number, use: UseStart): void {
  const k = above.length;
  for (let n = 0; n < panel.heights.length; n++) {
    const startM = panel.heights[n];
    if (startM < topM)
      use(startM, logProduct(panel.toTop, n * k, { above, length: topM - startM }) + panel.logWeights[n]);
  }
  for (let i = 0; i < k; i++) above[i] += panel.whole[i];
}

interface Cut {
  readonly above: Float64Array;
  readonly topM: number;
  readonly cutsM: readonly number[];
  readonly lowestM: number;
}

/** The panel that holds t, or those in which a longest duration begins: cut there, the parts one by one. */
function useParts(
  taxa: readonly EndLikelihood[],
  panel: StartPanel,
  { above, topM, cutsM, lowestM }: Cut,
  use: UseStart,
): void {
  const lowM = Math.max(panel.lowM, lowestM);
  const inside = [topM, panel.highM, lowM, ...cutsM].filter(
    (x) => x >= lowM && x <= Math.min(panel.highM, topM),
  );
  const edges = [...new Set(inside)].toSorted((a, b) => b - a);
  const rule = gaussLegendre(panel.heights.length);
  const toTop = new Float64Array(taxa.length);
  for (let e = 1; e < edges.length; e++) {
    const [highM, baseM] = [edges[e - 1], edges[e]];
    const half = 0.5 * (highM - baseM);
    for (let n = 0; n < rule.nodes.length; n++) {
      const startM = baseM + half * (1 + rule.nodes[n]);
      for (let i = 0; i < toTop.length; i++)
        toTop[i] = taxa[i].fromM < highM ? taxa[i].area(startM, highM) : 0;
      if (startM < topM)
        use(startM, logProduct(toTop, 0, { above, length: topM - startM }) + log(half * rule.weights[n]));
    }
    for (let i = 0; i < toTop.length; i++) if (taxa[i].fromM < highM) above[i] += taxa[i].area(baseM, highM);
  }
}

/** ln of prod (part + above) / length. */
function logProduct(
  parts: Float64Array,
  first: number,
  { above, length }: { readonly above: Float64Array; readonly length: number },
): number {
  const per = 1 / length;
  let product = 1;
  let sum = 0;
  for (let i = 0; i < above.length; i++) {
    product *= (parts[first + i] + above[i]) * per;
    if (product < 1e-200) {
      if (product === 0) return Number.NEGATIVE_INFINITY;
      sum += log(product);
      product = 1;
    }
  }
  return sum + log(product);
}

import { exp, log, log1p } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { type EndGrid, endGrid, floorOf, logsAt } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";
import { belowTop, type EndWindow } from "./end-window.ts";
import { type LevelPosterior, posteriorBuilder } from "./level-posterior.ts";
import type { EvidenceByTop } from "./single-level.ts";
import { type TwoShares, twoShares } from "./two-shares.ts";
import { massBins, type Weighted } from "./weighted.ts";

export interface TwoPulses {
  /** Exactly two pulses, memberships by flat Dirichlet shares. */
  readonly logEvidence: EvidenceByTop;
  /** Exactly two pulses, every allocation of the taxa equally likely. */
  readonly logEvidenceEqual: EvidenceByTop;
  /** Under the window's own top and Dirichlet shares; absent where nothing inside it fits. */
  readonly posterior?: PulsesPosterior;
}

export interface PulsesPosterior {
  /** Heights of the pulses, from the lowest. */
  readonly levels: readonly LevelPosterior[];
  /** Highest minus lowest pulse: values and their masses. */
  readonly separation: Weighted;
  /** Chance that each taxon ended in each pulse: `membership[pulse][taxon]`. */
  readonly membership: readonly Float64Array[];
}

/** Pairs whose bound is under this share of the sum so far are left out. */
const NEGLIGIBLE = 1e-11;
/** Membership is not refined by pairs with less than this share of the mass so far. */
const LITTLE = 1e-9;

/**
 * Exactly two pulses, every one holding a taxon, at heights independent and flat over the window. Memberships have
 * shares (omega, 1 - omega), omega flat on (0, 1), and only allocations that leave no pulse empty count:
 * Z = (k + 1) / (k - 1) x integral of pi pi E_omega [sum over such allocations]. The expectation is a polynomial of
 * degree k in omega, integrated exactly; pairs in one panel run over the triangle below the upper pulse.
 *
 * `equal`: the mean over the 2^k - 2 allocations that leave no pulse empty.
 * Undefined (evidence 0) with fewer than two taxa.
 */
export function twoPulses(taxa: readonly EndLikelihood[], window: EndWindow): TwoPulses {
  const none = window.topsM.map(() => Number.NEGATIVE_INFINITY);
  const floorM = Math.max(window.lowM, floorOf(taxa));
  const highM = Math.max(...window.topsM);
  const lowM = Math.max(window.lowM, Math.min(...taxa.map((taxon) => taxon.fromM)));
  if (taxa.length < 2 || !(floorM < highM)) return { logEvidence: none, logEvidenceEqual: none };
  const grid = endGrid(taxa, { lowM, highM, breaksM: window.topsM });
  return sumOfPairs(grid, window, pairsOf(taxa, grid, floorM));
}

/** Two levels, the lower one in or below the panel of the upper one. */
interface Pair {
  readonly upper: number;
  readonly lowerPanel: number;
  readonly lowerM: number;
  readonly weight: number;
  /** ln L of every taxon at the lower level, and at the upper one. */
  readonly lowerLogs: Float64Array;
  readonly upperLogs: Float64Array;
  /** ln of an upper bound of what the pair can add: the better of the two levels for every taxon. */
  readonly bound: number;
}

/** Every pair whose upper level lies above the floor, the lower level below the upper one. */
function pairsOf(taxa: readonly EndLikelihood[], grid: EndGrid, floorM: number): readonly Pair[] {
  const k = taxa.length;
  const { heights, weights, panels, panelOf, logs } = grid;
  const rows = Array.from(heights, (_, node) => logs.subarray(node * k, node * k + k));
  const pairs: Pair[] = [];
  for (let upper = 0; upper < heights.length; upper++) {
    const panel = panels[panelOf[upper]];
    if (panel.lowM < floorM) continue;
    const add = (lowerPanel: number, lowerM: number, at: { weight: number; lowerLogs: Float64Array }) =>
      pairs.push({
        upper,
        lowerPanel,
        lowerM,
        weight: at.weight * weights[upper],
        lowerLogs: at.lowerLogs,
        upperLogs: rows[upper],
        bound: boundOf(at.lowerLogs, rows[upper]),
      });
    for (let lower = 0; lower < panel.first; lower++)
      add(panelOf[lower], heights[lower], { weight: weights[lower], lowerLogs: rows[lower] });
    for (const { heightM, weight } of innerNodes(panel.lowM, heights[upper], panel.count))
      add(panelOf[upper], heightM, { weight, lowerLogs: logsAt(taxa, heightM) });
  }
  return pairs;
}

function innerNodes(lowM: number, highM: number, count: number) {
  const { nodes, weights } = gaussLegendre(count);
  const half = 0.5 * (highM - lowM);
  return Array.from(nodes, (z, i) => ({ heightM: lowM + half * (1 + z), weight: half * weights[i] }));
}

function sumOfPairs(grid: EndGrid, window: EndWindow, pairs: readonly Pair[]): TwoPulses {
  const k = grid.taxa;
  const shares = twoShares(k);
  let largest = Number.NEGATIVE_INFINITY;
  for (const { bound } of pairs) largest = Math.max(largest, bound);
  const sums = window.topsM.map(() => ({ dirichlet: 0, equal: 0 }));
  const summary = summaryOf(grid);
  for (const pair of pairs) {
    const scale = exp(pair.bound - largest) * pair.weight;
    if (scale < NEGLIGIBLE * Math.min(sums[0].dirichlet, sums[0].equal)) continue;
    const { dirichlet, equal } = shares.weigh(pair.lowerLogs, pair.upperLogs);
    for (let t = 0; t < sums.length; t++) {
      if (!belowTop(grid, pair.upper, window.topsM[t])) continue;
      sums[t].dirichlet += scale * dirichlet;
      sums[t].equal += scale * equal;
    }
    if (belowTop(grid, pair.upper, window.topsM[0])) summary.add(pair, scale, shares);
  }
  const width = window.topsM.map((topM) => 2 * log(topM - window.lowM));
  return {
    logEvidence: sums.map(
      ({ dirichlet }, t) => largest + log((2 * (k + 1) * dirichlet) / (k - 1)) - width[t],
    ),
    logEvidenceEqual: sums.map(
      ({ equal }, t) => largest + log(2 * equal) - log1p(-(2 ** (1 - k))) - width[t],
    ),
    ...(sums[0].dirichlet > 0 ? { posterior: summary.build() } : {}),
  };
}

function boundOf(lower: Float64Array, upper: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < lower.length; i++) sum += Math.max(lower[i], upper[i]);
  return sum;
}

function summaryOf(grid: EndGrid) {
  const k = grid.taxa;
  const lowerLevel = posteriorBuilder(grid);
  const upperLevel = posteriorBuilder(grid);
  const inLower = new Float64Array(k);
  const bins = massBins(panelsTop(grid) - grid.panels[0].lowM);
  let total = 0;
  let refined = 0;
  const add = ({ upper, lowerPanel, lowerM }: Pair, scale: number, shares: TwoShares) => {
    const mass = scale * shares.last();
    if (!(mass > 0)) return;
    const upperM = grid.heights[upper];
    lowerLevel.add(lowerPanel, lowerM, mass);
    upperLevel.add(grid.panelOf[upper], upperM, mass);
    bins.add(upperM - lowerM, log(mass));
    total += mass;
    if (mass < LITTLE * total) return;
    refined += mass;
    shares.addMembership(inLower, scale);
  };
  const build = (): PulsesPosterior => ({
    levels: [lowerLevel.build(), upperLevel.build()],
    separation: bins.build() ?? { values: new Float64Array(0), masses: new Float64Array(0) },
    membership: [inLower.map((x) => x / refined), inLower.map((x) => 1 - x / refined)],
  });
  return { add, build };
}

const panelsTop = ({ panels }: EndGrid) => panels[panels.length - 1].highM;

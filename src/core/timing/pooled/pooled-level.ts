import { exp, log } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { compensatedSum, logSumExp } from "../../numeric/sums.ts";
import type { Panel } from "../scenarios/end-grid.ts";
import { lawEdges } from "../scenarios/horizon-law.ts";
import { type LevelPosterior, posteriorBuilder } from "../scenarios/level-posterior.ts";
import type { EvidenceByTop } from "../scenarios/single-level.ts";
import { centreOf, type SectionMap } from "./common-scale.ts";
import { COARSE, type LogProfile, logMean, logProfile } from "./log-profile.ts";
import { type LevelSpan, type PooledSection, sectionLevel } from "./section-level.ts";

export interface PooledProblem {
  readonly sections: readonly PooledSection[];
  /** The window of levels of the common scale, flat beforehand. */
  readonly low: number;
  /** Its top; then other tops for which the evidence is wanted too. */
  readonly tops: readonly number[];
  /** One standard deviation of an error that all sections share, in the unit of the scale. */
  readonly sharedSd: number;
}

export interface PooledLevel {
  /** ln of the evidence of one common level, for each top. */
  readonly common: EvidenceByTop;
  /** ln of the evidence of a level of its own in every section, for each top. */
  readonly free: EvidenceByTop;
  /** Of the common level, under the window's own top; absent where no level inside it fits. */
  readonly posterior?: LevelPosterior;
  /** Of the common level without one section; only with two sections or more. */
  readonly without: readonly LeftOutLevel[];
}

export interface LeftOutLevel {
  readonly section: string;
  readonly posterior?: LevelPosterior;
}

/**
 * One level common to several sections: L(c) = prod_s L_s(c), each section's own placing error integrated out; with a
 * shared error e0, normal with standard deviation `sharedSd`, the integral of its law times prod_s L_s(c + e0). Flat prior
 * on the window. Beside it the evidence of a free level in every section, and the level without each section.
 *
 * Assumes independent finds given the ends, uniform in each section's recovery-weighted coordinate, and one level per
 * section that all its taxa end at. Sections are never merged: a find only ever meets its own section's horizon.
 *
 * @throws RangeError without sections.
 */
export function pooledLevel({ sections, low, tops, sharedSd }: PooledProblem): PooledLevel {
  if (sections.length === 0) throw new RangeError("pooledLevel: expected at least one section, got none");
  const reach = 9 * sharedSd;
  const span = { low: low - reach, high: Math.max(...tops) + reach };
  const each = sections.map((section) => sectionLevel(section, span));
  const window = { low, tops, sharedSd };
  const together = solve(each, window);
  const alone = each.map((profile) => solve([profile], window).evidence);
  return {
    common: together.evidence,
    free: tops.map((_, t) => compensatedSum(alone.map((evidence) => evidence[t]))),
    ...together.posterior,
    without:
      sections.length < 2
        ? []
        : sections.map(({ section }, s) => ({ section, ...solve(each.toSpliced(s, 1), window).posterior })),
  };
}

/**
 * The posterior of one common level alone, from likelihoods of many steps, as those of sampled horizons: levels at which
 * the likelihood is under e^-60 of its value at the highest last find are left out.
 *
 * @param problem only its own top is used.
 */
export function commonLevel(
  problem: PooledProblem & { readonly highest: number },
): LevelPosterior | undefined {
  const { sections, low, tops, sharedSd } = problem;
  const high = Math.min(tops[0], reachOf(problem));
  const reach = 9 * sharedSd;
  const span = { low: low - reach, high: high + reach, tolerance: COARSE };
  const each = sections.map((section) => sectionLevel(section, span));
  return solve(each, { low, tops: [high], sharedSd }).posterior.posterior;
}

/** Level beyond which nothing weighs, errors of places included. */
function reachOf({
  sections,
  tops,
  highest,
  sharedSd,
}: PooledProblem & { readonly highest: number }): number {
  const placed = sections.map(({ taxa, maps }) => ({ taxa, map: maps[0] }));
  const logAt = (level: number) =>
    compensatedSum(
      placed.flatMap(({ taxa, map }) => taxa.map((taxon) => taxon.log(centreOf(map.lawAt(level))))),
    );
  const slack = Math.max(...placed.map(({ map }) => errorOf(map, highest))) + 9 * sharedSd;
  const start = logAt(highest + 1e-9 * Math.max(1, Math.abs(highest)));
  for (let step = (tops[0] - highest) / 1024; highest + step < tops[0]; step *= 2)
    if (logAt(highest + step) < start - NEGLIGIBLE) return highest + step + slack;
  return tops[0];
}

/** How far a level may be misplaced. */
function errorOf({ lawAt, toLevel }: SectionMap, level: number): number {
  const edges = lawEdges(lawAt(level));
  return toLevel(edges[edges.length - 1]) - toLevel(edges[0]);
}

interface Window {
  readonly low: number;
  readonly tops: readonly number[];
  readonly sharedSd: number;
}

interface Solved {
  readonly evidence: EvidenceByTop;
  readonly posterior: { readonly posterior?: LevelPosterior };
}

function solve(sections: readonly LogProfile[], { low, tops, sharedSd }: Window): Solved {
  const span = { low, high: Math.max(...tops) };
  const product = (level: number) => {
    let sum = 0;
    for (const section of sections) sum += section.log(level);
    return sum;
  };
  const smooth = sharedSd > 0 ? [shared(sections, product, { ...span, sharedSd })] : undefined;
  const edges = edgesIn(smooth ?? sections, span, tops);
  const nodes = levelNodes(smooth === undefined ? product : smooth[0].log, edges);
  const evidence = tops.map(
    (top) =>
      logSumExp(nodes.logs.filter((_, n) => nodes.panels[nodes.panelOf[n]].highM <= top)) - log(top - low),
  );
  if (!Number.isFinite(evidence[0])) return { evidence, posterior: {} };
  return { evidence, posterior: { posterior: posteriorOf(nodes, tops[0]) } };
}

/** ln of the mean of the product over the shared error: level c lies at c + e0 in every section. */
function shared(
  sections: readonly LogProfile[],
  product: (level: number) => number,
  { low, high, sharedSd }: LevelSpan & { readonly sharedSd: number },
): LogProfile {
  const wide = { low: low - 9 * sharedSd, high: high + 9 * sharedSd };
  const profile = logProfile(product, edgesIn(sections, wide, []));
  return logProfile(
    (level) => logMean(profile, { kind: "normal", meanM: level, sdM: sharedSd }),
    [low, high],
  );
}

function edgesIn(sections: readonly LogProfile[], { low, high }: LevelSpan, more: readonly number[]) {
  const inside = [...sections.flatMap(({ edges }) => edges), ...more].filter((x) => x > low && x < high);
  return [...new Set([low, ...inside, high])].toSorted((a, b) => a - b);
}

interface LevelNodes {
  readonly panels: readonly Panel[];
  readonly levels: readonly number[];
  readonly panelOf: readonly number[];
  /** ln (weight times likelihood). */
  readonly logs: readonly number[];
}

const NODES = 16;
/** Across a panel ln of the likelihood changes by at most this, unless it weighs nothing. */
const LARGEST_FALL = 6;
const NEGLIGIBLE = 60;
const DEEPEST = 24;

/** Nodes over the levels where the likelihood weighs anything, on panels across which it changes little. */
function levelNodes(logAt: (level: number) => number, edges: readonly number[]): LevelNodes {
  const heightOf = (low: number, high: number) =>
    [1e-9, 0.25, 0.5, 0.75, 1 - 1e-9].map((share) => logAt(low + share * (high - low)));
  const rough = edges.slice(1).map((high, i) => heightOf(edges[i], high));
  const largest = Math.max(...rough.flat());
  const panels: Panel[] = [];
  const visit = (low: number, high: number, depth: number): void => {
    const logs = heightOf(low, high);
    const most = Math.max(...logs);
    const isSteep = most - Math.min(...logs) > LARGEST_FALL && most > largest - NEGLIGIBLE;
    if (isSteep && depth < DEEPEST) {
      const middle = 0.5 * (low + high);
      visit(low, middle, depth + 1);
      visit(middle, high, depth + 1);
    } else panels.push({ lowM: low, highM: high, first: panels.length * NODES, count: NODES });
  };
  for (let i = 1; i < edges.length; i++) visit(edges[i - 1], edges[i], 0);
  return nodesOn(panels, logAt);
}

function nodesOn(panels: readonly Panel[], logAt: (level: number) => number): LevelNodes {
  const rule = gaussLegendre(NODES);
  const levels: number[] = [];
  const panelOf: number[] = [];
  const logs: number[] = [];
  panels.forEach(({ lowM, highM }, panel) => {
    const half = 0.5 * (highM - lowM);
    for (let n = 0; n < NODES; n++) {
      const level = lowM + half * (1 + rule.nodes[n]);
      levels.push(level);
      panelOf.push(panel);
      logs.push(log(half * rule.weights[n]) + logAt(level));
    }
  });
  return { panels, levels, panelOf, logs };
}

function posteriorOf({ panels, levels, panelOf, logs }: LevelNodes, top: number): LevelPosterior {
  const isInside = (n: number) => panels[panelOf[n]].highM <= top;
  const largest = logs.reduce(
    (most, value, n) => (isInside(n) ? Math.max(most, value) : most),
    Number.NEGATIVE_INFINITY,
  );
  const builder = posteriorBuilder({ panels });
  for (let n = 0; n < logs.length; n++)
    if (isInside(n) && logs[n] > Number.NEGATIVE_INFINITY)
      builder.add(panelOf[n], levels[n], exp(logs[n] - largest));
  return builder.build();
}

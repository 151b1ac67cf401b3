import { membershipAt } from "./allocations.ts";
import { type EndGrid, logRows } from "./end-grid.ts";
import { posteriorBuilder } from "./level-posterior.ts";
import type { PulsesPosterior } from "./two-pulses.ts";

/** Levels that, by their mass, stand for the posterior of exactly K pulses. */
export interface WeightedLevels {
  /** Nodes of the grid, from the lowest. */
  readonly nodes: readonly number[];
  readonly mass: number;
}

/** Memberships are averaged over this many of the levels, for three pulses and for four. */
const MEMBERSHIPS = { 3: 256, 4: 48 };

/** Heights by rank, separation and memberships under exactly K pulses. Undefined without mass. */
export function pulsesSummary(
  grid: EndGrid,
  drawn: readonly WeightedLevels[],
  pulses: 3 | 4,
): PulsesPosterior | undefined {
  const kept = drawn.filter(({ mass }) => mass > 0);
  if (kept.length === 0) return undefined;
  const { taxa: k, heights, panelOf } = grid;
  const rows = logRows(grid);
  const levels = Array.from({ length: pulses }, () => posteriorBuilder(grid));
  for (const { nodes, mass } of kept)
    nodes.forEach((node, g) => levels[g].add(panelOf[node], heights[node], mass));
  const members = new Float64Array(k * pulses);
  const thinned = evenlyThinned(kept, MEMBERSHIPS[pulses]);
  for (const { nodes } of thinned)
    membershipAt(nodes.map((node) => rows[node]))?.forEach((x, j) => {
      members[j] += x / thinned.length;
    });
  return {
    levels: levels.map((level) => level.build()),
    separation: {
      values: Float64Array.from(kept, ({ nodes }) => heights[nodes[pulses - 1]] - heights[nodes[0]]),
      masses: Float64Array.from(kept, ({ mass }) => mass),
    },
    membership: levels.map((_, g) => members.slice(g * k, g * k + k)),
  };
}

/** A number of entries that stand for all, spaced evenly along the running sum of their masses; no chance in it. */
function evenlyThinned(drawn: readonly WeightedLevels[], count: number): readonly WeightedLevels[] {
  const total = drawn.reduce((sum, { mass }) => sum + mass, 0);
  const chosen: WeightedLevels[] = [];
  let running = 0;
  for (const levels of drawn) {
    running += levels.mass;
    while (chosen.length < count && running >= ((chosen.length + 0.5) / count) * total) chosen.push(levels);
  }
  return chosen;
}

import { log } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import type { EndGrid } from "./end-grid.ts";
import type { EndLikelihood } from "./end-likelihood.ts";

/** A stretch of heights in which a gradual disappearance may begin. */
export interface StartPanel {
  readonly lowM: number;
  readonly highM: number;
  readonly heights: Float64Array;
  readonly logWeights: Float64Array;
  /** Integral of each L from a node to the panel's top, node by node. */
  readonly toTop: Float64Array;
  /** Integral of each L over the panel. */
  readonly whole: Float64Array;
}

/** Panels below the floor halve towards it this often: 1 / D is steep where the top is near. */
const HALVINGS = 20;
/** A panel much narrower than its distance from the floor needs few nodes. */
const nodesFor = (share: number) => (share < 0.05 ? 3 : share < 0.3 ? 4 : 6);

/**
 * Panels from the lowest possible beginning to the top of the grid of tops, one edge at the base of the window: below the floor they end where a likelihood
 * begins or has a kink and no panel is longer than its distance from the floor; above it they are the panels of the tops.
 */
export function startPanels(
  taxa: readonly EndLikelihood[],
  tops: EndGrid,
  [lowestM, edgeM]: readonly [number, number],
): readonly StartPanel[] {
  const floorM = tops.panels[0].lowM;
  const kinks = taxa.flatMap((taxon) => [taxon.fromM, ...taxon.kinksM]);
  const halved = Array.from({ length: HALVINGS }, (_, q) => floorM - (floorM - lowestM) / 2 ** (q + 1));
  const inside = [...kinks, ...halved, edgeM].filter((x) => x > lowestM && x < floorM);
  const edges = [...new Set([lowestM, ...inside, floorM, ...tops.panels.map((panel) => panel.highM)])];
  const sorted = edges.toSorted((a, b) => a - b);
  return sorted.slice(1).map((highM, i) => {
    const lowM = sorted[i];
    const share = highM <= floorM ? (highM - lowM) / (floorM - lowM) : 1;
    return startPanel(taxa, [lowM, highM], nodesFor(share));
  });
}

function startPanel(
  taxa: readonly EndLikelihood[],
  [lowM, highM]: readonly [number, number],
  nodes: number,
): StartPanel {
  const rule = gaussLegendre(nodes);
  const half = 0.5 * (highM - lowM);
  const heights = rule.nodes.map((z) => lowM + half * (1 + z));
  const k = taxa.length;
  const toTop = new Float64Array(nodes * k);
  for (let n = 0; n < nodes; n++)
    for (let i = 0; i < k; i++) toTop[n * k + i] = taxa[i].area(heights[n], highM);
  return {
    lowM,
    highM,
    heights,
    logWeights: rule.weights.map((w) => log(w * half)),
    toTop,
    whole: Float64Array.from(taxa, (taxon) => taxon.area(lowM, highM)),
  };
}

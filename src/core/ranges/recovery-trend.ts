import { exp } from "../numeric/elementary.ts";
import { gaussLegendre } from "../numeric/gauss-legendre.ts";
import { findRoot } from "../numeric/roots.ts";
import type { RecoveryPiece } from "./coordinate.ts";
import type { InteriorFinds } from "./interior-finds.ts";

/** Recovery may change over the section by no more than this factor's logarithm, e^8 being near 3000. */
const STEEPEST = 8;
/** Finds between first and last that a trend takes at least. */
const FEWEST_FINDS = 5;
const NODES = 24;
const PIECES = 64;

/**
 * The slope beta of recovery exp(beta h), by the conditional likelihood of the finds between the first and the last of
 * each taxon, pooled: prod exp(beta x_i) / integral of exp(beta s) over the searchable rock between them. It has one
 * maximum, where the finds' heights add up to what they are expected to.
 *
 * Assumes one trend for all taxa of the group, and true ranges that do not decide where the finds between lie. Held to
 * a change by e^8 over the section. Undefined with fewer than five such finds.
 *
 * @param lengthM thickness of the section; beta is per metre.
 * After C. R. Marshall 1997, Paleobiology 23:165-173; D. R. Cox & P. A. W. Lewis 1966, chapter 3.
 */
export function recoveryTrend(taxa: readonly InteriorFinds[], lengthM: number): number | undefined {
  const finds = taxa.reduce((sum, { heightsM }) => sum + heightsM.length, 0);
  if (finds < FEWEST_FINDS || !(lengthM > 0)) return undefined;
  const score = (beta: number) =>
    taxa.reduce(
      (sum, taxon) =>
        sum + taxon.heightsM.reduce((a, b) => a + b, 0) - taxon.heightsM.length * expectedHeight(taxon, beta),
      0,
    );
  const steepest = STEEPEST / lengthM;
  if (score(steepest) >= 0) return steepest;
  if (score(-steepest) <= 0) return -steepest;
  return findRoot(score, -steepest, steepest, { tolerance: 1e-9 * steepest });
}

/** Pieces of exp(beta h) over a section, linear between their edges. */
export function trendPieces(
  beta: number,
  [bottomM, topM]: readonly [number, number],
): readonly RecoveryPiece[] {
  const middle = 0.5 * (bottomM + topM);
  const edge = (i: number) => bottomM + ((topM - bottomM) * i) / PIECES;
  const at = (heightM: number) => exp(beta * (heightM - middle));
  return Array.from({ length: PIECES }, (_, i) => ({
    baseM: edge(i),
    topM: edge(i + 1),
    atBase: at(edge(i)),
    atTop: at(edge(i + 1)),
  }));
}

/** Mean height of a find under exp(beta h) in the searchable rock of a range. */
function expectedHeight({ parts }: InteriorFinds, beta: number): number {
  const { nodes, weights } = gaussLegendre(NODES);
  const from = parts[0].baseM;
  let mass = 0;
  let moment = 0;
  for (const { baseM, topM } of parts) {
    const half = 0.5 * (topM - baseM);
    for (let i = 0; i < nodes.length; i++) {
      const above = baseM - from + half * (1 + nodes[i]);
      const weight = half * weights[i] * exp(beta * above);
      mass += weight;
      moment += weight * above;
    }
  }
  return from + moment / mass;
}

import type { Bed } from "../study/model.ts";
import type { RecoveryPiece } from "./coordinate.ts";
import type { InteriorFinds } from "./interior-finds.ts";
import { steps } from "./recovery-pieces.ts";

/** Added to the finds seen and to the finds expected under constant recovery: one find's worth of "no different". */
const SMOOTHING = 1;
const MAXIMUM_ROUNDS = 500;
const SETTLED = 1e-10;
/** Rock that no bed describes. */
const NOT_LOGGED = "";

/** Recovery of one facies and what it rests on. */
export interface FaciesRecovery {
  readonly facies: string;
  readonly recovery: number;
  /** Interior finds seen there, of all taxa together. */
  readonly finds: number;
  /** Finds expected there were recovery the same in all facies. */
  readonly expected: number;
}

/** Stretches of one facies each, from below upward, over the whole of a section. */
export interface FaciesStretch {
  readonly baseM: number;
  readonly topM: number;
  readonly facies: string;
}

/** The facies of each bed, its lithology where no facies is given; rock between beds is a facies of its own. */
export function faciesStretches(
  beds: readonly Bed[],
  [bottomM, topM]: readonly [number, number],
): readonly FaciesStretch[] {
  const edges = [bottomM, topM, ...beds.flatMap((bed) => [bed.baseM, bed.topM])]
    .filter((edge) => edge >= bottomM && edge <= topM)
    .toSorted((a, b) => a - b);
  const distinct = edges.filter((edge, i) => i === 0 || edge > edges[i - 1]);
  return distinct.slice(1).map((top, i) => {
    const middle = 0.5 * (distinct[i] + top);
    const bed = beds.find(({ baseM, topM: bedTop }) => baseM <= middle && bedTop >= middle);
    return { baseM: distinct[i], topM: top, facies: bed?.facies ?? bed?.lithology ?? NOT_LOGGED };
  });
}

/**
 * Recovery of each facies from the finds between the first and the last of each taxon, pooled over taxa: r_f = (finds
 * seen in f + a) / (finds expected in f + a), the expected ones sum_t n_t l_tf / sum_g r_g l_tg at the rates that the
 * taxa have under r itself, l_tf the thickness of f inside taxon t's range; a = 1 draws facies with little rock towards
 * the mean. Solved by repetition.
 *
 * Assumes that recovery differs between facies by the same factor for every taxon of the group, whatever the level.
 * After C. R. Marshall 1997, Paleobiology 23:165-173, and S. M. Holland 2003, Paleobiology 29:468-479.
 */
export function faciesRecovery(
  taxa: readonly InteriorFinds[],
  stretches: readonly FaciesStretch[],
): readonly FaciesRecovery[] {
  const names = [...new Set(stretches.map(({ facies }) => facies))];
  const place = new Map(names.map((name, i) => [name, i]));
  const lengths = taxa.map((taxon) => lengthsOf(taxon, stretches, place));
  const finds = new Float64Array(names.length);
  for (const { heightsM } of taxa)
    for (const heightM of heightsM) {
      const stretch = stretches.find((s) => heightM >= s.baseM && heightM <= s.topM);
      if (stretch !== undefined) finds[place.get(stretch.facies) ?? 0]++;
    }
  const counts = taxa.map(({ heightsM }) => heightsM.length);
  let recovery = new Float64Array(names.length).fill(1);
  for (let round = 0; round < MAXIMUM_ROUNDS; round++) {
    const expected = expectedFinds(lengths, counts, recovery);
    const next = recovery.map((_, f) => (finds[f] + SMOOTHING) / (expected[f] + SMOOTHING));
    const change = Math.max(...next.map((value, f) => Math.abs(value / recovery[f] - 1)));
    recovery = next;
    if (change < SETTLED) break;
  }
  const expected = expectedFinds(lengths, counts, new Float64Array(names.length).fill(1));
  return names.map((facies, f) => ({
    facies,
    recovery: recovery[f],
    finds: finds[f],
    expected: expected[f],
  }));
}

export function faciesPieces(
  stretches: readonly FaciesStretch[],
  recovery: readonly FaciesRecovery[],
): readonly RecoveryPiece[] {
  const of = new Map(recovery.map((r) => [r.facies, r.recovery]));
  const edges = [stretches[0].baseM, ...stretches.map(({ topM }) => topM)];
  return steps(
    edges,
    stretches.map(({ facies }) => of.get(facies) ?? 1),
  );
}

/** Finds in each facies per unit of its recovery, at the taxa's rates under r. */
function expectedFinds(
  lengths: readonly Float64Array[],
  counts: readonly number[],
  recovery: Float64Array,
): Float64Array {
  const expected = new Float64Array(recovery.length);
  lengths.forEach((ofTaxon, t) => {
    const weighed = ofTaxon.reduce((sum, length, f) => sum + length * recovery[f], 0);
    if (!(weighed > 0)) return;
    ofTaxon.forEach((length, f) => {
      expected[f] += (counts[t] * length) / weighed;
    });
  });
  return expected;
}

/** Thickness of each facies inside a taxon's range, rock without recovery left out. */
function lengthsOf(
  { parts }: InteriorFinds,
  stretches: readonly FaciesStretch[],
  place: ReadonlyMap<string, number>,
): Float64Array {
  const lengths = new Float64Array(place.size);
  for (const { baseM, topM, facies } of stretches)
    for (const part of parts)
      lengths[place.get(facies) ?? 0] += Math.max(0, Math.min(topM, part.topM) - Math.max(baseM, part.baseM));
  return lengths;
}

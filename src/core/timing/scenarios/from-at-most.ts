import { logChoose } from "../../numeric/binomial.ts";
import { exp, log } from "../../numeric/elementary.ts";

/**
 * ln of the evidence of exactly K pulses, from that of at most K and of exactly 1, 2, .. K - 1. The numbers of taxa in
 * labelled pulses are uniform under flat Dirichlet shares, so
 * Z_K = sum_j C(K, j) C(k - 1, j - 1) / C(k + K - 1, K - 1) Z_j^+.
 * @param exactly ln Z_1^+ .. ln Z_(K-1)^+.
 * @returns -Infinity where rounding leaves nothing.
 */
export function exactlyFromAtMost(atMost: number, exactly: readonly number[], taxa: number): number {
  const pulses = exactly.length + 1;
  const all = logChoose(taxa + pulses - 1, pulses - 1);
  const ratios = exactly.map((z, index) => {
    const j = index + 1;
    return exp(logChoose(pulses, j) + logChoose(taxa - 1, j - 1) - all + z - atMost);
  });
  const share = 1 - ratios.reduce((sum, ratio) => sum + ratio, 0);
  return share > 0 ? atMost + log(share) + all - logChoose(taxa - 1, pulses - 1) : Number.NEGATIVE_INFINITY;
}

/** The same the other way round: ln Z_K from ln Z_1^+ .. ln Z_K^+. */
export function atMostFromExactly(exactly: readonly number[], taxa: number): number {
  const pulses = exactly.length;
  const all = logChoose(taxa + pulses - 1, pulses - 1);
  const largest = Math.max(...exactly);
  const sum = exactly.reduce((total, z, index) => {
    const j = index + 1;
    return total + exp(logChoose(pulses, j) + logChoose(taxa - 1, j - 1) - all + z - largest);
  }, 0);
  return largest + log(sum);
}

/** The same with every allocation equally likely: K^k Z_K = sum_j C(K, j) j! S(k, j) Z_j^+. */
export function exactlyFromAtMostEqual(atMost: number, exactly: readonly number[], taxa: number): number {
  const pulses = exactly.length + 1;
  const ratios = exactly.map((z, index) => {
    const j = index + 1;
    return exp(logChoose(pulses, j) + z - atMost) * ontoShare(taxa, j, pulses);
  });
  const share = 1 - ratios.reduce((sum, ratio) => sum + ratio, 0);
  return share > 0 ? atMost + log(share) - log(ontoShare(taxa, pulses, pulses)) : Number.NEGATIVE_INFINITY;
}

/** Share of the allocations to K pulses that use exactly j named ones, all of them: j! S(k, j) / K^k. */
export function ontoShare(taxa: number, named: number, pulses: number): number {
  let share = 0;
  for (let i = 0; i < named; i++) {
    const sign = i % 2 === 0 ? 1 : -1;
    share += sign * exp(logChoose(named, i) + taxa * log((named - i) / pulses));
  }
  return share;
}

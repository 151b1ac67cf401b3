import { binomialLowerTail, binomialUpperTail } from "../numeric/binomial.ts";
import { log } from "../numeric/elementary.ts";

/** Ranks of the gaps that bracket a quantile; each absent where no gap can be that limit. */
export interface GapBracket {
  readonly low?: number;
  readonly high?: number;
}

export interface GapQuantile {
  /** C: which quantile of the gaps. */
  readonly confidence: number;
  /** gamma: chance with which each limit holds. */
  readonly assurance: number;
}

/**
 * Ranks l and u of N ordered gaps such that the C-quantile of the law of gaps lies above g_(l), and below g_(u), with
 * chance gamma or more each: l the largest with P(Bin(N, C) >= l) >= gamma, u the smallest with P(Bin(N, C) <= u - 1)
 * >= gamma.
 *
 * Assumes that the gaps, the unseen top gap among them, are independent draws of one law; for uniform finds the bound
 * is conservative. Throws where C or gamma is not between 0 and 1.
 * C. R. Marshall 1994, Paleobiology 20:459-469.
 */
export function gapBracket(gaps: number, quantile: GapQuantile): GapBracket {
  requireQuantile(quantile);
  const { confidence, assurance } = quantile;
  const ranks = Array.from({ length: gaps }, (_, i) => i + 1);
  const low = ranks.findLast((l) => binomialUpperTail(l, gaps, confidence) >= assurance);
  const high = ranks.find((u) => binomialLowerTail(u - 1, gaps, confidence) >= assurance);
  return { ...(low === undefined ? {} : { low }), ...(high === undefined ? {} : { high }) };
}

/** The least number of gaps whose largest bounds the quantile from above: ln(1 - gamma) / ln C, rounded up. */
export function gapsNeededForQuantile(quantile: GapQuantile): number {
  requireQuantile(quantile);
  return Math.ceil(log(1 - quantile.assurance) / log(quantile.confidence) - 1e-12);
}

function requireQuantile({ confidence, assurance }: GapQuantile): void {
  if (!(confidence > 0 && confidence < 1 && assurance > 0 && assurance < 1))
    throw new RangeError(
      `gapBracket: expected levels between 0 and 1, got ${confidence} (confidence), ${assurance} (assurance)`,
    );
}

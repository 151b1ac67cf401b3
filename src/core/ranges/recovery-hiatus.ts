import { exp, expm1, log1p } from "../numeric/elementary.ts";

/** A break in the rock above the last find, all in effective metres; one metre of missing rock counts as one. */
export interface BreakAbove {
  /** U(M) - U(b) and the exponent of the range. */
  readonly length: number;
  readonly exponent: number;
  /** Rock between the last find and the break, and between it and the declared top. */
  readonly below: number;
  readonly above: number;
  /** Missing thickness (or time, rock being put into time first). */
  readonly missing: number;
}

export interface BreakShares {
  readonly below: number;
  readonly within: number;
  readonly above: number;
}

/**
 * Where the end lies: below a break in the rock, in what is missing there, or above it up to the declared top. Posterior
 * with a prior flat in thickness, density (U - U(b))^-e, which stays the same through the missing rock because nothing
 * could be found in it.
 *
 * Assumes recovery and accumulation constant in the units given. Throws unless lengths are 0 or more and the range has
 * one. After C. R. Marshall 1997, Paleobiology 23:165-173.
 */
export function breakShares({ length, exponent, below, above, missing }: BreakAbove): BreakShares {
  if (!(length > 0 && exponent >= 1 && below >= 0 && above >= 0 && missing >= 0))
    throw new RangeError(
      `breakShares: expected a range with length and lengths from 0, got ${length}, ${exponent}, ${below}, ${above}, ${missing}`,
    );
  const massUpTo = (rise: number) => {
    const ratio = log1p(rise / length);
    return exponent === 1 ? length * ratio : (length * expm1((1 - exponent) * ratio)) / (1 - exponent);
  };
  const under = massUpTo(below);
  const within = missing * exp(-exponent * log1p(below / length));
  const over = massUpTo(below + above) - under;
  const total = under + within + over;
  return total > 0
    ? { below: under / total, within: within / total, above: over / total }
    : { below: 1, within: 0, above: 0 };
}

import type { Basis } from "../basis.ts";
import { exp, expm1, log } from "../numeric/elementary.ts";

export interface ReworkingInput {
  /** Distinct levels of the taxon, m. */
  readonly heightsM: readonly number[];
  /** Base of the smear, m. */
  readonly baseM: number;
  /** Mixing length, m: of the marker, or `mixing_length_m` of the taxon where it has its own. */
  readonly lengthM: number;
  /** Default 0.95. */
  readonly level?: number;
}

export type ReworkingCeiling =
  | {
      readonly kind: "ceiling";
      /** Highest level at which a taxon that ended at the event may still be found, m. */
      readonly heightM: number;
      /** Horizons a metre up to the base of the smear. */
      readonly densityPerM: number;
    }
  | { readonly kind: "no-ceiling"; readonly reason: "too-few" | "below-base" };

export const reworkingBasis: Basis = {
  method: "reworking-ceiling",
  statement:
    "A taxon that ended at the event is smeared upward like the marker; its highest find then follows a Gumbel law whose 95 % point is the reworking ceiling.",
  assumptions: [
    "the taxon was found at a constant rate from its first find up to the base of the smear",
    "its remains are mixed like the marker, by the same length unless the taxon has its own",
  ],
  sources: [],
  after: true,
};

/**
 * Ceiling of reworking of one taxon: `hb + L [ln(lambda L) - ln(-ln level)]`, with `lambda = (n_b - 1)/(hb - x_1)`,
 * n_b its horizons from the lowest, x_1, up to the base of the smear hb (at level 0.95 the last term is 2.970).
 * Fewer than two horizons up to hb: `too-few`; a ceiling that would lie at or under hb: `below-base`, nothing of it
 * is expected above.
 *
 * @throws RangeError unless lengthM > 0 and 0 < level < 1.
 */
export function reworkingCeiling({
  heightsM,
  baseM,
  lengthM,
  level = 0.95,
}: ReworkingInput): ReworkingCeiling {
  if (!(lengthM > 0)) throw new RangeError(`reworkingCeiling: expected lengthM > 0, got ${lengthM}`);
  if (!(level > 0 && level < 1))
    throw new RangeError(`reworkingCeiling: expected level in (0, 1), got ${level}`);
  const below = heightsM.filter((height) => height <= baseM);
  const lowest = Math.min(...below);
  if (below.length < 2 || !(baseM > lowest)) return { kind: "no-ceiling", reason: "too-few" };
  const densityPerM = (below.length - 1) / (baseM - lowest);
  const above = lengthM * (log(densityPerM * lengthM) - log(-log(level)));
  if (above <= 0) return { kind: "no-ceiling", reason: "below-base" };
  return { kind: "ceiling", heightM: baseM + above, densityPerM };
}

export interface HighestFind {
  /** Highest find at or above the base of the smear, m. */
  readonly heightM: number;
  readonly baseM: number;
  readonly lengthM: number;
  readonly densityPerM: number;
}

/** p of "ended at the event" for a highest find at h: `1 - exp(-lambda L exp(-(h-hb)/L))`. */
export function reworkingP({ heightM, baseM, lengthM, densityPerM }: HighestFind): number {
  return -expm1(-expectedAbove({ heightM, baseM, lengthM, densityPerM }));
}

/** Finds expected at or above a height of a taxon that ended at the event: `lambda L exp(-(h-hb)/L)`. */
export function expectedAbove({ heightM, baseM, lengthM, densityPerM }: HighestFind): number {
  return densityPerM * lengthM * exp(-(heightM - baseM) / lengthM);
}

/** Level below which the highest find lies with probability p: Gumbel, `hb + L ln(lambda L) - L ln(-ln p)`. */
export function highestFindQuantile(
  p: number,
  { baseM, lengthM, densityPerM }: Omit<HighestFind, "heightM">,
): number {
  return baseM + lengthM * (log(densityPerM * lengthM) - log(-log(p)));
}

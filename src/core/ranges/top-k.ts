import { exp, expm1, log, log1p } from "../numeric/elementary.ts";

/** Which highest finds are used, and how finds thin out towards the end. */
export interface TopFinds {
  /** k: how many highest finds, 2 or more. */
  readonly finds: number;
  /** beta: near the end the density of finds falls as (theta - x)^(beta - 1). */
  readonly tail: number;
}

/**
 * omega = (1 - (1 - C)^(1/(k-1)))^(1/beta): the level-C quantile of (theta - x_n) / (theta - x_(n-k+1)).
 *
 * @param confidence C, in (0, 1); throws otherwise.
 * After D. S. Robson & J. H. Whitlock 1964, Biometrika 51:33-39, doi 10.1093/biomet/51.1-2.33.
 */
export function topKOmega(confidence: number, { finds, tail }: TopFinds): number {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(`topKOmega: expected a level between 0 and 1, got ${confidence} (confidence)`);
  if (!(Number.isInteger(finds) && finds >= 2 && tail > 0))
    throw new RangeError(`topKOmega: expected 2 or more finds and a tail above 0, got ${finds} and ${tail}`);
  return exp(log(-expm1(log1p(-confidence) / (finds - 1))) / tail);
}

/**
 * Upper bound of the true end from the k highest finds: (x_n - omega x_(n-k+1)) / (1 - omega).
 *
 * Assumes that near the end the density of finds falls as (theta - x)^(beta - 1). (theta - x)^beta of the highest
 * finds are then ordered arrivals of a homogeneous process, and P(W > w) = (1 - w)^(k-1) for the ratio W of the first
 * to the k-th. beta = 1 with all finds is `uniform` from the first find; k = 2 is `two-highest`. Fewer finds: mostly wider,
 * and leaning less on the shape of recovery.
 *
 * @param levels finds in effective metres, from below upward, at least k of them; throws otherwise.
 * Undefined where the k highest finds lie at one level.
 * After D. S. Robson & J. H. Whitlock 1964, doi 10.1093/biomet/51.1-2.33; A. R. Solow 2003, Paleobiology 29:181-185.
 */
export function topKBound(
  levels: readonly number[],
  shape: TopFinds,
  confidence: number,
): number | undefined {
  const { highest, lowest } = topOf(levels, shape);
  if (!(highest > lowest)) return undefined;
  const omega = topKOmega(confidence, shape);
  return highest + ((highest - lowest) * omega) / (1 - omega);
}

/**
 * The chance that the last find lies this low if the taxon lived to `level`: (1 - w)^(k-1), w = ((theta - x_n) /
 * (theta - x_(n-k+1)))^beta. The bound of `topKBound` is the level where it is 1 - C. Undefined below the last find
 * and where the k highest finds lie at one level.
 */
export function topKChance(levels: readonly number[], shape: TopFinds, level: number): number | undefined {
  const { highest, lowest } = topOf(levels, shape);
  if (!(highest > lowest) || level < highest) return undefined;
  if (level === highest) return 1;
  const logRatio = -log1p((highest - lowest) / (level - highest));
  return exp((shape.finds - 1) * log(-expm1(shape.tail * logRatio)));
}

function topOf(levels: readonly number[], { finds }: TopFinds) {
  if (levels.length < finds)
    throw new RangeError(`topKBound: expected ${finds} finds or more, got ${levels.length} (levels)`);
  return { highest: levels[levels.length - 1], lowest: levels[levels.length - finds] };
}

import { exp, log } from "../numeric/elementary.ts";
import { minimiseOnInterval } from "../numeric/optimise.ts";
import { findRoot } from "../numeric/roots.ts";
import type { Likelihood } from "./mixing-likelihood.ts";
import { type BoxFit, boxFitAt, type SearchRange } from "./mixing-models.ts";

/** Limits in cm; `isOpen*` where the profile never falls below the cut within the range searched. */
export interface ProfileInterval {
  readonly low: number;
  readonly high: number;
  readonly isOpenLow: boolean;
  readonly isOpenHigh: boolean;
}

export type ProfiledQuantity = "length" | "base" | "surface";

const lengthGrid = 16;
const baseGridSteps = 60;
const rootToleranceCm = 1e-5;

/**
 * Profile-likelihood interval of the mixing length, the base of the smear, or the event surface `h0 = hb + L`
 * (profiled itself, so that the covariance of hb and L is in it): all values whose best log-likelihood is within
 * `drop` of the maximum. The likelihood can have several maxima where sampling is coarse; the outermost crossing
 * seen on a doubling scan is taken, so a gap inside the interval is bridged.
 */
export function profileInterval(
  quantity: ProfiledQuantity,
  { likelihood, range, best }: { likelihood: Likelihood; range: SearchRange; best: BoxFit },
  drop: number,
): ProfileInterval {
  const profile = profileOf(quantity, likelihood, range);
  const cut = best.logLikelihood - drop;
  const { centre, lowest, highest } = extent(quantity, range, best);
  const f = (value: number) => profile(value) - cut;
  const low = crossing(f, centre, { bound: lowest, step: range.finest / 8 });
  const high = crossing(f, centre, { bound: highest, step: range.finest / 8 });
  return { low: low.at, high: high.at, isOpenLow: low.isOpen, isOpenHigh: high.isOpen };
}

function extent(quantity: ProfiledQuantity, range: SearchRange, best: BoxFit) {
  switch (quantity) {
    case "length":
      return { centre: best.lengthCm, lowest: range.shortest, highest: range.longest };
    case "base":
      return { centre: best.baseCm, lowest: range.lowestBase, highest: range.highestBase };
    case "surface":
      return {
        centre: best.baseCm + best.lengthCm,
        lowest: range.lowestBase + range.shortest,
        highest: range.highestBase + range.longest,
      };
    default:
      return quantity satisfies never;
  }
}

function profileOf(quantity: ProfiledQuantity, likelihood: Likelihood, range: SearchRange) {
  const at = (base: number, length: number) => {
    const isInside = base >= range.lowestBase && base <= range.highestBase;
    return isInside ? boxFitAt(likelihood, base, length).logLikelihood : Number.NEGATIVE_INFINITY;
  };
  if (quantity === "length")
    return (length: number) =>
      greatest((base) => at(base, length), range.lowestBase, {
        high: range.highestBase,
        steps: Math.min(
          baseGridSteps,
          Math.ceil((2 * (range.highestBase - range.lowestBase)) / range.finest),
        ),
      });
  const [low, high] = [log(range.shortest), log(range.longest)];
  const base =
    quantity === "base" ? (value: number) => value : (value: number, length: number) => value - length;
  return (value: number) =>
    greatest(
      (logLength) => {
        const length = exp(logLength);
        return at(base(value, length), length);
      },
      low,
      { high, steps: lengthGrid },
    );
}

/** Largest value of f on an interval: a grid, then golden section about its best point. */
function greatest(
  f: (x: number) => number,
  low: number,
  { high, steps }: { high: number; steps: number },
): number {
  const step = (high - low) / Math.max(2, steps);
  let bestAt = low;
  let best = Number.NEGATIVE_INFINITY;
  for (let x = low; x <= high + step / 2; x += step) {
    const value = f(Math.min(x, high));
    if (value > best) [best, bestAt] = [value, Math.min(x, high)];
  }
  const [from, to] = [Math.max(low, bestAt - step), Math.min(high, bestAt + step)];
  const least = minimiseOnInterval((x) => -f(x), from, to, { tolerance: 2e-4 * (to - from) });
  return Math.max(best, -least.value);
}

function crossing(
  f: (value: number) => number,
  centre: number,
  { bound, step }: { bound: number; step: number },
): { at: number; isOpen: boolean } {
  const reach = Math.abs(bound - centre);
  const direction = bound < centre ? -1 : 1;
  let inside = 0;
  let outside = reach;
  for (let offset = step; ; offset *= 2) {
    const at = Math.min(offset, reach);
    if (f(centre + direction * at) >= 0) [inside, outside] = [at, reach];
    else if (outside === reach) outside = at;
    if (at >= reach) break;
  }
  if (inside >= reach) return { at: bound, isOpen: true };
  const ends = [centre + direction * inside, centre + direction * outside].toSorted((a, b) => a - b);
  if (inside === 0 && f(centre) < 0) return { at: centre, isOpen: false };
  return { at: findRoot(f, ends[0], ends[1], { tolerance: rootToleranceCm }), isOpen: false };
}

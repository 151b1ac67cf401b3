import type { Basis } from "../basis.ts";
import { exp, log, log10, pow } from "../numeric/elementary.ts";
import { normalQuantile } from "../numeric/normal.ts";
import { median, medianAbsoluteDeviation, quantile } from "../numeric/sums.ts";
import { fitCensoredNormal } from "./censored-normal.ts";
import { productLimit, productLimitQuantile } from "./kaplan-meier.ts";

/** One concentration: its value, or its limit where `censored` is `left`. */
export interface Concentration {
  readonly value: number;
  readonly censored: "none" | "left" | "right" | "interval";
}

/** The background of an element on the decimal-log scale, with the samples it rests on. */
export interface BackgroundFit {
  readonly kind: "background";
  /** m and s of lg C. */
  readonly logMedian: number;
  readonly logSd: number;
  /** 10^m, and the mean of the lognormal, in the unit of the concentrations. */
  readonly median: number;
  readonly mean: number;
  readonly isKept: readonly boolean[];
  readonly kept: number;
  readonly censoredKept: number;
  /** True where m and s come from the censored likelihood, not from median and MAD. */
  readonly isLikelihood: boolean;
  readonly isUnsettled: boolean;
  readonly passes: number;
}

export interface NoBackground {
  readonly kind: "no-background";
  readonly reason: "too-few" | "censored-heavy";
  readonly samples: number;
  readonly detects: number;
  readonly censoredShare: number;
}

export const clippingWidth = 3;
const smallestLogSd = 0.02;
/** Cells tied at one detection limit make the shortest half too short: the start is then at least this wide. */
const narrowestCensoredStart = 0.1;
const upperQuartileOfNormal = 0.6745;
const maximumPasses = 20;
const fewestSamples = 5;
const fewestDetects = 3;
const heaviestCensoring = 0.8;
/** Makes the median absolute deviation of a normal law its standard deviation (Rousseeuw & Croux 1993). */
const madToSd = 1.4826;
/** sqrt(pi/2): standard error of a median in units of s/sqrt(n). */
export const medianErrorFactor = 1.2533;
export const ln10 = log(10);

export const backgroundBasis: Basis = {
  method: "background",
  statement:
    "Background on the log scale: the shortest half gives the start, samples beyond 3 s are clipped until the kept set is unchanged; median and 1.4826 MAD, or the censored-normal likelihood where cells lie below detection.",
  assumptions: [
    "background concentrations are lognormal and without trend",
    "fewer than half of the samples carry an excess",
  ],
  sources: [
    {
      authors: "Rousseeuw, P.J., Croux, C.",
      year: 1993,
      title: "Alternatives to the median absolute deviation",
      place: "Journal of the American Statistical Association 88:1273-1283",
      doi: "10.1080/01621459.1993.10476408",
    },
    {
      authors: "Rousseeuw, P.J., Leroy, A.M.",
      year: 1988,
      title: "A robust scale estimator based on the shortest half",
      place: "Statistica Neerlandica 42:103-116",
      doi: "10.1111/j.1467-9574.1988.tb01224.x",
    },
  ],
  after: true,
};

/**
 * Median of the shortest half of `lg C` and its scale `s0 = width / (2 Phi^-1(0.5 + hh/(2n)))`, `hh = floor(n/2)+1`.
 * Needs n >= 3. Rousseeuw & Leroy 1988, Statistica Neerlandica 42:103-116.
 */
export function shortestHalf(values: readonly number[]): { centre: number; scale: number } {
  const sorted = values.toSorted((a, b) => a - b);
  const n = sorted.length;
  const half = Math.floor(n / 2) + 1;
  let start = 0;
  for (let i = 1; i + half <= n; i++)
    if (sorted[i + half - 1] - sorted[i] < sorted[start + half - 1] - sorted[start]) start = i;
  const width = sorted[start + half - 1] - sorted[start];
  return {
    centre: median(sorted.slice(start, start + half)),
    scale: Math.max(width / (2 * normalQuantile(0.5 + half / (2 * n))), smallestLogSd),
  };
}

/**
 * Robust background of concentrations (any mass-fraction unit; the result is in the same one). Censored cells enter
 * the start at their limit and the estimate through the likelihood; they are never substituted. Readings above an
 * upper limit are left out.
 *
 * With censored cells the kept set is one-sided and settled by the product-limit median and upper quartile
 * (`(q75 - q50)/0.6745`), as far as they can be estimated: a mixing tail is spread evenly in lg C, and the likelihood,
 * which it widens, would let the kept set creep up the tail. The reported m and s are the likelihood's on that set.
 *
 * Refused (`no-background`) with fewer than 5 samples, fewer than 3 measured values kept, or more than 80 % of the
 * kept cells below detection (after Helsel 2012).
 */
export function background(cells: readonly Concentration[]): BackgroundFit | NoBackground {
  const usable = cells.map((cell) => cell.censored !== "right" && cell.value > 0);
  const count = usable.filter(Boolean).length;
  const y = cells.map((cell) => (cell.value > 0 ? log10(cell.value) : 0));
  const isCensored = cells.map((cell) => cell.censored === "left");
  const all = { y, isCensored, usable };
  if (count < fewestSamples) return refusal(all, usable, "too-few");
  const { centre, scale } = shortestHalf(y.filter((_, i) => usable[i]));
  const hasCensored = isCensored.some((c, i) => c && usable[i]);
  return clip(all, { m: centre, s: hasCensored ? Math.max(scale, narrowestCensoredStart) : scale });
}

interface Cells {
  readonly y: readonly number[];
  readonly isCensored: readonly boolean[];
  readonly usable: readonly boolean[];
}

interface LogLaw {
  readonly m: number;
  readonly s: number;
}

function clip(cells: Cells, start: LogLaw): BackgroundFit | NoBackground {
  let law = start;
  let kept: readonly boolean[] = [];
  let before: readonly boolean[] = [];
  for (let pass = 1; pass <= maximumPasses; pass++) {
    const next = keepSet(cells, law);
    if (isSame(next, kept)) return settle(cells, kept, { pass, isUnsettled: false });
    if (isSame(next, before))
      return settle(cells, size(next) < size(kept) ? next : kept, { pass, isUnsettled: false });
    const estimated = clippingLaw(cells, next);
    if (estimated === undefined) return refusal(cells, next, "censored-heavy");
    before = kept;
    kept = next;
    law = estimated;
  }
  return settle(cells, kept, { pass: maximumPasses, isUnsettled: true });
}

function keepSet({ y, isCensored, usable }: Cells, { m, s }: LogLaw): readonly boolean[] {
  const hasCensored = isCensored.some((c, i) => c && usable[i]);
  const limit = clippingWidth * s;
  return y.map((v, i) => usable[i] && v - m <= limit && (hasCensored || m - v <= limit));
}

/** Centre and scale that decide the next kept set. */
function clippingLaw(cells: Cells, kept: readonly boolean[]): LogLaw | undefined {
  const values = cells.y.filter((_, i) => kept[i]);
  const censored = cells.isCensored.filter((_, i) => kept[i]);
  if (!censored.some(Boolean)) return estimate(cells, kept);
  const steps = productLimit(values, censored);
  const middle = productLimitQuantile(steps, 0.5);
  const upper = productLimitQuantile(steps, 0.75);
  if (middle === undefined || upper === undefined) return estimate(cells, kept);
  return { m: middle, s: Math.max((upper - middle) / upperQuartileOfNormal, smallestLogSd) };
}

function estimate({ y, isCensored }: Cells, kept: readonly boolean[]): LogLaw | undefined {
  const values = y.filter((_, i) => kept[i]);
  const censored = isCensored.filter((_, i) => kept[i]);
  const detects = values.filter((_, i) => !censored[i]);
  if (detects.length < fewestDetects) return undefined;
  const isSpread = detects.some((v) => v !== detects[0]);
  if (censored.some(Boolean) && isSpread) {
    const { mean, sd } = fitCensoredNormal(values, censored);
    return { m: mean, s: Math.max(sd, smallestLogSd) };
  }
  const mad = madToSd * medianAbsoluteDeviation(detects);
  const quartiles = (quantile(detects, 0.75) - quantile(detects, 0.25)) / 2 / upperQuartileOfNormal;
  return { m: median(detects), s: Math.max(mad > 0 ? mad : quartiles, smallestLogSd) };
}

interface Settled {
  readonly pass: number;
  readonly isUnsettled: boolean;
}

function settle(
  cells: Cells,
  kept: readonly boolean[],
  { pass, isUnsettled }: Settled,
): BackgroundFit | NoBackground {
  const censoredKept = cells.isCensored.filter((c, i) => c && kept[i]).length;
  const count = size(kept);
  if (count < fewestSamples) return refusal(cells, kept, "too-few");
  if (censoredKept > heaviestCensoring * count) return refusal(cells, kept, "censored-heavy");
  const law = estimate(cells, kept);
  if (law === undefined) return refusal(cells, kept, "censored-heavy");
  return {
    kind: "background",
    logMedian: law.m,
    logSd: law.s,
    median: pow(10, law.m),
    mean: exp(law.m * ln10 + (law.s * ln10) ** 2 / 2),
    isKept: kept,
    kept: count,
    censoredKept,
    isLikelihood: censoredKept > 0,
    isUnsettled,
    passes: pass,
  };
}

function refusal(cells: Cells, kept: readonly boolean[], reason: NoBackground["reason"]): NoBackground {
  const samples = size(kept);
  const censored = cells.isCensored.filter((c, i) => c && kept[i]).length;
  return {
    kind: "no-background",
    reason,
    samples,
    detects: samples - censored,
    censoredShare: samples === 0 ? 0 : censored / samples,
  };
}

function isSame(a: readonly boolean[], b: readonly boolean[]): boolean {
  return a.length === b.length && a.every((v, i) => v === b[i]);
}

function size(kept: readonly boolean[]): number {
  return kept.filter(Boolean).length;
}

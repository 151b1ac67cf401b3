import { type BackgroundFit, ln10, medianErrorFactor } from "./background.ts";

interface Measured {
  readonly value: number;
  readonly sigma: number;
}

/**
 * Enrichment factor `EF = C/B_med` with its error on the decimal-log scale,
 * `sqrt((sigma_C/(C ln10))^2 + (1.2533 s)^2/n_b)`: to be read as `EF x/: 10^sigmaLog`.
 */
export function enrichmentFactor(
  { value, sigma }: Measured,
  { median, logSd, kept }: BackgroundFit,
): { factor: number; sigmaLog: number } {
  const measured = sigma / (value * ln10);
  const ofMedian = (medianErrorFactor * logSd) / Math.sqrt(kept);
  return { factor: value / median, sigmaLog: Math.sqrt(measured * measured + ofMedian * ofMedian) };
}

/**
 * Excess over the background median and its error against the mean background (not against single samples):
 * `E = C - B`, `sigma_E^2 = sigma_C^2 + (B ln10 1.2533 s/sqrt(n_b))^2`, in the unit of C.
 */
export function excessOf({ value, sigma }: Measured, fit: BackgroundFit): { excess: number; sigma: number } {
  const ofBackground = backgroundSigma(fit.median, fit);
  return { excess: value - fit.median, sigma: Math.sqrt(sigma * sigma + ofBackground * ofBackground) };
}

/** Standard error of a background level (unit of C): `B ln10 1.2533 s/sqrt(n_b)`. */
export function backgroundSigma(level: number, { logSd, kept }: BackgroundFit): number {
  return (level * ln10 * medianErrorFactor * logSd) / Math.sqrt(kept);
}

import type { Basis } from "../basis.ts";

/** sigma^2 = (relative C)^2 + floor^2, the floor in the unit of C. */
export interface ErrorModel {
  readonly relative: number;
  readonly floor: number;
}

/** The relative error taken where a table gives none. */
export const assumedRelativeError = 0.1;
/** A detection limit is about 3.29 standard deviations of the blank (paired 5 % errors, Currie 1968). */
const blankSigmasInLimit = 3.29;
const floorShareOfMedian = 0.02;

export const sigmaBasis: Basis = {
  method: "measurement-error",
  statement:
    "Each measurement has one standard deviation, sigma^2 = (r C)^2 + a^2; where the table gives none, r = 0.10 and a = detection limit / 3.29, or 0.02 of the median.",
  assumptions: ["errors of different samples are independent"],
  sources: [
    {
      authors: "Currie, L.A.",
      year: 1968,
      title: "Limits for qualitative detection and quantitative determination",
      place: "Analytical Chemistry 40:586-593",
      doi: "10.1021/ac60259a007",
    },
  ],
  after: true,
};

/**
 * Assumed standard deviation of a concentration, in its unit: `r = 0.10`, `a = limit/3.29`, or 0.02 of the profile's
 * median where no detection limit is given.
 */
export function assumedSigma(
  concentration: number,
  detectionLimit: number | undefined,
  median: number,
): number {
  const floor =
    detectionLimit === undefined ? floorShareOfMedian * median : detectionLimit / blankSigmasInLimit;
  return sigmaAt({ relative: assumedRelativeError, floor }, concentration);
}

export function sigmaAt(model: ErrorModel, concentration: number): number {
  return Math.sqrt((model.relative * concentration) ** 2 + model.floor ** 2);
}

/**
 * The two-component model nearest to the stated errors of a profile: least squares on `(r^2 C^2 + a^2)/sigma^2 = 1`
 * with `r, a >= 0`. It tells how a sample's sigma would change if its concentration were another one.
 */
export function fitErrorModel(values: readonly number[], sigmas: readonly number[]): ErrorModel {
  let xx = 0;
  let xy = 0;
  let yy = 0;
  let x = 0;
  let y = 0;
  for (let i = 0; i < values.length; i++) {
    if (!(sigmas[i] > 0)) continue;
    const u = (values[i] / sigmas[i]) ** 2;
    const w = 1 / sigmas[i] ** 2;
    xx += u * u;
    xy += u * w;
    yy += w * w;
    x += u;
    y += w;
  }
  if (xx === 0 || yy === 0) return { relative: assumedRelativeError, floor: 0 };
  const determinant = xx * yy - xy * xy;
  const isSingular = determinant <= 1e-12 * xx * yy;
  const relative2 = isSingular ? -1 : (x * yy - y * xy) / determinant;
  const floor2 = isSingular ? 0 : (y * xx - x * xy) / determinant;
  if (!isSingular && relative2 < 0) return { relative: 0, floor: Math.sqrt(y / yy) };
  if (isSingular || floor2 < 0) return { relative: Math.sqrt(x / xx), floor: 0 };
  return { relative: Math.sqrt(relative2), floor: Math.sqrt(floor2) };
}

import { log, log1p } from "./elementary.ts";
import { polynomial, rational } from "./polynomial.ts";

// Coefficients: fdlibm 5.3, e_lgamma_r.c, Sun Microsystems 1993 (freely distributable).
/** Where gamma is least, its logarithm there, and the tail of that logarithm. */
const LEAST_AT = 1.4616321449683622;
const LEAST = -1.2148629053584961e-1;
const LEAST_TAIL = -3.638676997039505e-18;
const NEAR_TWO = [
  7.721566490153287e-2, 3.224670334241136e-1, 6.735230105312927e-2, 2.0580808432516733e-2,
  7.385550860814029e-3, 2.8905138367341563e-3, 1.1927076318336207e-3, 5.100697921535113e-4,
  2.2086279071390839e-4, 1.0801156724758394e-4, 2.5214456545125733e-5, 4.4864094961891516e-5,
];
const NEAR_LEAST = [
  4.8383612272381005e-1, -1.475877229945939e-1, 6.462494023913339e-2, -3.2788541075985965e-2,
  1.797067508118204e-2, -1.0314224129834144e-2, 6.100538702462913e-3, -3.6845201678113826e-3,
  2.2596478090061247e-3, -1.4034646998923284e-3, 8.81081882437654e-4, -5.385953053567405e-4,
  3.1563207090362595e-4, -3.1275416837512086e-4, 3.355291926355191e-4,
];
const NEAR_ONE = [
  [
    -7.721566490153287e-2, 6.328270640250934e-1, 1.4549225013723477, 9.777175279633727e-1,
    2.2896372806469245e-1, 1.3381091853678766e-2,
  ],
  [
    1, 2.4559779371304113, 2.128489763798934, 7.692851504566728e-1, 1.0422264559336913e-1,
    3.217092422824239e-3,
  ],
] as const;
const TWO_TO_THREE = [
  [
    -7.721566490153287e-2, 2.1498241596060885e-1, 3.25778796408931e-1, 1.4635047265246445e-1,
    2.664227030336386e-2, 1.8402845140733772e-3, 3.194753265841009e-5,
  ],
  [
    1, 1.3920053346762105, 7.219355475671381e-1, 1.7193386563280308e-1, 1.864591917156529e-2,
    7.779424963818936e-4, 7.326684307446256e-6,
  ],
] as const;
const HALF_LOG_TWO_PI = 0.9189385332046728;

/**
 * What Stirling's main part leaves: δ(x) = log Γ(x) − (x − ½) log x + x − ½ log 2π = 1/(12x) − 1/(360x³) + …
 * Seven terms, error below 3e-16 absolute for x ≥ 8.
 */
export function stirlingRest(x: number): number {
  const z = 1 / (x * x);
  return (
    (1 / 12 -
      z * (1 / 360 - z * (1 / 1260 - z * (1 / 1680 - z * (1 / 1188 - z * (691 / 360360 - z / 156)))))) /
    x
  );
}

function near(y: number, centre: "one" | "two" | "least"): number {
  if (centre === "two") return y * polynomial(y, NEAR_TWO) - 0.5 * y;
  if (centre === "one") return -0.5 * y + y * rational(y, ...NEAR_ONE);
  return LEAST + (y * y * polynomial(y, NEAR_LEAST) + LEAST_TAIL);
}

function belowTwo(x: number): number {
  if (x <= 0.9) {
    // log Γ(x) = log Γ(x + 1) − log x
    if (x >= 0.7315998077392578) return near(1 - x, "two") - log(x);
    if (x >= 0.2316399812698364) return near(x - (LEAST_AT - 1), "least") - log(x);
    return near(x, "one") - log(x);
  }
  if (x >= 1.7316312789916992) return near(2 - x, "two");
  if (x >= 1.2316322326660156) return near(x - LEAST_AT, "least");
  return near(x - 1, "one");
}

function twoToEight(x: number): number {
  const whole = Math.floor(x);
  const y = x - whole;
  let product = 1;
  for (let factor = 2; factor < whole; factor++) product *= y + factor;
  return 0.5 * y + y * rational(y, ...TWO_TO_THREE) + log(product);
}

/**
 * log Γ(x) for x > 0, relative error below 1e-14 (near its zeros at 1 and 2 too).
 * @throws RangeError unless x > 0.
 * Source: fdlibm 5.3, e_lgamma_r.c (Sun Microsystems 1993); Stirling's series from 8 upward.
 */
export function logGamma(x: number): number {
  if (!(x > 0)) throw new RangeError(`logGamma: expected x > 0, got ${x}`);
  if (x === 1 || x === 2) return 0;
  if (x < 2) return belowTwo(x);
  if (x < 8) return twoToEight(x);
  if (x === Number.POSITIVE_INFINITY) return x;
  return x > 1e17 ? x * (log(x) - 1) : (x - 0.5) * (log(x) - 1) - 0.5 + HALF_LOG_TWO_PI + stirlingRest(x);
}

/**
 * log Γ(x + d) − log Γ(x) without the cancellation of two large values:
 * (x − ½) log(1 + d/x) + d log(x + d) − d + δ(x + d) − δ(x) where both arguments are at least 10.
 * @throws RangeError unless x > 0 and x + d > 0.
 */
export function logGammaDifference(x: number, d: number): number {
  if (Math.min(x, x + d) < 10) return logGamma(x + d) - logGamma(x);
  return (x - 0.5) * log1p(d / x) + d * (log(x + d) - 1) + (stirlingRest(x + d) - stirlingRest(x));
}

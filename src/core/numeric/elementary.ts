/**
 * Elementary functions with fixed bits. ECMAScript lets engines differ in `Math.exp` and its kin; these use only
 * + − × ÷ √ and bit operations, so every engine returns the same double, within 1 ulp of the correctly rounded one.
 */
export { exp, expm1 } from "./exponential.ts";
export { log, log1p, log10 } from "./logarithm.ts";
export { pow } from "./power.ts";
export { cos, sin } from "./trigonometric.ts";

/** √(x² + y²), scaled so that nothing overflows or underflows on the way; relative error below 4e-16. */
export function hypot(x: number, y: number): number {
  const a = Math.abs(x);
  const b = Math.abs(y);
  if (a === Number.POSITIVE_INFINITY || b === Number.POSITIVE_INFINITY) return Number.POSITIVE_INFINITY;
  const larger = Math.max(a, b);
  if (larger === 0 || Number.isNaN(larger)) return larger;
  const ratio = Math.min(a, b) / larger;
  return larger * Math.sqrt(1 + ratio * ratio);
}

import { describe, expect, it } from "vitest";
import {
  cos,
  exp,
  expm1,
  hypot,
  log,
  log1p,
  log10,
  pow,
  sin,
} from "../../../../src/core/numeric/elementary.ts";

const { POSITIVE_INFINITY: INFINITY, NEGATIVE_INFINITY } = Number;
const edges = [0, -0, 1, -1, 2, -2, 3, -3, 0.5, -0.5, INFINITY, NEGATIVE_INFINITY, Number.NaN];

describe("elementary functions at the edges of their domains", () => {
  // ECMA-262 fixes these special values exactly, so the language itself is the reference.
  it("agrees with the language at zeros, infinities and NaN", () => {
    const pairs = [
      [exp, Math.exp],
      [expm1, Math.expm1],
      [log, Math.log],
      [log1p, Math.log1p],
      [log10, Math.log10],
      [sin, Math.sin],
      [cos, Math.cos],
    ] as const;
    for (const [ours, language] of pairs) {
      for (const x of [0, -0, INFINITY, NEGATIVE_INFINITY, Number.NaN]) expect(ours(x)).toBe(language(x));
    }
  });

  it("pow follows the language at every pair of special values", () => {
    for (const x of edges) {
      for (const y of edges) {
        const expected = x ** y;
        const isSpecial = [0, 1, INFINITY].includes(Math.abs(expected)) || Number.isNaN(expected);
        if (isSpecial) expect(pow(x, y), `${x} ** ${y}`).toBe(expected);
      }
    }
  });

  it("pow overflows and underflows with exponents beyond any bound", () => {
    expect(pow(1 + 2 ** -52, 1e300)).toBe(INFINITY);
    expect(pow(1 - 2 ** -53, 1e300)).toBe(0);
    expect(pow(2, -1074)).toBe(5e-324);
    expect(pow(2, 1024)).toBe(INFINITY);
  });

  it("log10 is exact at every power of ten from 1 to 1e22", () => {
    for (let n = 0; n <= 22; n++) expect(log10(Number(`1e${n}`))).toBe(n);
  });

  it("hypot neither overflows nor underflows on the way", () => {
    expect(hypot(3e300, 4e300)).toBe(5e300);
    expect(Math.abs(hypot(3e-320, -4e-320) - 5e-320)).toBeLessThanOrEqual(5e-324);
    expect(hypot(0, -0)).toBe(0);
    expect(hypot(Number.NaN, INFINITY)).toBe(INFINITY);
    expect(hypot(Number.NaN, 1)).toBeNaN();
  });
});

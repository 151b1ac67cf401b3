import * as fc from "fast-check";
import { expect, it } from "vitest";
import { irwinHallLogDensity } from "../../../src/core/numeric/irwin-hall.ts";

/** log of f_n(part / 64) in exact integers: sum of (-1)^k C(n, k) (part - 64 k)^(n-1), over 64^(n-1) (n-1)!. */
function exactLogDensity(part: number, n: number): number {
  let sum = 0n;
  let choose = 1n;
  for (let k = 0; 64 * k < part; k++) {
    const term = choose * BigInt(part - 64 * k) ** BigInt(n - 1);
    sum += k % 2 === 0 ? term : -term;
    choose = (choose * BigInt(n - k)) / BigInt(k + 1);
  }
  let factorial = 1n;
  for (let i = 2n; i < BigInt(n); i++) factorial *= i;
  return logOf(sum) - logOf(64n ** BigInt(n - 1)) - logOf(factorial);
}

function logOf(value: bigint): number {
  const digits = value.toString();
  const kept = Math.min(17, digits.length);
  return Math.log(Number(digits.slice(0, kept))) + (digits.length - kept) * Math.LN10;
}

it("the log density of a sum of uniforms is that of exact integers, far into its tails", () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 1, max: 300 }),
      fc.double({ min: 0.0005, max: 0.9995, noNaN: true }),
      (n, share) => {
        const part = Math.min(64 * n - 1, Math.max(1, Math.round(64 * n * share)));
        const exact = exactLogDensity(part, n);
        expect(Math.abs(irwinHallLogDensity(part / 64, n) - exact)).toBeLessThan(
          1e-11 * Math.max(1, Math.abs(exact)),
        );
      },
    ),
    { seed: 7, numRuns: 60 },
  );
});

it("is nothing outside, even for one uniform, and the same from both ends", () => {
  expect(irwinHallLogDensity(0.3, 1)).toBe(0);
  expect([-1, 0, 4, 5].map((sum) => irwinHallLogDensity(sum, 4))).toEqual(
    Array(4).fill(Number.NEGATIVE_INFINITY),
  );
  expect(irwinHallLogDensity(1.25, 6)).toBeCloseTo(irwinHallLogDensity(4.75, 6), 13);
  expect(() => irwinHallLogDensity(1, 0)).toThrow(/whole n from 1/);
});

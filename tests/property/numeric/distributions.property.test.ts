import { type Arbitrary, array, assert, double, integer, property, tuple } from "fast-check";
import * as reference from "simple-statistics";
import { describe, expect, it } from "vitest";
import { regularisedBeta } from "../../../src/core/numeric/beta.ts";
import { binomialLowerTail, binomialUpperTail, logChoose } from "../../../src/core/numeric/binomial.ts";
import { chiSquareQuantile, chiSquareUpperTail } from "../../../src/core/numeric/chi-square.ts";
import { exp, log } from "../../../src/core/numeric/elementary.ts";
import { logGamma, regularisedGammaP, regularisedGammaQ } from "../../../src/core/numeric/gamma.ts";
import { irwinHallMeanCdf, irwinHallMeanSurvival } from "../../../src/core/numeric/irwin-hall.ts";
import { kolmogorovUpperTail } from "../../../src/core/numeric/kolmogorov.ts";
import { normalCdf, normalQuantile, normalSurvival } from "../../../src/core/numeric/normal.ts";
import { studentQuantile, studentUpperTail } from "../../../src/core/numeric/student.ts";
import {
  compensatedSum,
  logSumExp,
  mean,
  median,
  medianAbsoluteDeviation,
  quantile,
} from "../../../src/core/numeric/sums.ts";
import { relativeError } from "../../published/numeric/ulp.ts";

const between = (min: number, max: number) => double({ min, max, noNaN: true });
const tail = between(-690, -0.01).map((x) => exp(x));
const values = array(between(-1e6, 1e6), { minLength: 1, maxLength: 40 });

function holds<T>(arbitrary: Arbitrary<T>, check: (value: T) => void): void {
  assert(
    property(arbitrary, (value) => {
      check(value);
    }),
    { numRuns: 200, seed: 71 },
  );
}

/** The textbook sum, which cancels as n grows. */
const alternating = (x: number, n: number) => {
  let sum = 0;
  for (let k = 0; k <= x; k++) sum += (-1) ** k * exp(logChoose(n, k)) * (x - k) ** n;
  return sum / exp(logGamma(n + 1));
};

describe("distributions", () => {
  it("normal: the quantile inverts the tail, and both sides mirror", () => {
    holds(tail, (p) => expect(relativeError(normalCdf(normalQuantile(p)), p)).toBeLessThan(1e-12));
    holds(between(-38, 38), (x) => expect(normalCdf(x)).toBe(normalSurvival(-x)));
    holds(between(-8, 8), (x) => expect(normalCdf(x) + normalSurvival(x)).toBeCloseTo(1, 14));
  });

  it("Student: the quantile inverts the tail, and the tail falls with t", () => {
    holds(tuple(tail, between(0.5, 500)), ([p, v]) => {
      const t = studentQuantile(p, v);
      if (Number.isFinite(t)) expect(relativeError(studentUpperTail(-t, v), p)).toBeLessThan(1e-12);
    });
    holds(tuple(between(-50, 50), between(0, 5), between(0.5, 500)), ([t, step, v]) => {
      expect(studentUpperTail(t + step, v)).toBeLessThanOrEqual(studentUpperTail(t, v) * (1 + 1e-12));
    });
  });

  it("chi-square: the quantile inverts the tail, and the tail is the incomplete gamma function", () => {
    holds(tuple(tail, integer({ min: 1, max: 400 })), ([q, v]) => {
      expect(relativeError(chiSquareUpperTail(chiSquareQuantile(q, v), v), q)).toBeLessThan(1e-9);
    });
    holds(tuple(between(0, 2000), integer({ min: 1, max: 900 })), ([x, half]) => {
      const expected = regularisedGammaQ(half, x / 2);
      if (expected > 1e-300)
        expect(relativeError(chiSquareUpperTail(x, 2 * half), expected)).toBeLessThan(1e-11);
    });
  });

  it("gamma and beta: both sides add to 1, and the recurrences hold", () => {
    holds(tuple(between(0.01, 500), between(0, 1000)), ([a, x]) => {
      expect(regularisedGammaP(a, x) + regularisedGammaQ(a, x)).toBeCloseTo(1, 12);
    });
    holds(tuple(integer({ min: 0, max: 1024 }), between(0.05, 500), between(0.05, 500)), ([part, a, b]) => {
      const x = part / 1024;
      expect(regularisedBeta(x, a, b) + regularisedBeta(1 - x, b, a)).toBeCloseTo(1, 11);
    });
    holds(between(0.001, 1e6), (x) => {
      const sum = logGamma(x) + log(x);
      expect(Math.abs(logGamma(x + 1) - sum)).toBeLessThan(
        4e-15 * (1 + Math.abs(logGamma(x)) + Math.abs(log(x))),
      );
    });
  });

  it("binomial: tails are the incomplete beta function and meet without gap", () => {
    holds(tuple(integer({ min: 1, max: 400 }), between(0, 1), between(0.001, 0.999)), ([n, share, p]) => {
      const k = Math.ceil(share * n);
      expect(binomialUpperTail(k, n, p) + binomialLowerTail(k - 1, n, p)).toBeCloseTo(1, 12);
      if (k > 0) expect(binomialUpperTail(k, n, p)).toBeCloseTo(regularisedBeta(p, k, n - k + 1), 11);
      expect(binomialLowerTail(n - k, n, 1 - p)).toBeCloseTo(binomialUpperTail(k, n, p), 11);
    });
    for (let n = 1; n < 60; n++) {
      const terms = Array.from({ length: n + 1 }, (_, k) => logChoose(n, k));
      expect(logSumExp(terms) / n).toBeCloseTo(Math.LN2, 13);
    }
  });

  it("Irwin–Hall: symmetric, rising, and equal to the alternating sum where that is stable", () => {
    holds(tuple(between(0.001, 0.5), integer({ min: 1, max: 8 })), ([m, n]) => {
      expect(irwinHallMeanCdf(m, n)).toBeCloseTo(alternating(m * n, n), 11);
    });
    holds(tuple(between(0, 1), between(0, 0.2), integer({ min: 1, max: 80 })), ([m, step, n]) => {
      expect(irwinHallMeanCdf(m, n) + irwinHallMeanSurvival(m, n)).toBeCloseTo(1, 13);
      expect(irwinHallMeanCdf(m + step, n)).toBeGreaterThanOrEqual(irwinHallMeanCdf(m, n) - 1e-15);
    });
  });

  it("Kolmogorov: between 0 and 1, falling with d, across the change of method", () => {
    holds(tuple(between(0, 1), between(0, 0.1), integer({ min: 1, max: 60 })), ([d, step, n]) => {
      const p = kolmogorovUpperTail(d, n);
      expect(p).toBeGreaterThanOrEqual(0);
      expect(p).toBeLessThanOrEqual(1);
      expect(kolmogorovUpperTail(d + step, n)).toBeLessThanOrEqual(p + 1e-13);
    });
  });
});

describe("sums and order statistics", () => {
  it("agree with an independent library", () => {
    holds(values, (xs) => {
      expect(mean(xs)).toBeCloseTo(reference.mean(xs), 6);
      expect(median(xs)).toBeCloseTo(reference.median(xs), 8);
      expect(medianAbsoluteDeviation(xs)).toBeCloseTo(reference.medianAbsoluteDeviation(xs), 8);
    });
  });

  it("quantile: ends, middle, monotone, equivariant under shift and scale", () => {
    holds(tuple(values, between(0, 1), between(0, 1)), ([xs, p, q]) => {
      expect(quantile(xs, 0) === Math.min(...xs)).toBe(true);
      expect(quantile(xs, 1) === Math.max(...xs)).toBe(true);
      expect(quantile(xs, 0.5)).toBeCloseTo(median(xs), 8);
      expect(quantile(xs, Math.min(p, q))).toBeLessThanOrEqual(quantile(xs, Math.max(p, q)) + 1e-9);
      expect(
        quantile(
          xs.map((x) => 2 * x + 3),
          p,
        ),
      ).toBeCloseTo(2 * quantile(xs, p) + 3, 6);
    });
    expect(() => quantile([], 0.5)).toThrow(/at least one/);
    expect(() => quantile([1], 1.1)).toThrow(/0 ≤ p ≤ 1/);
  });

  it("a compensated sum keeps what a plain one loses", () => {
    expect(compensatedSum([1, 1e100, 1, -1e100])).toBe(2);
    expect(compensatedSum([1, Number.POSITIVE_INFINITY])).toBe(Number.POSITIVE_INFINITY);
    expect(logSumExp([1000, 1000])).toBeCloseTo(1000 + Math.LN2, 12);
    expect(logSumExp([])).toBe(Number.NEGATIVE_INFINITY);
  });
});

import { describe, expect, it } from "vitest";
import { gaussLegendre, integrate } from "../../../../src/core/numeric/gauss-legendre.ts";
import { minimiseOnInterval, nelderMead } from "../../../../src/core/numeric/optimise.ts";
import { findRoot } from "../../../../src/core/numeric/roots.ts";

const valley = ([x = 0, y = 0]: readonly number[]) => (1 - x) ** 2 + 100 * (y - x * x) ** 2;

const kink = (x: number) => Math.abs(x - 0.3);

describe("findRoot", () => {
  it("finds roots of smooth, flat, steep and jumping functions to 1e-12 of the scale", () => {
    expect(Math.abs(findRoot((x) => x * x - 2, 0, 2) - Math.SQRT2)).toBeLessThan(2e-12);
    expect(Math.abs(findRoot((x) => x ** 9, -1, 1.5))).toBeLessThan(2e-12);
    expect(Math.abs(findRoot((x) => Math.exp(50 * x) - 1e10, 0, 1) - Math.log(1e10) / 50)).toBeLessThan(
      2e-12,
    );
    expect(Math.abs(findRoot((x) => (x < 0.3 ? -1 : 1), 0, 1) - 0.3)).toBeLessThan(2e-12);
    expect(findRoot((x) => x, 5, -5)).toBe(0);
  });

  it("refuses a bracket without a change of sign, and tells when it did not converge", () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(/opposite signs/);
    expect(() => findRoot(() => Number.NaN, -1, 1)).toThrow(/opposite signs/);
    expect(() => findRoot((x) => x ** 3 - 2, 0, 2, { maximumIterations: 3 })).toThrow(/within 3 iterations/);
  });
});

describe("minimisers", () => {
  it("nelderMead reaches the end of a curved valley", () => {
    const { point, value } = nelderMead(valley, [-1.2, 1]);
    expect(value).toBeLessThan(1e-11);
    for (const x of point) expect(x).toBeCloseTo(1, 5);
  });

  it("nelderMead treats points without a value as bad", () => {
    const { point } = nelderMead(([x = 0]) => (x <= 0 ? Number.NaN : x - Math.log(x)), [5]);
    expect(point[0]).toBeCloseTo(1, 4);
  });

  it("nelderMead tells when it did not converge", () => {
    expect(() => nelderMead(([x = 0]) => x, [1], { maximumIterations: 50 })).toThrow(/within 50 iterations/);
    expect(() => nelderMead(() => 0, [])).toThrow(/at least one variable/);
  });

  it("minimiseOnInterval finds an inner minimum and one at the end", () => {
    expect(minimiseOnInterval((x) => Math.abs(x - 0.7), 0, 1).at).toBeCloseTo(0.7, 8);
    expect(minimiseOnInterval((x) => x, 2, 3).at).toBeCloseTo(2, 7);
    expect(() => minimiseOnInterval((x) => x, 1, 1)).toThrow(/low < high/);
  });
});

describe("Gauss–Legendre quadrature", () => {
  it("is exact for every power up to 2n − 1 and not beyond", () => {
    for (const n of [1, 2, 5, 16, 41]) {
      for (let power = 0; power < 2 * n; power++) {
        const exact = 1 / (power + 1);
        expect(Math.abs(integrate((x) => x ** power, 0, 1, { nodes: n }) - exact)).toBeLessThan(1e-14);
      }
    }
    expect(Math.abs(integrate((x) => x ** 4, 0, 1, { nodes: 2 }) - 0.2)).toBeGreaterThan(1e-3);
  });

  it("has the published five-point rule (Abramowitz & Stegun 1964, table 25.4)", () => {
    const { nodes, weights } = gaussLegendre(5);
    expect(nodes[4]).toBeCloseTo(0.906179845938664, 14);
    expect(nodes[3]).toBeCloseTo(0.538469310105683, 14);
    expect(weights[4]).toBeCloseTo(0.236926885056189, 14);
    expect(weights[2]).toBeCloseTo(0.568888888888889, 14);
  });

  it("ends its panels at breakpoints, and turns sign with the limits", () => {
    const exact = (0.3 ** 2 + 0.7 ** 2) / 2;
    expect(Math.abs(integrate(kink, 0, 1, { breakpoints: [0.3, 9] }) - exact)).toBeLessThan(1e-15);
    expect(Math.abs(integrate(kink, 1, 0, { breakpoints: [0.3] }) + exact)).toBeLessThan(1e-15);
  });
});

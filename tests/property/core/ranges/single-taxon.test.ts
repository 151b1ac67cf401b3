import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { forEachReplicate } from "../../../../src/core/numeric/streams.ts";
import { decliningPosterior } from "../../../../src/core/ranges/declining.ts";
import { gapChance, gapRank, sortedGaps } from "../../../../src/core/ranges/gap-rank.ts";
import { integralAbove, panelNodes } from "../../../../src/core/ranges/panels.ts";
import { sightingRateBound, sightingRateChance } from "../../../../src/core/ranges/sighting-rate.ts";
import { topKBound, topKChance } from "../../../../src/core/ranges/top-k.ts";
import { twoHighestFactor } from "../../../../src/core/ranges/two-highest.ts";
import { uniformBound } from "../../../../src/core/ranges/uniform.ts";
import { bayesExtension, posteriorPower, shareBeyond } from "../../../../src/core/ranges/uniform-bayes.ts";
import { tailBound, tailChance, tailPoint, tailWeights } from "../../../../src/core/ranges/weibull-tail.ts";
import { leastTrendChance, trendBound, trendChance } from "../../../../src/core/ranges/window-trend.ts";

const seed = 7;

/** Finds above a base at 0, from below upward, no two closer than a thousandth of the range. */
const finds = fc
  .uniqueArray(fc.integer({ min: 1, max: 1000 }), { minLength: 4, maxLength: 24 })
  .map((levels) => levels.toSorted((a, b) => a - b).map((level) => level / 10));
const level = fc.double({ min: 0.2, max: 0.94, noNaN: true });
const top = fc.record({
  finds: fc.integer({ min: 2, max: 4 }),
  tail: fc.double({ min: 0.5, max: 3, noNaN: true }),
});

const lastOf = (levels: readonly number[]) => levels[levels.length - 1];
const fromBase = (levels: readonly number[]) => ({ base: 0, last: lastOf(levels), exponent: levels.length });
const sharesOf = (levels: readonly number[]) => levels.map((x) => x / lastOf(levels));

/** Every bound from the same finds, its base at `base`; undefined where a method gives none. */
function bounds(levels: readonly number[], C: number, base = 0): Record<string, number | undefined> {
  const last = lastOf(levels);
  const times = levels.map((x) => x - base);
  const shares = times.map((t) => Math.min(1, t / (last - base)));
  const gaps = sortedGaps(levels, base);
  const ranked = gapRank(gaps.length, C);
  const trend = trendBound(times, C);
  const extension = bayesExtension({ power: posteriorPower(levels.length, "scale") }, C);
  return {
    bayes: extension && last + (last - base) * extension,
    trend: trend && base + trend,
    gap: ranked && last + gaps[ranked.rank - 1],
    tail: tailBound(levels.toReversed(), 1 - C),
    rate: sightingRateBound({ base, last, exponent: levels.length }, C),
    top: topKBound(levels, { finds: 3, tail: 2 }, C),
    declining: last + (last - base) * decliningPosterior({ shares, spread: 2 }).extension(C),
  };
}

describe("every bound", () => {
  it("moves with the finds and stretches with them", () => {
    fc.assert(
      fc.property(finds, level, (levels, C) => {
        const plain = bounds(levels, C);
        const moved = bounds(
          levels.map((x) => x + 37),
          C,
          37,
        );
        const stretched = bounds(
          levels.map((x) => 3 * x),
          C,
        );
        for (const [name, bound] of Object.entries(plain)) {
          const tolerance = 1e-6 * (bound ?? 0);
          if (bound === undefined) expect([moved[name], stretched[name]]).toEqual([undefined, undefined]);
          else {
            expect(Math.abs((moved[name] ?? Number.NaN) - 37 - bound)).toBeLessThan(tolerance);
            expect(Math.abs((stretched[name] ?? Number.NaN) / 3 - bound)).toBeLessThan(tolerance);
          }
        }
      }),
      { seed, numRuns: 40 },
    );
  });

  it("lies above the last find and rises with the level", () => {
    fc.assert(
      fc.property(finds, level, (levels, C) => {
        const low = bounds(levels, C);
        const high = bounds(levels, C + 0.05);
        for (const [name, bound] of Object.entries(low)) {
          if (bound === undefined) continue;
          expect(bound).toBeGreaterThanOrEqual(lastOf(levels));
          expect(high[name] ?? Number.POSITIVE_INFINITY).toBeGreaterThanOrEqual(bound);
        }
      }),
      { seed, numRuns: 40 },
    );
  });

  it("is the level where its chance is what the confidence leaves", () => {
    fc.assert(
      fc.property(finds, level, top, (levels, C, shape) => {
        const last = lastOf(levels);
        const chances: Record<string, number | undefined> = {
          trend: trendChance(levels, trendBound(levels, C) ?? last),
          tail: tailChance(levels.toReversed(), tailBound(levels.toReversed(), 1 - C) ?? last),
          rate: sightingRateChance(fromBase(levels), sightingRateBound(fromBase(levels), C) ?? last),
          top: topKChance(levels, shape, topKBound(levels, shape, C) ?? last),
        };
        if (trendBound(levels, C) === undefined) {
          expect(leastTrendChance(levels)).toBeGreaterThan(1 - C);
          delete chances.trend;
        }
        if (tailBound(levels.toReversed(), 1 - C) === undefined) delete chances.tail;
        for (const chance of Object.values(chances)) expect(chance).toBeCloseTo(1 - C, 7);
      }),
      { seed, numRuns: 60 },
    );
  });
});

describe("identities", () => {
  it("top-k of all finds with an even tail is the classical bound, of two finds the two-highest one", () => {
    fc.assert(
      fc.property(finds, level, top, (levels, C, { tail }) => {
        const range = { base: levels[0], last: lastOf(levels), exponent: levels.length - 1 };
        const all = topKBound(levels, { finds: levels.length, tail: 1 }, C) ?? Number.NaN;
        expect(all).toBeCloseTo(uniformBound(range, C) ?? Number.NaN, 8);
        const spacing = lastOf(levels) - levels[levels.length - 2];
        const two = topKBound(levels, { finds: 2, tail }, C) ?? Number.NaN;
        expect(two / (lastOf(levels) + spacing * twoHighestFactor(C, tail))).toBeCloseTo(1, 10);
      }),
      { seed },
    );
  });

  it("the scale prior gives the classical bound, a far limit hardly anything, and every limit less than none", () => {
    fc.assert(
      fc.property(finds, level, fc.double({ min: 0.01, max: 5, noNaN: true }), (levels, C, limit) => {
        const power = posteriorPower(levels.length, "scale");
        const free = bayesExtension({ power }, C) ?? Number.NaN;
        expect(lastOf(levels) * (1 + free)).toBeCloseTo(uniformBound(fromBase(levels), C) ?? Number.NaN, 8);
        expect(bayesExtension({ power, limit: 1e9 }, C)).toBeCloseTo(free, 6);
        const within = bayesExtension({ power, limit }, C) ?? Number.NaN;
        expect(within).toBeLessThanOrEqual(Math.min(free, limit) * (1 + 1e-12));
        expect(shareBeyond(power, free)).toBeCloseTo(1 - C, 10);
      }),
      { seed },
    );
  });

  it("the chance of a gap is the share of exchangeable gaps as long, its own included", () => {
    fc.assert(
      fc.property(finds, level, (levels, C) => {
        const gaps = sortedGaps(levels, 0);
        const ranked = gapRank(gaps.length, C);
        fc.pre(ranked !== undefined);
        const bound = gaps[ranked.rank - 1];
        expect(ranked.level).toBeGreaterThanOrEqual(C - 1e-12);
        expect(1 - gapChance(gaps, bound * (1 + 1e-12))).toBeGreaterThanOrEqual(ranked.level - 1e-12);
      }),
      { seed },
    );
  });
});

describe("against a second route", () => {
  it("weights of the Weibull-type tail solve the dense system, down to the smallest shapes", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.02, max: 3, noNaN: true }),
        fc.integer({ min: 3, max: 14 }),
        (shape, count) => {
          const weights = tailWeights(shape, count);
          const products = Array.from({ length: count }, (_, i) =>
            weights.reduce(
              (sum, weight, j) => sum + weight * lambda(shape, Math.max(i, j) + 1, Math.min(i, j) + 1),
              0,
            ),
          );
          // Lambda a is a constant times the vector of ones.
          const scale = weights.reduce(
            (most, w, j) => Math.max(most, Math.abs(w) * lambda(shape, j + 1, j + 1)),
            0,
          );
          for (const product of products) expect(Math.abs(product - products[0])).toBeLessThan(1e-10 * scale);
          expect(weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 10);
        },
      ),
      { seed },
    );
  });

  it("the linear estimate moves and stretches with the finds", () => {
    fc.assert(
      fc.property(finds, (levels) => {
        const point = tailPoint(levels.toReversed());
        const other = tailPoint(levels.map((x) => 2 * x - 11).toReversed());
        expect(Math.abs(other - (2 * point - 11))).toBeLessThan(1e-8 * Math.max(1, Math.abs(point)));
      }),
      { seed },
    );
  });

  it("window-trend is the share of uniform records of that sum whose last find lies as low", () => {
    // Three finds with sum 1.2 in [0, 1], uniform on the simplex: two free, the third what is left.
    let all = 0;
    let low = 0;
    forEachReplicate(200_000, { seed, stream: "extinctionTiming" }, (_, g) => {
      const [a, b] = [g.uniform(), g.uniform()];
      const c = 1.2 - a - b;
      if (c < 0 || c > 1) return;
      all++;
      if (Math.max(a, b, c) <= 0.6) low++;
    });
    const error = Math.sqrt((low / all) * (1 - low / all)) / Math.sqrt(all);
    expect(Math.abs(trendChance([0.2, 0.4, 0.6], 1) - low / all)).toBeLessThan(4 * error);
  });

  it.each([
    ["even", 9, 12, (u: number) => u],
    ["falling", 12, 12, (u: number) => 1 - Math.sqrt(1 - u)],
    ["even", 400, 0.6, (u: number) => u],
    ["steeply falling", 900, 12, (u: number) => 1 - (1 - u) ** (1 / 5)],
  ])("declining agrees with a plain sum over slope and length: %s, %i finds", (_, count, span, quantile) => {
    const positions = Array.from({ length: count }, (_unused, i) => quantile((i + 0.5) / count));
    const shares = sharesOf(positions);
    const posterior = decliningPosterior({ shares, spread: 2 });
    const { falling, beyond } = plainPosterior(shares, { spread: 2, span });
    expect(Math.abs(posterior.falling - falling)).toBeLessThan(2e-4);
    for (const p of [0.5, 0.95])
      expect(Math.abs(beyond(posterior.extension(p)) - (1 - p))).toBeLessThan(1e-3);
  });

  it("declining with a limit puts all of the end below it", () => {
    fc.assert(
      fc.property(finds, fc.double({ min: 0.05, max: 3, noNaN: true }), (levels, limit) => {
        const free = decliningPosterior({ shares: sharesOf(levels), spread: 2 });
        const within = decliningPosterior({ shares: sharesOf(levels), spread: 2, limit });
        expect(within.chanceBeyond(limit * (1 + 1e-9))).toBeCloseTo(0, 12);
        const share = free.chanceBeyond(limit);
        const at = limit / 2;
        const wanted = (free.chanceBeyond(at) - share) / (1 - share);
        expect(Math.abs(within.chanceBeyond(at) - wanted)).toBeLessThan(1e-5);
      }),
      { seed, numRuns: 30 },
    );
  });

  it("panels integrate above any level what they were given at their nodes", () => {
    const edges = [0, 0.5, 1, 2];
    const smooth = Array.from(panelNodes(edges).at, (x) => Math.sin(x));
    const above = integralAbove(edges, { smooth, integrand: (x, s) => x * s });
    for (const x of [0, 0.1, 0.5, 0.77, 1.999, 2])
      expect(above(x)).toBeCloseTo(integralOfXSin(2) - integralOfXSin(x), 12);
  });
});

function integralOfXSin(x: number): number {
  return Math.sin(x) - x * Math.cos(x);
}

/** Gamma(2v + i) Gamma(v + j) / (Gamma(v + i) Gamma(j)), j <= i, over Gamma(2v) by products. */
function lambda(v: number, i: number, j: number): number {
  let value = 1;
  for (let m = 1; m < i; m++) value *= (2 * v + m) / (v + m);
  for (let m = 1; m < j; m++) value *= (v + m) / m;
  return value;
}

/** Midpoint sums over 300 slopes up to the span (beyond it there is no mass) and 1500 values of v, z = 1 - v^2, logs throughout. */
function plainPosterior(
  shares: readonly number[],
  { spread, span }: { readonly spread: number; readonly span: number },
) {
  const n = shares.length;
  const [slopes, steps] = [300, 1500];
  const logShares = shares.reduce((sum, y) => sum + Math.log(y), 0);
  const logMass = (slope: number, z: number, logProduct: number) =>
    slope < 0
      ? n * Math.log1p(-slope) - slope * logProduct + (n - 1) * Math.log(z)
      : n * Math.log1p(slope) + slope * logShares + (n * (1 + slope) - 1) * Math.log(z);
  const cells = Array.from({ length: steps }, (_, k) => {
    const v = (k + 0.5) / steps;
    const z = 1 - v * v;
    const logProduct = shares.reduce((sum, y) => sum + Math.log1p(-y * z), 0);
    const logs = Array.from({ length: slopes }, (_unused, i) => {
      const slope = span * ((2 * (i + 0.5)) / slopes - 1);
      return { slope, log: logMass(slope, z, logProduct) - 0.5 * (slope / spread) ** 2 };
    });
    return { v, logs: logs.map(({ slope, log }) => ({ slope, log: log + Math.log(v) })) };
  });
  const largest = cells.reduce(
    (most, { logs }) => logs.reduce((m, { log }) => Math.max(m, log), most),
    -Infinity,
  );
  const masses = cells.map(({ v, logs }) => {
    const of = (isCounted: (slope: number) => boolean) =>
      logs.reduce((sum, { slope, log }) => (isCounted(slope) ? sum + Math.exp(log - largest) : sum), 0);
    return { v, falling: of((slope) => slope < 0), all: of(() => true) };
  });
  const total = masses.reduce((sum, { all }) => sum + all, 0);
  return {
    falling: masses.reduce((sum, { falling }) => sum + falling, 0) / total,
    beyond: (extension: number) => {
      const v = Math.sqrt(extension / (1 + extension));
      return (
        masses.reduce(
          (sum, cell) => sum + cell.all * Math.min(1, Math.max(0, (cell.v - v) * steps + 0.5)),
          0,
        ) / total
      );
    },
  };
}

import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { pieceCoordinate, uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { atHorizon } from "../../../../src/core/timing/scenarios/at-horizon.ts";
import { endLikelihood } from "../../../../src/core/timing/scenarios/end-likelihood.ts";
import { gradual } from "../../../../src/core/timing/scenarios/gradual.ts";
import { pulsesByPartitions } from "../../../../src/core/timing/scenarios/set-partitions.ts";
import { singleLevel } from "../../../../src/core/timing/scenarios/single-level.ts";
import { twoPulses } from "../../../../src/core/timing/scenarios/two-pulses.ts";

interface Range {
  readonly base: number;
  readonly last: number;
  readonly exponent: number;
}

const taxon = fc.record({
  base: fc.integer({ min: 0, max: 900 }).map((x) => x / 100),
  last: fc.integer({ min: 1500, max: 3000 }).map((x) => x / 100),
  exponent: fc.integer({ min: 1, max: 40 }),
});
const assemblage = fc.array(taxon, { minLength: 2, maxLength: 7 });
const options = { seed: 7, numRuns: 25 };

const likelihoods = (ranges: readonly Range[], coordinate = uniformCoordinate) =>
  ranges.map(({ base, last, exponent }, i) =>
    endLikelihood(
      {
        taxon: `t${i}`,
        lastM: last,
        base: coordinate.toEffective(base),
        last: coordinate.toEffective(last),
        exponent,
      },
      coordinate,
    ),
  );

/** ln of the evidence of one level, two pulses, gradual and a horizon; heights are `scale` h + `shift`. */
function evidences(ranges: readonly Range[], scale = 1, shift = 0, coordinate = uniformCoordinate) {
  const taxa = likelihoods(
    ranges.map((r) => ({ ...r, base: r.base * scale + shift, last: r.last * scale + shift })),
    coordinate,
  );
  const window = { lowM: 5 * scale + shift, topsM: [40 * scale + shift] };
  return [
    singleLevel(taxa, window).logEvidence[0],
    twoPulses(taxa, window).logEvidence[0],
    gradual(taxa, window, [25 * scale]).logEvidence[0][0],
    atHorizon(taxa, { kind: "normal", meanM: 29 * scale + shift, sdM: 0.7 * scale }),
  ];
}

const near = (a: readonly number[], b: readonly number[]) =>
  a.forEach((x, i) => {
    expect(Math.abs(x - b[i])).toBeLessThan(1e-5 * Math.max(1, Math.abs(x)));
  });

/** Recovery that falls upward, in another unit. */
const recovery = (factor: number) =>
  pieceCoordinate(
    [
      { baseM: 0, topM: 18, atBase: factor, atTop: factor },
      { baseM: 18, topM: 26, atBase: factor, atTop: 0.4 * factor },
      { baseM: 26, topM: 45, atBase: 0.4 * factor, atTop: 0.4 * factor },
    ],
    { beyond: 0.4 * factor, origin: 0 },
  );

describe("evidence of scenarios", () => {
  it("does not depend on shift, stretch or the order of taxa", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const own = evidences(ranges);
        near(evidences(ranges.toReversed()), own);
        const moved = evidences(ranges, 3.5, -60);
        near(moved.slice(0, 3), own.slice(0, 3));
        expect(moved[3]).toBeCloseTo(own[3], 5);
      }),
      options,
    );
  });

  it("does not depend on the unit of recovery", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        near(evidences(ranges, 1, 0, recovery(6)), evidences(ranges, 1, 0, recovery(1)));
      }),
      options,
    );
  });

  it("is only cut, never weighed, by a taxon with one find", () => {
    fc.assert(
      fc.property(assemblage, fc.integer({ min: 1000, max: 3500 }), (ranges, place) => {
        const lone = { base: place / 100, last: place / 100, exponent: 0 };
        const window = { lowM: 5, topsM: [40] };
        const alone = singleLevel(likelihoods(ranges), window).posterior;
        const both = singleLevel(likelihoods([...ranges, lone]), window);
        const above = 1 - (alone?.cdf(lone.last) ?? 0);
        if (above < 1e-6) return;
        const single = singleLevel(likelihoods(ranges), window).logEvidence[0];
        expect(both.logEvidence[0]).toBeCloseTo(single + Math.log(above), 4);
      }),
      options,
    );
  });

  it("of two pulses is the same by quadrature and over partitions of the taxa", () => {
    fc.assert(
      fc.property(assemblage, (ranges) => {
        const window = { lowM: 5, topsM: [40] };
        const taxa = likelihoods(ranges);
        const [a, b] = [twoPulses(taxa, window), pulsesByPartitions(taxa, window, 2)];
        near([a.logEvidence[0], a.logEvidenceEqual[0]], [b.logEvidence[0], b.logEvidenceEqual[0]]);
      }),
      options,
    );
  });

  it("of a gradual end is the mean of its integrand over draws of top and duration", () => {
    const taxa = likelihoods([
      { base: 0, last: 10, exponent: 4 },
      { base: 0, last: 8, exponent: 3 },
      { base: 0, last: 5, exponent: 1 },
    ]);
    const exact = gradual(taxa, { lowM: 0, topsM: [40] }, [20]).logEvidence[0][0];
    // Halton points in two dimensions: an even cover, without chance.
    const halton = (index: number, base: number): number =>
      index === 0 ? 0 : ((index % base) + halton(Math.floor(index / base), base)) / base;
    const count = 40_000;
    let sum = 0;
    for (let n = 1; n <= count; n++) {
      const [top, duration] = [40 * halton(n, 2), 20 * halton(n, 3)];
      sum += taxa.reduce((product, t) => (product * t.area(top - duration, top)) / duration, 1);
    }
    expect(Math.log(sum / count)).toBeCloseTo(exact, 2);
  });
});

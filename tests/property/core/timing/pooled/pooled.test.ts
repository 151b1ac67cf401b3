import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { toCommon } from "../../../../../src/core/alignment/flatten.ts";
import { uniformCoordinate } from "../../../../../src/core/ranges/coordinate.ts";
import {
  type CommonScale,
  fromAlignment,
  fromHorizon,
} from "../../../../../src/core/timing/pooled/common-scale.ts";
import { highestDensity } from "../../../../../src/core/timing/pooled/highest-density.ts";
import { type PooledLevel, pooledLevel } from "../../../../../src/core/timing/pooled/pooled-level.ts";
import { endLikelihood } from "../../../../../src/core/timing/scenarios/end-likelihood.ts";
import { horizon } from "../../../../unit/core/ranges/small-study.ts";

interface Place {
  readonly pickM: number;
  readonly sd: number;
  /** Length, highest find below the pick, and finds. */
  readonly taxa: readonly (readonly [number, number, number])[];
}

const place: fc.Arbitrary<Place> = fc.record({
  pickM: fc.integer({ min: -200, max: 400 }).map((x) => x / 10),
  sd: fc.integer({ min: 2, max: 120 }).map((x) => x / 100),
  taxa: fc.array(
    fc.tuple(
      fc.integer({ min: 50, max: 300 }).map((x) => x / 10),
      fc.integer({ min: -10, max: 40 }).map((x) => x / 10),
      fc.integer({ min: 1, max: 25 }),
    ),
    { minLength: 1, maxLength: 5 },
  ),
});
const places = fc.array(place, { minLength: 2, maxLength: 4 });
const options = { seed: 11, numRuns: 20 };

const taxaOf = ({ pickM, taxa }: Place) =>
  taxa.map(([length, below, exponent], i) => {
    const last = pickM - below;
    const base = last - length;
    return endLikelihood({ taxon: `t${i}`, lastM: last, base, last, exponent }, uniformCoordinate);
  });

const scaleOf = (sections: readonly Place[]) =>
  fromHorizon(
    new Map(sections.map(({ pickM, sd }, s) => [`s${s}`, horizon(pickM, { shape: "normal", sigmaM: sd })])),
  );

function levelOf(
  sections: readonly Place[],
  scale: CommonScale = scaleOf(sections),
  sharedSd = 0,
): PooledLevel {
  return pooledLevel({
    sections: sections.map((one, s) => ({
      section: `s${s}`,
      taxa: taxaOf(one),
      maps: scale.mapsOf(`s${s}`),
    })),
    low: -12,
    tops: [15],
    sharedSd,
  });
}

const quantiles = ({ posterior }: PooledLevel) =>
  [0.025, 0.5, 0.975].map((p) => posterior?.quantile(p) ?? Number.NaN);

const near = (a: readonly number[], b: readonly number[], tolerance = 1e-5) =>
  a.forEach((x, i) => {
    expect(Math.abs(x - b[i])).toBeLessThan(tolerance);
  });

describe("the level common to sections", () => {
  it("does not turn on their order", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const [there, back] = [levelOf(sections), levelOf(sections.toReversed())];
        near(quantiles(there), quantiles(back));
        near(there.common, back.common);
        near(there.free, back.free);
      }),
      options,
    );
  });

  it("moves with nothing where a section and its horizon are shifted together", () => {
    fc.assert(
      fc.property(places, fc.integer({ min: -500, max: 500 }), (sections, shift) => {
        const moved = sections.map((one, s) => (s === 0 ? { ...one, pickM: one.pickM + shift } : one));
        near(quantiles(levelOf(sections)), quantiles(levelOf(moved)));
      }),
      options,
    );
  });

  it("moves by as much as all horizons do, the finds standing still", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const scale = scaleOf(sections.map((one) => ({ ...one, pickM: one.pickM - 0.5 })));
        const wide = (found: CommonScale, low: number) =>
          pooledLevel({
            sections: sections.map((one, s) => ({
              section: `s${s}`,
              taxa: taxaOf(one),
              maps: found.mapsOf(`s${s}`),
            })),
            low,
            tops: [low + 27],
            sharedSd: 0,
          });
        const [here, moved] = [wide(scaleOf(sections), -12), wide(scale, -11.5)];
        near(
          quantiles(here).map((x) => x + 0.5),
          quantiles(moved),
        );
      }),
      options,
    );
  });

  it("tends to the one of exact picks as their errors vanish", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const exact = levelOf(sections.map((one) => ({ ...one, sd: 0 })));
        const nearly = levelOf(sections.map((one) => ({ ...one, sd: 1e-5 })));
        near(quantiles(exact), quantiles(nearly), 2e-4);
      }),
      options,
    );
  });

  it("without a section is the one of the others alone", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const [left] = levelOf(sections).without;
        const others = levelOf(sections.slice(1), scaleOf(sections.slice(1)));
        near(
          [0.1, 0.5, 0.9].map((p) => left.posterior?.quantile(p) ?? Number.NaN),
          [0.1, 0.5, 0.9].map((p) => others.posterior?.quantile(p) ?? Number.NaN),
        );
      }),
      options,
    );
  });

  it("is known less well with a shared error", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const [low, , high] = quantiles(levelOf(sections));
        const [lower, , higher] = quantiles(levelOf(sections, scaleOf(sections), 0.4));
        expect(higher - lower).toBeGreaterThan(Math.min(high - low, 20) - 1e-6);
      }),
      { ...options, numRuns: 5 },
    );
  });

  it("has a densest interval no longer than the equal-tailed one, with its mass", () => {
    fc.assert(
      fc.property(places, (sections) => {
        const found = levelOf(sections);
        const [low, , high] = quantiles(found);
        const pieces = highestDensity(found.posterior!, 0.95);
        const length = pieces.reduce((sum, piece) => sum + piece.high - piece.low, 0);
        const mass = pieces.reduce(
          (sum, piece) => sum + found.posterior!.cdf(piece.high) - found.posterior!.cdf(piece.low),
          0,
        );
        expect(length).toBeLessThanOrEqual((high - low) * (1 + 1e-3));
        expect(Math.abs(mass - 0.95)).toBeLessThan(1e-3);
      }),
      options,
    );
  });
});

describe("the common scale of lined-up sections", () => {
  const rising = fc
    .array(fc.integer({ min: 5, max: 60 }), { minLength: 1, maxLength: 4 })
    .map((steps) => steps.reduce<number[]>((all, step) => [...all, all[all.length - 1] + step / 10], [0]));

  it.each(["rigid", "gain"] as const)(
    "lays every level where the lining up lays its height, %s",
    (beyond) => {
      fc.assert(
        fc.property(rising, rising, fc.integer({ min: -80, max: 200 }), (heights, targets, at) => {
          const count = Math.min(heights.length, targets.length);
          const alignment = {
            section: "s",
            horizons: heights.slice(0, count).map((_, k) => `h${k}`),
            heightsM: heights.slice(0, count),
            sigmasM: heights.slice(0, count).map((_, k) => 0.1 + 0.05 * k),
            targets: targets.slice(0, count),
            targetSigmas: heights.slice(0, count).map(() => 0),
          };
          const [map] = fromAlignment([alignment], beyond).mapsOf("s");
          const level = at / 10;
          const law = map.lawAt(level);
          expect(law.kind).toBe("normal");
          if (law.kind !== "normal") return;
          const { common, sigma } = toCommon(alignment, law.meanM, { beyond });
          const step = 1e-6;
          const gain = (toCommon(alignment, law.meanM + step, { beyond }).common - common) / step;
          near([common, map.toLevel(law.meanM)], [level, level], 1e-9);
          expect(Math.abs(sigma - gain * law.sdM)).toBeLessThan(1e-3 * sigma + 1e-9);
        }),
        options,
      );
    },
  );

  it("with the main horizon alone is metres from it", () => {
    const sections = [
      { pickM: 20, sd: 0.3, taxa: [[12, 0.4, 9]] as const },
      { pickM: 7, sd: 0.6, taxa: [[6, -0.2, 5]] as const },
    ];
    const aligned = fromAlignment(
      sections.map(({ pickM, sd }, s) => ({
        section: `s${s}`,
        horizons: ["h"],
        heightsM: [pickM],
        sigmasM: [sd],
        targets: [0],
        targetSigmas: [0],
      })),
      "rigid",
    );
    near(quantiles(levelOf(sections, aligned)), quantiles(levelOf(sections)));
  });
});

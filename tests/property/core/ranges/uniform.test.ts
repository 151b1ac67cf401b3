import * as fc from "fast-check";
import { expect, it } from "vitest";
import { pieceCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { confidenceToReach } from "../../../../src/core/ranges/pivot.ts";
import { twoEndedFactor, twoEndedLevel, uniformBound } from "../../../../src/core/ranges/uniform.ts";
import { persistence } from "../../../../src/core/ranges/window.ts";

const level = fc.double({ min: 0.05, max: 0.995, noNaN: true });
const range = fc.record({
  base: fc.double({ min: -100, max: 100, noNaN: true }),
  length: fc.double({ min: 0.1, max: 100, noNaN: true }),
  exponent: fc.integer({ min: 1, max: 300 }),
});
const rangeOf = ({ base, length, exponent }: { base: number; length: number; exponent: number }) => ({
  base,
  last: base + length,
  exponent,
});
const extension = (r: ReturnType<typeof rangeOf>, confidence: number) =>
  (uniformBound(r, confidence) ?? Number.NaN) - r.last;

it("the bound moves with the range and stretches with it", () => {
  fc.assert(
    fc.property(range, level, (shape, confidence) => {
      const plain = extension(rangeOf(shape), confidence);
      const shifted = extension(rangeOf({ ...shape, base: shape.base + 37 }), confidence);
      const stretched = extension(rangeOf({ ...shape, length: 3 * shape.length }), confidence);
      expect(Math.abs(shifted / plain - 1)).toBeLessThan(1e-6);
      expect(Math.abs(stretched / (3 * plain) - 1)).toBeLessThan(1e-6);
    }),
    { seed: 7 },
  );
});

it("the bound is the level that the confidence just reaches, and the window's p is what is left of it", () => {
  fc.assert(
    fc.property(range, level, (shape, confidence) => {
      const r = rangeOf({ ...shape, base: 0 });
      const bound = uniformBound(r, confidence) ?? Number.NaN;
      fc.pre(bound > r.last * (1 + 1e-9));
      expect(confidenceToReach(r, bound)).toBeCloseTo(confidence, 5);
      expect((persistence(r, bound)?.p ?? 0) + confidenceToReach(r, bound)).toBeCloseTo(1, 12);
    }),
    { seed: 7 },
  );
});

it("the bound rises with the level and falls with the finds", () => {
  fc.assert(
    fc.property(range, level, (shape, confidence) => {
      const r = rangeOf(shape);
      expect(extension(r, confidence + 0.004)).toBeGreaterThan(extension(r, confidence));
      expect(extension({ ...r, exponent: r.exponent + 1 }, confidence)).toBeLessThan(
        extension(r, confidence),
      );
    }),
    { seed: 7 },
  );
});

it("the joint extension of both ends has its level", () => {
  fc.assert(
    fc.property(level, fc.integer({ min: 2, max: 100 }), (confidence, horizons) => {
      expect(twoEndedLevel(twoEndedFactor(confidence, horizons), horizons)).toBeCloseTo(confidence, 9);
    }),
    { seed: 7 },
  );
});

it("height and effective level undo each other outside rock without recovery", () => {
  const recovery = fc.constantFrom(0, 0.2, 1, 3);
  const pieces = fc.array(fc.tuple(fc.integer({ min: 1, max: 9 }), recovery, recovery), {
    minLength: 1,
    maxLength: 8,
  });
  fc.assert(
    fc.property(pieces, fc.double({ min: -5, max: 80, noNaN: true }), (shapes, heightM) => {
      let baseM = 0;
      const declared = shapes.map(([thickness, atBase, atTop]) => {
        const piece = { baseM, topM: baseM + thickness, atBase, atTop };
        baseM = piece.topM;
        return piece;
      });
      const coordinate = pieceCoordinate(declared, { beyond: 1, origin: 0 });
      const u = coordinate.toEffective(heightM);
      const upper = coordinate.toHeight(u, "upper") ?? Number.NaN;
      const lower = coordinate.toHeight(u, "lower") ?? Number.NaN;
      expect(upper).toBeGreaterThanOrEqual(heightM - 1e-5);
      expect(lower).toBeLessThanOrEqual(heightM + 1e-5);
      if (coordinate.gapAt(u) === undefined) expect(Math.abs(upper - heightM)).toBeLessThan(1e-5);
    }),
    { seed: 7 },
  );
});

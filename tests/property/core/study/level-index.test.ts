import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { LEVEL_TOLERANCE_M, levelIndex } from "../../../../src/core/study/level-index.ts";

const heights = fc.array(
  fc
    .record({ whole: fc.integer({ min: -3, max: 3 }), step: fc.integer({ min: -6, max: 6 }) })
    .map(({ whole, step }) => whole + step * 0.4 * LEVEL_TOLERANCE_M),
  { minLength: 1, maxLength: 30 },
);

describe("an index of levels", () => {
  it("gives what looking at every level gives", () => {
    fc.assert(
      fc.property(heights, heights, (added, asked) => {
        const index = levelIndex<number>();
        for (const [at, height] of added.entries()) index.add(height, at);
        for (const height of asked) {
          const near = added.flatMap((one, at) => (Math.abs(one - height) <= LEVEL_TOLERANCE_M ? [at] : []));
          expect(index.at(height).toSorted((a, b) => a - b)).toEqual(near);
        }
      }),
      { seed: 8, numRuns: 500 },
    );
  });
});

import { describe, expect, it } from "vitest";
import { barrenChances, countSampled, furthestBarren } from "../../../../src/core/ranges/sampled.ts";

describe("sampled horizons", () => {
  it("rejects where p meets 1 - C exactly", () => {
    // p(1) = C(19, 1) / C(20, 1) = 19/20; p(j) = 19/(19 + j), which is 1/20 at j = 361.
    const count = { inRange: 19, finds: 1, barrenAbove: 1000 };
    expect(furthestBarren(count, 0.95)).toBe(360);
  });

  it("takes 1 - C from the decimal digits, not from the double", () => {
    // p(j) = 1 / (1 + j): 1/10 at j = 9; 1 - 0.9 as doubles is 0.09999999999999998.
    expect(furthestBarren({ inRange: 1, finds: 1, barrenAbove: 50 }, 0.9)).toBe(8);
  });

  it("says nothing with no informative find: every barren horizon may lie inside", () => {
    expect(furthestBarren({ inRange: 7, finds: 0, barrenAbove: 12 }, 0.95)).toBe(12);
    expect([...barrenChances({ inRange: 7, finds: 0, barrenAbove: 2 })]).toEqual([1, 1, 1]);
  });

  it("counts barren horizons below the lowest find only from a known base", () => {
    const presence = [false, false, true, false, true, false];
    expect(countSampled(presence, "base")).toEqual({ inRange: 5, finds: 2, barrenAbove: 1 });
    expect(countSampled(presence, "first")).toEqual({ inRange: 2, finds: 1, barrenAbove: 1 });
    expect(countSampled([false, false], "first")).toBeUndefined();
  });
});

import { describe, expect, it } from "vitest";
import { commonEndGiven, commonEndJoint } from "../../../../src/core/timing/common-end.ts";

const range = (base: number, last: number, exponent: number) => ({ base, last, exponent });

describe("ranges whose last digits are lost beside a very long base", () => {
  it.each([1e8, 1.4331e8, 1e12, 1e15])("an offset of %d m leaves an interval, never a failure", (offset) => {
    const ranges = [range(-offset, 12.5, 2), range(-offset, 12.25, 2)];
    for (const set of [commonEndGiven(ranges, 0.95), commonEndJoint(ranges, 0.95)]) {
      expect(set.kind).toBe("interval");
      if (set.kind === "interval") expect(set.high).toBeGreaterThanOrEqual(set.low);
    }
  });

  it("three finds within a metre at the top of 143,000 km", () => {
    const set = commonEndGiven([range(143_316_960.1, 143_316_961, 2)], 0.95);
    expect(set.kind).toBe("interval");
  });
});

import { describe, expect, it } from "vitest";
import { formatGiven, givenToHeight, heightToGiven } from "../../../../src/core/study/heights.ts";
import { isInside, unionOfIntervals, unsearchableIntervals } from "../../../../src/core/study/intervals.ts";
import { legHeight, levelRegister } from "../../../../src/core/study/legs.ts";

describe("heights", () => {
  it("turns depth upside down and keeps zero plain", () => {
    expect(givenToHeight(100, { axis: "depth", unit: "ft" })).toBeCloseTo(-30.48, 12);
    expect(Object.is(givenToHeight(0, { axis: "depth", unit: "m" }), 0)).toBe(true);
    expect(heightToGiven(-30.48, { axis: "depth", unit: "ft" })).toBeCloseTo(100, 10);
  });

  it("writes a position in the section's own words", () => {
    expect(formatGiven(12.4, { axis: "height", unit: "m" })).toBe("12.4 m");
    expect(formatGiven(5.625, { axis: "height", unit: "cm" })).toBe("562.5 cm");
    expect(formatGiven(-30.48, { axis: "depth", unit: "ft" })).toBe("100 ft depth");
    expect(formatGiven(-0.00001, { axis: "height", unit: "m" })).toBe("0 m");
    expect(formatGiven(1200, { axis: "height", unit: "mm" })).toBe("1200000 mm");
  });
});

describe("legs", () => {
  const leg = { name: "A", readings: [0, 5, 10], heightsM: [10, 14, 15] };
  it("is linear between rows and undefined outside them", () => {
    expect([0, 2.5, 5, 7.5, 10].map((reading) => legHeight(leg, reading))).toEqual([10, 12, 14, 14.5, 15]);
    expect(legHeight(leg, -0.1)).toBeUndefined();
    expect(legHeight(leg, 10.1)).toBeUndefined();
  });

  it("takes levels within 1e-9 m for one level", () => {
    const level = levelRegister();
    expect(level(1.1)).toBe(1.1);
    expect(level(1.1 + 5e-10)).toBe(1.1);
    expect(level(1.1 - 5e-10)).toBe(1.1);
    expect(level(1.1 + 3e-9)).toBe(1.1 + 3e-9);
  });
});

const interval = (kind: "covered" | "core-loss" | "slump", baseM: number, topM: number) =>
  ({ kind, baseM, topM, notes: "", origin: { file: "intervals.csv", row: 2 } }) as const;

describe("intervals", () => {
  it("joins what overlaps or touches, in order", () => {
    const union = unionOfIntervals([
      { baseM: 5, topM: 6 },
      { baseM: 1, topM: 3 },
      { baseM: 2, topM: 4 },
      { baseM: 4, topM: 4.5 },
    ]);
    expect(union).toEqual([
      { baseM: 1, topM: 4.5 },
      { baseM: 5, topM: 6 },
    ]);
  });

  it("takes covered rock and core loss, not slumps; the ends were seen", () => {
    const hidden = unsearchableIntervals([
      interval("covered", 1, 2),
      interval("slump", 3, 4),
      interval("core-loss", 5, 6),
    ]);
    expect(hidden).toEqual([
      { baseM: 1, topM: 2 },
      { baseM: 5, topM: 6 },
    ]);
    expect([1, 1.5, 2, 3.5].map((height) => isInside(height, hidden))).toEqual([false, true, false, false]);
  });
});

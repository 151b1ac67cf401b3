import { describe, expect, it } from "vitest";
import { pieceCoordinate, recoveryCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { covered, section } from "./small-study.ts";

describe("the coordinate of a section", () => {
  const coordinate = recoveryCoordinate(section({ intervals: [covered(20, 23), covered(22, 25)] }));

  it("is the height where nothing is covered", () => {
    const plain = recoveryCoordinate(section());
    expect(plain.toEffective(12.345)).toBe(12.345);
    expect(plain.toHeight(-7.5, "upper")).toBe(-7.5);
  });

  it("stands still across covered rock, overlapping intervals counted once", () => {
    expect(coordinate.gaps).toEqual([{ baseM: 20, topM: 25 }]);
    expect([10, 20, 22, 25, 30].map(coordinate.toEffective)).toEqual([10, 20, 20, 20, 25]);
  });

  it("sends an upper limit in a gap to its top and a lower one to its base", () => {
    expect(coordinate.toHeight(20, "upper")).toBe(25);
    expect(coordinate.toHeight(20, "lower")).toBe(20);
    expect(coordinate.gapAt(20)).toEqual({ baseM: 20, topM: 25 });
    expect(coordinate.gapAt(20.001)).toBeUndefined();
  });

  it("continues with full recovery beyond the section's ends", () => {
    expect(coordinate.toHeight(1000, "upper")).toBe(1005);
    expect(coordinate.toHeight(-1000, "lower")).toBe(-1000);
  });

  it("leaves core loss and rock not searched out too, but not a slump", () => {
    const interval = { ...covered(5, 6), kind: "slump" as const };
    const lost = { ...covered(8, 9), kind: "core-loss" as const };
    const kept = recoveryCoordinate(section({ intervals: [interval, lost] }));
    expect(kept.gaps).toEqual([{ baseM: 8, topM: 9 }]);
  });
});

describe("a coordinate of declared pieces", () => {
  it("has no height beyond recovery that nothing continues", () => {
    const piece = { baseM: 0, topM: 10, atBase: 1, atTop: 3 };
    const coordinate = pieceCoordinate([piece], { beyond: 0, origin: 0 });
    expect(coordinate.toHeight(20, "upper")).toBe(10);
    expect(coordinate.toHeight(20.1, "upper")).toBeUndefined();
    expect(coordinate.toHeight(-0.1, "lower")).toBeUndefined();
  });

  it("refuses pieces with a hole between them, or negative recovery", () => {
    const piece = { baseM: 0, topM: 10, atBase: 1, atTop: 1 };
    const options = { beyond: 1, origin: 0 };
    expect(() => pieceCoordinate([piece, { ...piece, baseM: 11, topM: 12 }], options)).toThrow(/contiguous/);
    expect(() => pieceCoordinate([{ ...piece, atTop: -1 }], options)).toThrow(/recovery 0 or more/);
  });
});

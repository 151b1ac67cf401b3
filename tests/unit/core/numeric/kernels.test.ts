import { describe, expect, it } from "vitest";
import { kernels, twins } from "../../../../src/core/numeric/kernels.ts";
import { ziggurat } from "../../../../src/core/numeric/ziggurat.ts";

const place = (block: number) => ({ seed: 77, stream: "extinctionTiming", block }) as const;

describe("the compiled kernels", () => {
  it("are compiled here, not the twins", () => {
    expect(kernels).not.toBe(twins);
  });

  it.each([0, 1, 4_000_000_000])("draw the bits of their twins, block %i", (block) => {
    expect(kernels.exponentials(place(block), 200_000)).toEqual(twins.exponentials(place(block), 200_000));
  });

  it.each([[[3]], [[1, 1]], [[24, 12, 9, 4, 1]], [Array.from({ length: 60 }, (_, i) => 1 + i)]])(
    "give the statistics of their twins, exponents %j",
    (exponents) => {
      const m = Float64Array.from(exponents);
      expect(kernels.commonEndStatistics(place(2), m, 1024)).toEqual(
        twins.commonEndStatistics(place(2), m, 1024),
      );
    },
  );

  it("leave earlier results alone when called again", () => {
    const first = kernels.exponentials(place(0), 5);
    const kept = [...first];
    kernels.exponentials(place(1), 500_000);
    expect([...first]).toEqual(kept);
  });
});

describe("the ziggurat's tables", () => {
  it("give every layer the same area under e^-x, down to the last one at the top", () => {
    const { edges, heights } = ziggurat;
    const areas = Array.from({ length: 255 }, (_, i) => edges[i + 1] * (heights[i + 2] - heights[i + 1]));
    for (const area of areas) expect(Math.abs(area / (edges[0] * heights[1]) - 1)).toBeLessThan(1e-9);
  });
});

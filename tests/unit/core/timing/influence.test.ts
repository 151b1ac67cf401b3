import { describe, expect, it } from "vitest";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { commonEndTest } from "../../../../src/core/timing/common-end.ts";
import { influence } from "../../../../src/core/timing/influence.ts";
import type { TaxonRange } from "../../../../src/core/timing/range-data.ts";

function rangeOf(taxon: string, levels: readonly number[]): TaxonRange {
  const [first, last] = [levels[0], levels[levels.length - 1]];
  const place = { mode: "first", baseM: first, lastM: last, base: first, last } as const;
  const counts = { horizons: levels.length, exponent: levels.length - 1 };
  return { ...place, ...counts, taxon, group: "shells", reachesTop: false, levels };
}

const ranges = [
  rangeOf("Orbula vesta", [1, 8, 15, 22, 29]),
  rangeOf("Lenta acuta", [2, 9, 16, 23, 29.5]),
  rangeOf("Spiralis nova", [1, 6, 12, 18, 36]),
];
const inputs = {
  section: "s",
  set: "candidates",
  coordinate: uniformCoordinate,
  lowM: 10,
  highM: 50,
  longestM: 20,
};

const step = () => {
  throw new Error("stopped");
};

describe("influence", () => {
  it("tells what the answer would be without a taxon, or without its highest find", () => {
    const found = influence(ranges, inputs);
    expect(found.map(({ taxon, removed }) => `${taxon}, ${removed}`)).toHaveLength(6);
    const whole = commonEndTest(ranges)?.p ?? Number.NaN;
    const rest = commonEndTest(ranges.slice(1))?.p ?? Number.NaN;
    expect(found[0].p).toBeCloseTo(rest - whole, 12);
    const lower = rangeOf("Spiralis nova", [1, 6, 12, 18]);
    const lowered = commonEndTest([ranges[0], ranges[1], lower])?.p ?? Number.NaN;
    expect(found[5]).toMatchObject({ taxon: "Spiralis nova", removed: "highest-find" });
    expect(found[5].p).toBeCloseTo(lowered - whole, 12);
  });

  it("finds that the one high find moves the level most", () => {
    const found = influence(ranges, inputs);
    const moves = found.map(({ levelM }) => Math.abs(levelM ?? 0));
    expect(found[moves.indexOf(Math.max(...moves))].taxon).toBe("Spiralis nova");
    expect(Math.max(...moves)).toBeGreaterThan(5);
  });

  it("leaves scenarios out where no longest duration is given, and stops when told to", () => {
    const { longestM: _longestM, ...without } = inputs;
    expect(influence(ranges, without).every((row) => row.probability === undefined)).toBe(true);
    expect(() => influence(ranges, { ...without, step })).toThrow("stopped");
  });
});

import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Part, putTogether, takeApart } from "../../../src/run/parts.ts";

/** Through messages, as between threads. */
function sent(value: unknown) {
  const parts: Part[] = [];
  const { take, whole } = putTogether();
  const rest = takeApart((part) => parts.push(structuredClone(part)))(value);
  for (const part of parts) take(part);
  return { parts, whole: whole(structuredClone(rest)) };
}

const heights = (count: number) =>
  Array.from({ length: count }, (_, at) => ({ at, height: [at / 2, undefined] }));

describe("a value sent in parts", () => {
  it("is the same when it is put together", () => {
    fc.assert(
      fc.property(fc.anything({ withMap: true, withTypedArray: true, maxDepth: 4 }), (value) => {
        expect(sent({ value }).whole).toEqual({ value });
      }),
      { seed: 11, numRuns: 500 },
    );
  });

  it("is the same with long lists in lists, in maps and of maps", () => {
    const value = {
      short: [1, 2],
      long: heights(30_000),
      nested: [
        { name: "a", finds: heights(9000) },
        { name: "b", finds: [] },
      ],
      byName: new Map([["a", heights(9000)]]),
      many: new Map(heights(9000).map((one) => [one.at, one])),
      bulk: new Float64Array(50_000),
    };
    expect(sent(value).whole).toEqual(value);
  });

  it("goes in parts none of which is long, and in one where it is short", () => {
    const { parts } = sent({ finds: heights(30_000) });
    expect(parts.length).toBeGreaterThan(20);
    for (const { rest } of parts) expect(JSON.stringify(rest).length).toBeLessThan(200_000);
    expect(sent({ finds: heights(10) }).parts).toEqual([]);
  });

  it("holds a list once that stands in two places", () => {
    const list = heights(9000);
    const { whole, parts } = sent({ one: list, other: list });
    expect(whole).toEqual({ one: list, other: list });
    expect(new Set(parts.map((part) => part.list)).size).toBe(1);
  });
});

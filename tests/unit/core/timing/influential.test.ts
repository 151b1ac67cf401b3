import { describe, expect, it } from "vitest";
import { mostInfluential } from "../../../../src/core/timing/influential.ts";
import type { Influence } from "../../../../src/core/timing/result.ts";

const here = { section: "ledge", set: "candidates" };
const one = (taxon: string, removed: Influence["removed"], levelM?: number): Influence => ({
  ...here,
  taxon,
  removed,
  ...(levelM === undefined ? {} : { levelM }),
});
const names = (influence: readonly Influence[]) =>
  mostInfluential(influence, here).map(({ taxon, removed }) => `${taxon} ${removed}`);

describe("what the level leans on", () => {
  it("is at most three taxa, each once, the largest move first", () => {
    const moves = [
      one("a", "taxon", 0.5),
      one("b", "taxon", -0.9),
      one("c", "taxon", 0.7),
      one("d", "taxon", 0.6),
    ];
    expect(names(moves)).toEqual(["b taxon", "c taxon", "d taxon"]);
  });

  it("names the highest find where that alone moves the level about as far", () => {
    expect(names([one("a", "taxon", -0.5), one("a", "highest-find", -0.49)])).toEqual(["a highest-find"]);
    expect(names([one("a", "highest-find", -0.49), one("a", "taxon", -0.5)])).toEqual(["a highest-find"]);
    expect(names([one("a", "highest-find", -0.1), one("a", "taxon", -0.5)])).toEqual(["a taxon"]);
  });

  it("leaves out moves much smaller than the largest, none, and those of other sets", () => {
    expect(names([one("a", "taxon", 1), one("b", "taxon", 0.2), one("c", "taxon")])).toEqual(["a taxon"]);
    expect(names([one("a", "taxon", 0)])).toEqual([]);
    expect(names([{ ...one("a", "taxon", 1), set: "group:x" }])).toEqual([]);
  });
});

import { describe, expect, it } from "vitest";
import { countsChance } from "../../../../src/core/ranges/counts.ts";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import { settleFinds } from "../../../../src/core/study/finds.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Occurrence, Section } from "../../../../src/core/study/model.ts";
import { candidate, horizon, markers, section, study, taxon } from "./small-study.ts";

const origin = { file: "test.csv", row: 2 };
const heights = [4, 5, 6, 7, 8, 9, 10];
const counts = [2, 5, 3, 8, 1, 4, 6];
const countedTaxon = taxon("Orbula numerosa", heights, { counts });

function counted(change: Partial<Section["searches"][number]> = {}): Section {
  const place = section();
  return { ...place, searches: place.searches.map((s) => ({ ...s, counting: "count" as const, ...change })) };
}

function rowOf(of: LocalTaxon, place: Section, main?: ReturnType<typeof horizon>) {
  const settings = study([place], (s) => ({
    ...s,
    ranges: { ...s.ranges, methods: ["counts" as const] },
  }));
  const { ends } = estimateRanges(settings, {
    taxa: [of],
    candidates: [candidate(of)],
    markers: markers(main),
  });
  const row = ends.find((end) => end.end === "top");
  if (row === undefined) throw new Error("no row");
  return row;
}

describe("counts", () => {
  it("leaves out the lowest sample with finds and bounds the end at a barren sample", () => {
    const row = rowOf(countedTaxon, counted(), horizon(11.5));
    const shape = Number(/kappa ([\d.]+)/.exec(row.note)?.[1]);
    expect(row.p).toBeCloseTo(countsChance({ total: 27, inside: 6, further: 1 }, shape), 3);
    expect(row.note).toContain("27 specimens");
    expect(row).toMatchObject({ outcome: "closed", exponent: 6 });
    expect(row.highM).toBeGreaterThan(10);
    expect(row.pointM).toBeGreaterThan(10);
    expect(row.pointM).toBeLessThan(row.highM ?? 0);
  });

  it("is not to be had without counts, where samples were searched for presence, or a find was not counted", () => {
    const outcome = (of: LocalTaxon, place: Section) => rowOf(of, place).note;
    expect(outcome(taxon("Orbula plana", heights), counted())).toBe("no counts");
    expect(outcome(countedTaxon, section())).toBe("samples of the range were not all counted");
    const blank = { ...countedTaxon, counts: counts.map((count, i) => (i === 3 ? undefined : count)) };
    expect(outcome(blank, counted())).toBe("a find without its count");
    expect(rowOf(blank, counted()).outcome).toBe("not-applicable");
  });

  it("takes the number counted to as effort", () => {
    expect(rowOf(countedTaxon, counted({ countedTo: 300 })).note).toContain("the number counted to");
  });
});

const find = (name: string, height: number, count?: number, extra: Partial<Occurrence> = {}): Occurrence => ({
  verbatim: name,
  taxon: name,
  sample: `s${height}`,
  heightM: height,
  ...(count === undefined ? {} : { count }),
  reworked: "no",
  doubtful: false,
  origin,
  ...extra,
});

it("adds the specimens of all finds of one horizon that count", () => {
  const occurrences = [
    find("Orbula alba", 2, 3),
    find("Orbula alba", 2, 4),
    find("Orbula alba", 3, 5, { reworked: "yes" }),
    find("Orbula alba", 4),
    find("Orbula alba", 5, 1),
  ];
  const { taxa } = settleFinds(study([section({ occurrences })]));
  expect(taxa[0].heightsM).toEqual([2, 4, 5]);
  expect(taxa[0].counts).toEqual([7, undefined, 1]);
});

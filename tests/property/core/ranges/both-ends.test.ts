import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Coordinate, pieceCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { rangeMethods } from "../../../../src/core/ranges/methods.ts";
import { mirroredCoordinate, mirroredTaxon } from "../../../../src/core/ranges/mirrored.ts";
import { estimateRanges } from "../../../../src/core/ranges/range-ends.ts";
import type { RangeEnd, RangeMethod } from "../../../../src/core/ranges/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import {
  candidate,
  covered,
  horizon,
  markers,
  section,
  study,
  taxon,
} from "../../../unit/core/ranges/small-study.ts";

const methods = Object.keys(rangeMethods).filter((name): name is RangeMethod => name in rangeMethods);
const TOP_M = 40;

interface World {
  readonly place: Section;
  readonly taxa: readonly LocalTaxon[];
  readonly mainM?: number;
}

function rowsOf({ place, taxa, mainM }: World): readonly RangeEnd[] {
  const settings = study([place], (s) => ({
    ...s,
    ranges: { ...s.ranges, methods, recovery: "effort" as const },
  }));
  return estimateRanges(settings, {
    taxa,
    candidates: taxa.map((of) => candidate(of)),
    markers: markers(mainM === undefined ? undefined : horizon(mainM)),
  }).ends;
}

/** A section with uneven effort, counted samples and covered rock, and three taxa found in it. */
const world = fc
  .record({
    efforts: fc.array(fc.integer({ min: 1, max: 9 }), { minLength: TOP_M + 1, maxLength: TOP_M + 1 }),
    finds: fc.array(fc.uniqueArray(fc.integer({ min: 5, max: 33 }), { minLength: 4, maxLength: 9 }), {
      minLength: 3,
      maxLength: 3,
    }),
    counts: fc.array(fc.integer({ min: 1, max: 20 }), { minLength: 9, maxLength: 9 }),
  })
  .map(({ efforts, finds, counts }): World => {
    const place = section({ efforts, intervals: [covered(34.2, 34.8)] });
    return {
      place: {
        ...place,
        searches: place.searches.map((search) => ({ ...search, counting: "count" as const })),
      },
      taxa: finds.map((heights, i) =>
        taxon(
          `Orbula ${["alba", "nigra", "rubra"][i]}`,
          heights.toSorted((a, b) => a - b),
          { counts: counts.slice(0, heights.length) },
        ),
      ),
    };
  });

const turned = <T>(list: readonly T[], isTurned: boolean) => (isTurned ? list.toReversed() : [...list]);

/** The world moved, stretched or turned: every height through one map, samples keeping their names. */
function moved({ place, taxa }: World, to: (heightM: number) => number): World {
  const isTurned = to(1) < to(0);
  const ends = (a: number, b: number) => ({ bottomM: Math.min(to(a), to(b)), topM: Math.max(to(a), to(b)) });
  const stretch = <T extends { readonly baseM: number; readonly topM: number }>(item: T): T => ({
    ...item,
    baseM: Math.min(to(item.baseM), to(item.topM)),
    topM: Math.max(to(item.baseM), to(item.topM)),
  });
  return {
    place: {
      ...place,
      ...ends(place.bottomM, place.topM),
      intervals: place.intervals.map(stretch),
      searches: place.searches.map((search) => ({ ...search, heightM: to(search.heightM) })),
    },
    taxa: taxa.map((of) => {
      const heightsM = turned(of.heightsM.map(to), isTurned);
      return {
        ...of,
        heightsM,
        samples: turned(of.samples, isTurned),
        counts: turned(of.counts ?? [], isTurned),
        lastInclusiveM: heightsM[heightsM.length - 1],
      };
    }),
  };
}

const heightFields = ["pointM", "lowM", "highM", "firstM", "lastM"] as const;

function expectSame(got: readonly RangeEnd[], expected: readonly RangeEnd[], to: (h: number) => number) {
  const isTurned = to(1) < to(0);
  const scale = Math.abs(to(1) - to(0));
  const other = { lowM: "highM", highM: "lowM", firstM: "lastM", lastM: "firstM", pointM: "pointM" } as const;
  const otherEnd = { top: "base", base: "top", both: "both" } as const;
  expect(got.length).toBe(expected.length);
  for (const row of expected) {
    const end = isTurned ? otherEnd[row.end] : row.end;
    const match = got.find((r) => r.taxon === row.taxon && r.method === row.method && r.end === end);
    const where = `${row.method} ${row.end} ${row.taxon}`;
    expect(match?.outcome, where).toBe(row.outcome);
    for (const field of heightFields) {
      const value = match?.[isTurned ? other[field] : field];
      const wanted = row[field] === undefined ? undefined : to(row[field]);
      if (wanted === undefined) expect(value, `${where} ${field}`).toBeUndefined();
      else
        expect(Math.abs((value ?? Number.NaN) - wanted), `${where} ${field}`).toBeLessThan(
          1e-6 * Math.max(scale * 40, Math.abs(wanted)),
        );
    }
  }
}

const upsideDown = (heightM: number) => TOP_M - heightM;
const stretched = (heightM: number) => 3 * heightM + 117;

describe("ends of ranges", () => {
  it("turn with the section: its bases are the tops of the section upside down, by every method", () => {
    fc.assert(
      fc.property(world, (w) => expectSame(rowsOf(moved(w, upsideDown)), rowsOf(w), upsideDown)),
      { numRuns: 12, seed: 7 },
    );
  });

  it("move and stretch with the section", () => {
    fc.assert(
      fc.property(world, (w) => expectSame(rowsOf(moved(w, stretched)), rowsOf(w), stretched)),
      { numRuns: 12, seed: 8 },
    );
  });

  it("do not depend on the order of taxa and searches", () => {
    fc.assert(
      fc.property(world, (w) => {
        const { place, taxa } = w;
        const shuffled = {
          place: { ...place, searches: place.searches.toReversed() },
          taxa: taxa.toReversed(),
        };
        expectSame(rowsOf(shuffled), rowsOf(w), (heightM) => heightM);
      }),
      { numRuns: 6, seed: 9 },
    );
  });
});

const coordinateOf = (shapes: readonly (readonly [number, number, number])[]): Coordinate => {
  let baseM = 0;
  const made = shapes.map(([thickness, atBase, atTop]) => {
    const piece = { baseM, topM: baseM + thickness, atBase, atTop };
    baseM = piece.topM;
    return piece;
  });
  return pieceCoordinate(made, { beyond: 1, below: 0.5, origin: 0 });
};

describe("upside down", () => {
  const pieces = fc.array(
    fc.tuple(fc.integer({ min: 1, max: 9 }), fc.constantFrom(0, 0.5, 2), fc.constantFrom(0, 0.5, 2)),
    { minLength: 1, maxLength: 6 },
  );
  it("twice is as before", () => {
    fc.assert(
      fc.property(pieces, fc.double({ min: -10, max: 70, noNaN: true }), (shapes, heightM) => {
        const plain = coordinateOf(shapes);
        const twice = mirroredCoordinate(mirroredCoordinate(plain));
        const u = plain.toEffective(heightM);
        expect(twice.toEffective(heightM)).toBeCloseTo(u, 12);
        expect(twice.gaps).toEqual(plain.gaps);
        for (const limit of ["upper", "lower"] as const)
          expect(twice.toHeight(u, limit)).toBe(plain.toHeight(u, limit));
        expect(twice.gapAt(u)).toEqual(plain.gapAt(u));
      }),
      { seed: 7 },
    );
    const of = taxon("Orbula vesta", [2, 5, 9], { counts: [1, 2, 3] });
    expect(mirroredTaxon(mirroredTaxon(of))).toEqual(of);
  });

  it("an upper limit in a gap is the lower one of the gap turned over", () => {
    const gap = pieceCoordinate(
      [
        { baseM: 0, topM: 4, atBase: 1, atTop: 1 },
        { baseM: 4, topM: 7, atBase: 0, atTop: 0 },
        { baseM: 7, topM: 9, atBase: 1, atTop: 1 },
      ],
      { beyond: 1, origin: 0 },
    );
    const turned = mirroredCoordinate(gap);
    expect(turned.toHeight(-4, "upper")).toBe(-4);
    expect(turned.toHeight(-4, "lower")).toBe(-7);
  });
});

import { expect, it } from "vitest";
import { hashOf, placeOf } from "../../../../src/app/state/place.ts";

it("an address without a word about the range chart is its default, and says nothing of it", () => {
  const place = placeOf("#ranges");
  expect(place.ranges).toEqual({
    isCompared: false,
    order: "group",
    folded: [],
    page: 1,
    isLeaningShown: true,
  });
  expect(hashOf(place)).toBe("#ranges");
});

it("what a person chose comes back from the address", () => {
  const ranges = {
    isCompared: true,
    method: "declining",
    order: "last",
    folded: ["small & large", "a=b"],
    page: 3,
    taxon: "Aurea cf. prima?",
    isLeaningShown: false,
  } as const;
  const place = { ...placeOf("#ranges?section=cliff"), ranges };
  expect(placeOf(hashOf(place))).toEqual(place);
});

it("a method, order or page that is none is the default", () => {
  const { ranges } = placeOf("#ranges?method=best&order=upwards&page=-2");
  expect([ranges.method, ranges.order, ranges.page]).toEqual([undefined, "group", 1]);
});

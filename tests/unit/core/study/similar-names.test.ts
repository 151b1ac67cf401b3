import { describe, expect, it } from "vitest";
import { similarNames } from "../../../../src/core/study/assembly/similar-names.ts";

const pairOf = (first: string, second: string, byLetter = true) =>
  similarNames([first, second], { byLetter });

describe("names that may be meant as one", () => {
  it.each([
    ["Velorites orskelensis", "velorites Orskelensis"],
    ["Orskel Ledge", "Orskel  ledge"],
    ["Orskel Ledge", "Orskel-Ledge"],
    ["Orskel Ledge", "orskel_ledge"],
    ["OL-31", "OL 31"],
    ["Ørskel Lédge", "Ørskel Ledge"],
  ])("%s and %s are one but for their form", (first, second) => {
    expect(pairOf(first, second, false)).toEqual([{ first, second }]);
  });

  it.each([
    ["Velorites orskelensis", "Velorites orskelensus", "replaced"],
    ["Velorites orskelensis", "Velorites orskelnsis", "lacking"],
    ["Velorites orskelnsis", "Velorites orskelensis", "too many"],
    ["Velorites orskelensis", "Velorides orskelensis", "in the genus"],
    ["ammonoid", "ammonoids", "at the end"],
  ])("%s and %s are one letter apart (%s)", (first, second) => {
    const told = pairOf(first, second).map((pair) => new Set(Object.values(pair)));
    expect(told).toEqual([new Set([first, second])]);
    expect(pairOf(first, second, false)).toEqual([]);
  });

  it.each([
    ["Velorites sp. A", "Velorites sp. B"],
    ["OL-031", "OL-032"],
    ["OL 1-11", "OL 11-1"],
    ["zone VIII", "zone XIII"],
    ["Velorites alta", "Velorites lata"],
    ["Velorites alta", "Selvites alta"],
    ["Core A", "Core B"],
  ])("%s and %s are two", (first, second) => {
    expect(pairOf(first, second)).toEqual([]);
  });

  it("each pair is told once", () => {
    expect(similarNames(["Orvella", "orvella", "Orvela"], { byLetter: true })).toHaveLength(2);
    expect(similarNames(["Orvella", "Orvella"], { byLetter: true })).toEqual([]);
  });

  it("many thousand names are compared", () => {
    const names = Array.from({ length: 6_000 }, (_, at) => `Orvella ${word(at)}`);
    expect(similarNames([...names, `Orvella ${word(7)}s`], { byLetter: true })).toEqual([
      { first: `Orvella ${word(7)}`, second: `Orvella ${word(7)}s` },
    ]);
  });
});

/** Words of which any two differ by two letters or more. */
const word = (at: number): string =>
  Array.from(at.toString(12).padStart(5, "0"), (digit) =>
    "abcdefghijkl"[Number.parseInt(digit, 12)].repeat(2),
  ).join("");

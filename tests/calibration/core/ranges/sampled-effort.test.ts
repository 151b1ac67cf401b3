import { describe, expect, it } from "vitest";
import { exp } from "../../../../src/core/numeric/elementary.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { furthestBarren } from "../../../../src/core/ranges/sampled.ts";
import { furthestOfChances, oddsChances } from "../../../../src/core/ranges/sampled-odds.ts";
import { expectRateAtLeast, rateOf } from "./simulated-finds.ts";

/** Efforts of horizon i, far beyond the true end: what the bound may count up to. */
const efforts: Readonly<Record<string, (i: number) => number>> = {
  alternating: (i) => [1, 4, 2, 0.5][i % 4],
  "smaller upward": (i) => 4 * exp(-i / 12),
  "larger upward": (i) => 0.4 * exp(i / 20),
};
const BEYOND = 200;

interface Design {
  readonly inside: number;
  readonly effort: (i: number) => number;
  readonly detection: (effort: number) => number;
}

const byOdds = (factor: number) => (effort: number) => (factor * effort) / (1 + factor * effort);
const byRate = (factor: number) => (effort: number) => 1 - exp(-factor * effort);

/** Mode first: finds among the horizons above the first find, and whether the bound reaches the true end. */
function covers({ inside, effort, detection }: Design, takenAs: "effort" | "equal") {
  return (g: Generator) => {
    const presence = Array.from({ length: inside }, (_, i) => g.uniform() < detection(effort(i)));
    const first = presence.indexOf(true);
    const last = presence.lastIndexOf(true);
    if (last <= first) return undefined;
    const finds = presence.filter(Boolean).length - 1;
    const barren = inside - 1 - last;
    if (takenAs === "equal")
      return barren <= furthestBarren({ inRange: last - first, finds, barrenAbove: BEYOND }, 0.95);
    const odds = Array.from({ length: inside + BEYOND }, (_, i) => effort(i));
    const chances = oddsChances({
      inRange: odds.slice(first + 1, last + 1),
      finds,
      above: odds.slice(last + 1, last + 1 + barren + 1),
    });
    return barren <= furthestOfChances(chances, 0.95);
  };
}

describe.each(Object.entries(efforts))("sampled, efforts %s", (_, effort) => {
  it.each([
    [12, 0.15],
    [20, 0.3],
    [40, 0.3],
    [40, 1],
  ])("%i horizons, odds %f of the effort: covers at least its level", (inside, factor) => {
    expectRateAtLeast(rateOf(covers({ inside, effort, detection: byOdds(factor) }, "effort")), 0.95);
  });

  it.each([20, 40])(
    "%i horizons, finds by a rate of effort: covers its level where they are few",
    (inside) => {
      expectRateAtLeast(rateOf(covers({ inside, effort, detection: byRate(0.15) }, "effort")), 0.95);
    },
  );
});

it("sampled: efforts that fall upward, taken as equal, are not covered", () => {
  const design = { inside: 40, effort: efforts["smaller upward"], detection: byOdds(0.5) };
  const rate = rateOf(covers(design, "equal"));
  expect(rate.hits / rate.trials).toBeLessThan(0.9);
});

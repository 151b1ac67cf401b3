import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { pieceCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import type { EffectiveRange } from "../../../../src/core/ranges/pivot.ts";
import { barrenChances, countSampled, furthestBarren } from "../../../../src/core/ranges/sampled.ts";
import {
  extensionFactor,
  twoEndedFactor,
  uniformBound,
  uniformPoint,
} from "../../../../src/core/ranges/uniform.ts";
import { persistence } from "../../../../src/core/ranges/window.ts";

interface Inputs {
  readonly n: number;
  readonly N: number;
  readonly M: number;
  readonly C: number;
  readonly R: number;
  readonly exponent: number;
  readonly tn: number;
  readonly T: number;
  readonly segments: readonly (readonly [number, number, number, number])[];
  readonly h: readonly number[];
  readonly at: readonly number[];
  readonly u: readonly number[];
  readonly presence: readonly number[];
  readonly mode: "first" | "base";
}

const coordinateOf = ({ segments }: Inputs) =>
  pieceCoordinate(
    segments.map(([baseM, topM, atBase, atTop]) => ({ baseM, topM, atBase, atTop })),
    { beyond: 0, origin: 0 },
  );
const fromZero = (last: number, exponent: number): EffectiveRange => ({ base: 0, last, exponent });

function weightedLimit(inputs: Inputs) {
  const coordinate = coordinateOf(inputs);
  const levels = inputs.h.map(coordinate.toEffective);
  const range = { base: levels[0], last: levels[levels.length - 1], exponent: levels.length - 1 };
  const u_upper = uniformBound(range, inputs.C) ?? Number.NaN;
  const upper = coordinate.toHeight(u_upper, "upper") ?? null;
  const gap = coordinate.gapAt(u_upper);
  return { u_first: range.base, u_last: range.last, u_upper, upper, gap: gap && [gap.baseM, gap.topM] };
}

function count({ presence, mode }: Inputs) {
  const counted = countSampled(
    presence.map((value) => value === 1),
    mode,
  );
  if (counted === undefined) throw new Error("a presence list without a find");
  return {
    N: counted.inRange,
    n: counted.finds,
    M: counted.barrenAbove,
    p: [...barrenChances(counted)],
    J: furthestBarren(counted, 0.95),
  };
}

const quantities: Record<string, (inputs: Inputs) => unknown> = {
  "T/R": ({ n, C }) => 1 + extensionFactor(C, n - 1),
  "extension in % of R": ({ n, C }) => 100 * extensionFactor(C, n - 1),
  "one-ended": ({ exponent, C }) => extensionFactor(C, exponent),
  "two-ended": ({ n, C }) => twoEndedFactor(C, n),
  point: ({ n, R }) => (uniformPoint(fromZero(R, n - 1)) ?? Number.NaN) - R,
  persistence: ({ n, tn, T }) => persistence(fromZero(tn, n), T)?.p,
  evidence: ({ n, tn, T }) => persistence(fromZero(tn, n), T)?.evidenceRatio,
  "window-bound": ({ n, tn, C }) => uniformBound(fromZero(tn, n), C),
  "weighted-limit": weightedLimit,
  "at-gap": weightedLimit,
  effective: (inputs) => inputs.at.map(coordinateOf(inputs).toEffective),
  inverse: (inputs) => inputs.u.map((u) => coordinateOf(inputs).toHeight(u, "upper")),
  "barren-chances": ({ N, n, M }) => [...barrenChances({ inRange: N, finds: n, barrenAbove: M })],
  furthest: ({ N, n, C }) =>
    furthestBarren({ inRange: N, finds: n, barrenAbove: Number.POSITIVE_INFINITY }, C),
  count,
};

interface Case {
  readonly case: string;
  readonly quantity: string;
  readonly inputs: Inputs;
  readonly expected: unknown;
  readonly tolerance: number;
}

const cases: readonly Case[] = JSON.parse(readFileSync(new URL("./ranges.json", import.meta.url), "utf8"));

/** Every number of `expected` is met within tolerance x max(1, |expected|); null is met by null or undefined alone. */
function expectClose(got: unknown, expected: unknown, tolerance: number): void {
  if (expected === null) expect(got ?? null).toBeNull();
  else if (typeof expected === "number") {
    expect(got).toBeTypeOf("number");
    expect(Math.abs(Number(got) - expected)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(expected)));
  } else
    for (const [key, value] of Object.entries(Object(expected)))
      expectClose(new Map(Object.entries(Object(got))).get(key), value, tolerance);
}

describe("range ends against outside values (sources in ranges.json)", () => {
  it.each(cases)("$quantity: $case", ({ quantity, inputs, expected, tolerance }) => {
    const compute = quantities[quantity];
    expect(compute).toBeDefined();
    expectClose(compute(inputs), expected, tolerance);
  });
});

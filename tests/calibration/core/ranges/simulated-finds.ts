import { expect } from "vitest";
import { forEachReplicate, type Generator } from "../../../../src/core/numeric/streams.ts";
import {
  type Coordinate,
  recoveryCoordinate,
  uniformCoordinate,
} from "../../../../src/core/ranges/coordinate.ts";
import type { PlacedRange } from "../../../../src/core/timing/duration.ts";

/** CALIBRATION=full runs the sizes that a release is judged by. */
export const isFull = process.env.CALIBRATION === "full";
export const replicates = isFull ? 100_000 : 4_000;

export const seed = 20260;

/** Standard errors by which a rate may miss its nominal value, for fixed seeds. */
const ALLOWED_ERRORS = 3;

export interface Rate {
  readonly hits: number;
  readonly trials: number;
}

/** Share of replicates in which something holds; replicates that answer undefined are left out. */
export function rateOf(
  trial: (generator: Generator) => boolean | undefined,
  options: { readonly seed?: number; readonly replicates?: number } = {},
): Rate {
  let hits = 0;
  let trials = 0;
  const settings = { seed: options.seed ?? seed, stream: "extinctionTiming" as const };
  forEachReplicate(options.replicates ?? replicates, settings, (_, generator) => {
    const isHit = trial(generator);
    if (isHit === undefined) return;
    trials++;
    if (isHit) hits++;
  });
  return { hits, trials };
}

export function expectRate({ hits, trials }: Rate, nominal: number): void {
  const error = Math.sqrt((nominal * (1 - nominal)) / trials);
  expect(Math.abs(hits / trials - nominal)).toBeLessThanOrEqual(ALLOWED_ERRORS * error);
}

export function expectRateAtLeast({ hits, trials }: Rate, nominal: number): void {
  const error = Math.sqrt((nominal * (1 - nominal)) / trials);
  expect(hits / trials).toBeGreaterThanOrEqual(nominal - ALLOWED_ERRORS * error);
}

export function expectRateAtMost({ hits, trials }: Rate, nominal: number): void {
  const error = Math.sqrt((nominal * (1 - nominal)) / trials);
  expect(hits / trials).toBeLessThanOrEqual(nominal + ALLOWED_ERRORS * error);
}

/** Rock with a covered stretch between 18 and 24 m. */
export const withCover: Coordinate = recoveryCoordinate({
  intervals: [{ kind: "covered", baseM: 18, topM: 24, notes: "", origin: { file: "intervals.csv", row: 2 } }],
});

export const rocks: readonly { readonly name: string; readonly coordinate: Coordinate }[] = [
  { name: "rock searched throughout", coordinate: uniformCoordinate },
  { name: "a covered interval inside", coordinate: withCover },
];

export interface Truth {
  readonly baseM: number;
  readonly endM: number;
  readonly horizons: number;
}

/** Heights of finds, uniform over the rock of the true range that could be searched, from below upward. */
export function drawFinds({ baseM, endM, horizons }: Truth, coordinate: Coordinate, g: Generator): number[] {
  const base = coordinate.toEffective(baseM);
  const end = coordinate.toEffective(endM);
  return Array.from({ length: horizons }, () => {
    const heightM = coordinate.toHeight(base + (end - base) * g.uniform(), "upper");
    if (heightM === undefined) throw new Error("drawFinds: expected recovery to continue");
    return heightM;
  }).toSorted((a, b) => a - b);
}

/** The range as the methods see it, from the first find or from the true base. */
export function rangeOf(
  heightsM: readonly number[],
  coordinate: Coordinate,
  knownBaseM?: number,
): PlacedRange {
  const lastM = heightsM[heightsM.length - 1];
  return {
    base: coordinate.toEffective(knownBaseM ?? heightsM[0]),
    last: coordinate.toEffective(lastM),
    lastM,
    exponent: heightsM.length - (knownBaseM === undefined ? 1 : 0),
  };
}

export const bases = ["first find as base", "base known"] as const;

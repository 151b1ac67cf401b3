import { blockGenerator } from "../../../src/core/numeric/streams.ts";

export type Draws = ReturnType<typeof blockGenerator>;

const purposes = ["beds", "sampling", "geochemistry", "searching", "fossils", "naming", "dating"] as const;
export type Purpose = (typeof purposes)[number];

/** One block of the example's stream for each section and purpose, so that one can change without the others. */
export const drawsFor = (seed: number, sectionIndex: number, purpose: Purpose): Draws =>
  blockGenerator(seed, "example", sectionIndex * 16 + purposes.indexOf(purpose));

export const between = (draws: Draws, low: number, high: number): number =>
  low + (high - low) * draws.uniform();

export function pick<T>(draws: Draws, items: readonly T[]): T {
  const item = items[Math.min(items.length - 1, Math.floor(draws.uniform() * items.length))];
  if (item === undefined) throw new RangeError("pick: expected at least one item, got none");
  return item;
}

/** Number of events of a Poisson process of unit rate before `mean`. */
export function poisson(draws: Draws, mean: number): number {
  let count = 0;
  for (let passed = draws.exponential(); passed < mean; passed += draws.exponential()) count += 1;
  return count;
}

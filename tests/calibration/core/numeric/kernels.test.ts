import { expect, it } from "vitest";
import { chiSquareUpperTail } from "../../../../src/core/numeric/chi-square.ts";
import { expm1 } from "../../../../src/core/numeric/elementary.ts";
import { kernels } from "../../../../src/core/numeric/kernels.ts";

const BLOCKS = process.env.CALIBRATION === "full" ? 2_000 : 100;
const REPLICATES = 1024;

/** sqrt(n) D beyond this has a chance under 0.001 (Kolmogorov's limit law). */
const LARGEST = 1.95;

/** sqrt(n) times the largest distance of the values' distribution from uniform. */
function distance(values: Float64Array): number {
  const ordered = values.toSorted();
  const n = ordered.length;
  const largest = ordered.reduce((d, p, i) => Math.max(d, p - i / n, (i + 1) / n - p), 0);
  return Math.sqrt(n) * largest;
}

const inBlocks = (draw: (block: number) => Float64Array): Float64Array =>
  Float64Array.from(Array.from({ length: BLOCKS }, (_, block) => [...draw(block)]).flat());

const place = (block: number) => ({ seed: 5, stream: "extinctionTiming", block }) as const;

it("exponentials of the ziggurat follow 1 - e^-x", () => {
  const drawn = inBlocks((block) => kernels.exponentials(place(block), REPLICATES));
  expect(distance(drawn.map((x) => -expm1(-x)))).toBeLessThan(LARGEST);
  expect(Math.max(...drawn)).toBeGreaterThan(8); // the tail beyond the lowest rectangle is drawn too
});

it.each([
  [[2, 2]],
  [[9, 4, 1]],
  [[24, 20, 16, 12, 9, 7, 5, 4]],
  [Array.from({ length: 40 }, (_, i) => 1 + i)],
])("twice the simulated statistic is chi-square with 2 (k - 1) degrees of freedom, m = %j", (m) => {
  const half = inBlocks((block) =>
    kernels.commonEndStatistics(place(block), Float64Array.from(m), REPLICATES),
  );
  const p = half.map((t) => chiSquareUpperTail(Math.max(0, 2 * t), 2 * (m.length - 1)));
  expect(distance(p)).toBeLessThan(LARGEST);
});

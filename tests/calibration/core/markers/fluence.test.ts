import { expect, it } from "vitest";
import { type FluenceCell, integratedExcess } from "../../../../src/core/markers/fluence.ts";
import { simulateFluence } from "../../../../src/core/markers/fluence-simulation.ts";
import { blockGenerator, type Generator } from "../../../../src/core/numeric/streams.ts";
import { binomialBounds, isFull } from "./simulated-profiles.ts";

const trials = isFull ? 5000 : 300;
const replicates = isFull ? 4000 : 600;
const background = { mean: 0.035, sigma: 0.006 };
const errors = { densitySigma: 0.08, densityCommonSigma: 0.12, boundarySigmaCm: 0.15 };

interface Truth {
  readonly edgesCm: readonly number[];
  readonly values: readonly number[];
  readonly densities: readonly number[];
}

function truthOf(cells: number, generator: Generator): Truth {
  const edgesCm = [0];
  for (let i = 0; i < cells; i++) edgesCm.push(edgesCm[i] + 1 + 3 * generator.uniform());
  const values = Array.from({ length: cells }, (_, i) => (i === 0 ? 0.035 : 4 * Math.exp(-i / 2) + 0.035));
  return { edgesCm, values, densities: values.map(() => 2 + 0.4 * generator.uniform()) };
}

const cellsOf = ({ edgesCm, values, densities }: Truth): readonly FluenceCell[] =>
  values.map((value, i) => ({
    ...errors,
    baseCm: edgesCm[i],
    topCm: edgesCm[i + 1],
    value,
    sigma: Math.hypot(0.06 * value, 0.004),
    density: densities[i],
  }));

/** What a laboratory and a tape would report of the truth. */
function observe(truth: Truth, generator: Generator): readonly FluenceCell[] {
  const common = errors.densityCommonSigma * generator.normal();
  return cellsOf({
    edgesCm: truth.edgesCm.map((edge) => edge + errors.boundarySigmaCm * generator.normal()),
    values: truth.values.map((v) => Math.max(0.001, v + Math.hypot(0.06 * v, 0.004) * generator.normal())),
    densities: truth.densities.map((d) => d + common + errors.densitySigma * generator.normal()),
  });
}

it.each([
  [4, 0.95],
  [8, 0.95],
  [8, 0.68],
])("the fluence interval of %i samples covers the true fluence at %f", (count, level) => {
  let covered = 0;
  for (let trial = 0; trial < trials; trial++) {
    const generator = blockGenerator(31 + count, "sampling", trial);
    const truth = truthOf(count, generator);
    const exact = { cells: cellsOf(truth), background, calibration: 0 };
    const { value } = integratedExcess(exact);
    const gain = 1 + 0.03 * generator.normal();
    const observed = observe(truth, generator).map((cell) => ({ ...cell, value: cell.value * gain }));
    const mean = background.mean + background.sigma * generator.normal();
    const input = { cells: observed, background: { ...background, mean }, calibration: 0.03 };
    const { low, high } = simulateFluence(input, { replicates, seed: trial, level });
    if (low <= value && value <= high) covered++;
  }
  const { low, high } = binomialBounds(level, trials);
  expect(covered).toBeGreaterThanOrEqual(low);
  expect(covered).toBeLessThanOrEqual(high);
});

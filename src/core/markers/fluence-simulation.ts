import { exp, log1p } from "../numeric/elementary.ts";
import { forEachReplicate, type Generator } from "../numeric/streams.ts";
import { effectiveWidths, type FluenceCell, type FluenceInput } from "./fluence.ts";

export interface SimulatedFluence {
  readonly mean: number;
  readonly sd: number;
  readonly median: number;
  readonly low68: number;
  readonly high68: number;
  readonly low95: number;
  readonly high95: number;
  /** At the level asked for. */
  readonly low: number;
  readonly high: number;
  readonly replicates: number;
  readonly seed: number;
}

interface SimulationOptions {
  readonly replicates: number;
  readonly seed: number;
  readonly level: number;
}

const sameCm = 1e-7;

/**
 * Distribution of the fluence (ng/cm2) under all its errors: C lognormal with its mean preserved
 * (`C exp(s e - s^2/2)`, `s^2 = ln(1 + (sigma/C)^2)`), densities normal and positive, background and positions
 * normal, edges in order; common errors drawn once a replicate, the calibration factor on the whole excess. Stream
 * `markerMonteCarlo`, blocks of 1,024 replicates: the same seed gives the same bits.
 */
export function simulateFluence(
  input: FluenceInput,
  { replicates, seed, level }: SimulationOptions,
): SimulatedFluence {
  const draw = fluenceDraw(input);
  const draws = new Float64Array(replicates);
  forEachReplicate(replicates, { seed, stream: "markerMonteCarlo" }, (replicate, generator) => {
    draws[replicate] = draw(generator);
  });
  const mean = draws.reduce((a, v) => a + v, 0) / replicates;
  const squares = draws.reduce((a, v) => a + (v - mean) ** 2, 0);
  const sorted = draws.toSorted();
  const at = (p: number) => quantileOfSorted(sorted, p);
  return {
    mean,
    sd: Math.sqrt(squares / Math.max(1, replicates - 1)),
    median: at(0.5),
    low68: at(0.16),
    high68: at(0.84),
    low95: at(0.025),
    high95: at(0.975),
    low: at((1 - level) / 2),
    high: at((1 + level) / 2),
    replicates,
    seed,
  };
}

function fluenceDraw({ cells, background, calibration }: FluenceInput): (generator: Generator) => number {
  const logSds = cells.map(({ value, sigma }) => Math.sqrt(log1p((sigma / value) ** 2)));
  const hasEdgeErrors = cells.some((cell) => cell.boundarySigmaCm > 0);
  const fixedWidths = effectiveWidths(cells);
  return (generator) => {
    const level = background.mean + background.sigma * generator.normal();
    const commonDensity = generator.normal();
    const gain = 1 + calibration * generator.normal();
    const widths = hasEdgeErrors ? effectiveWidths(moveEdges(cells, generator)) : fixedWidths;
    let total = 0;
    for (let i = 0; i < cells.length; i++) {
      const s = logSds[i];
      const value = cells[i].value * exp(s * generator.normal() - (s * s) / 2);
      total += (value - level) * drawDensity(cells[i], commonDensity, generator) * widths[i];
    }
    return total * gain;
  };
}

function drawDensity(cell: FluenceCell, common: number, generator: Generator): number {
  const centre = cell.density + cell.densityCommonSigma * common;
  if (cell.densitySigma === 0) return centre > 0 ? centre : cell.density;
  for (let attempt = 0; attempt < 1000; attempt++) {
    const density = centre + cell.densitySigma * generator.normal();
    if (density > 0) return density;
  }
  return cell.density;
}

interface Edges {
  baseCm: number;
  topCm: number;
}

/** Edges that touch move together; none passes its lower neighbour. */
function moveEdges(cells: readonly FluenceCell[], generator: Generator): readonly Edges[] {
  const moved: Edges[] = [];
  cells.forEach((cell, i) => {
    const previous = moved[i - 1];
    const isTouching = i > 0 && Math.abs(cell.baseCm - cells[i - 1].topCm) <= sameCm;
    const floor = previous?.topCm ?? Number.NEGATIVE_INFINITY;
    const shifted = (edge: number, lowest: number) =>
      Math.max(lowest, edge + cell.boundarySigmaCm * generator.normal());
    if (cell.topCm - cell.baseCm <= sameCm) {
      const point = shifted(cell.baseCm, floor);
      moved.push({ baseCm: point, topCm: point });
      return;
    }
    const baseCm = isTouching && previous !== undefined ? previous.topCm : shifted(cell.baseCm, floor);
    moved.push({ baseCm, topCm: shifted(cell.topCm, baseCm) });
  });
  return moved;
}

function quantileOfSorted(sorted: Float64Array, p: number): number {
  const at = p * (sorted.length - 1);
  const below = Math.floor(at);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below] + (at - below) * (sorted[above] - sorted[below]);
}

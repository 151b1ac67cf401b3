import { boxSlabMean } from "../../../../src/core/markers/mixing.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import type { HandMadeSample } from "../../../unit/core/markers/hand-made-section.ts";

export const isFull = process.env.CALIBRATION === "full";

export interface SmearTruth {
  readonly surfaceM: number;
  readonly lengthCm: number;
  readonly fluence: number;
}

export interface Laboratory {
  readonly relative: number;
  readonly floor: number;
  readonly detectionLimit: number;
}

export const density = 2.2;
const backgroundLevel = 0.03;
const backgroundLogSd = 0.12;

/** Iridium of slabs (edges in m) under box mixing: lognormal background, measurement error, a detection limit. */
export function simulateProfile(
  slabs: readonly (readonly [number, number])[],
  { truth, laboratory }: { truth: SmearTruth; laboratory: Laboratory },
  generator: Generator,
): readonly HandMadeSample[] {
  const mixing = { baseCm: 100 * truth.surfaceM - truth.lengthCm, lengthCm: truth.lengthCm };
  return slabs.map(([baseM, topM]) => {
    const slab = { baseCm: 100 * baseM, topCm: 100 * topM };
    const excess = (truth.fluence / density) * boxSlabMean(slab, mixing);
    const level = backgroundLevel * 10 ** (backgroundLogSd * generator.normal()) + excess;
    const sd = Math.hypot(laboratory.relative * level, laboratory.floor);
    const value = level + sd * generator.normal();
    const { detectionLimit } = laboratory;
    const isBelow = value < detectionLimit;
    const sigma = Math.hypot(laboratory.relative * value, laboratory.floor);
    return {
      baseM,
      topM,
      value: isBelow ? -detectionLimit : value,
      detectionLimit,
      ...(isBelow ? {} : { sigma }),
    };
  });
}

/** Even slabs over a stretch. */
export function evenSlabs(
  fromM: number,
  toM: number,
  thicknessM: number,
): readonly (readonly [number, number])[] {
  const count = Math.round((toM - fromM) / thicknessM);
  return Array.from(
    { length: count },
    (_, i) => [fromM + i * thicknessM, fromM + (i + 1) * thicknessM] as const,
  );
}

/** Slabs of uneven thickness, some with a gap above. */
export function unevenSlabs(
  { fromM, toM }: { fromM: number; toM: number },
  { thinnestM, thickestM, gapShare }: { thinnestM: number; thickestM: number; gapShare: number },
  generator: Generator,
): readonly (readonly [number, number])[] {
  const slabs: (readonly [number, number])[] = [];
  let base = fromM;
  while (base < toM) {
    const top = base + thinnestM + (thickestM - thinnestM) * generator.uniform();
    slabs.push([base, top]);
    base = generator.uniform() < gapShare ? top + (thickestM - thinnestM) * generator.uniform() : top;
  }
  return slabs;
}

/** Background samples 5 cm thick at uneven distances of about half a metre. */
export function farSlabs(
  fromM: number,
  toM: number,
  generator: Generator,
): readonly (readonly [number, number])[] {
  const slabs: (readonly [number, number])[] = [];
  for (let base = fromM; base + 0.05 < toM; base += 0.3 + 0.4 * generator.uniform())
    slabs.push([base, base + 0.05]);
  return slabs;
}

/** Counts that a binomial with this chance leaves with probability about 0.001 on each side. */
export function binomialBounds(chance: number, trials: number): { low: number; high: number } {
  const spread = 3.1 * Math.sqrt(trials * chance * (1 - chance)) + 1;
  return { low: trials * chance - spread, high: trials * chance + spread };
}

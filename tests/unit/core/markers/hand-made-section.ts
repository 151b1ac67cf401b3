import type { Measurement, Section, Study } from "../../../../src/core/study/model.ts";
import { defaultSettings, type Settings } from "../../../../src/core/study/settings.ts";

const origin = { file: "measurements.csv", row: 2 };

export interface HandMadeSample {
  readonly baseM: number;
  readonly topM: number;
  /** ng/g; a negative value means "below its absolute value". */
  readonly value: number;
  readonly sigma?: number;
  readonly detectionLimit?: number;
  readonly densityGCm3?: number;
}

export function measurementsOf(analyte: string, samples: readonly HandMadeSample[]): readonly Measurement[] {
  return samples.map(({ baseM, topM, value, sigma, detectionLimit, densityGCm3 }, i) => ({
    analyte,
    quantity: "mass-fraction",
    sample: `S-${i + 1}`,
    baseM,
    topM,
    heightM: (baseM + topM) / 2,
    reading: value < 0 ? { kind: "below", limit: -value } : { kind: "value", value },
    unit: "ng/g",
    givenValue: String(value),
    givenUnit: "ng/g",
    ...(sigma === undefined ? {} : { sigma }),
    ...(detectionLimit === undefined ? {} : { detectionLimit }),
    ...(densityGCm3 === undefined ? {} : { densityGCm3 }),
    origin,
  }));
}

export function handMadeSection(part: Partial<Section> = {}): Section {
  return {
    name: "Orskel Ledge",
    title: "Orskel Ledge",
    axis: "height",
    unit: "m",
    datum: "base of the ledge",
    bottomM: 0,
    topM: 20,
    densityGCm3: 2.2,
    source: "",
    legs: [],
    intervals: [],
    beds: [],
    samples: [],
    searches: [],
    occurrences: [],
    publishedRanges: [],
    measurements: [],
    horizons: [],
    recovery: [],
    ...part,
  };
}

export function handMadeStudy(sections: readonly Section[], settings: Partial<Settings> = {}): Study {
  return {
    name: "Veyra basin",
    settings: { ...defaultSettings, replicates: 500, ...settings },
    sections,
    taxa: new Map(),
    choices: [],
    claims: [],
    problems: [],
    sheets: [],
    files: [],
  };
}

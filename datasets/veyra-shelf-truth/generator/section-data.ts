import { type ExampleBed, exampleBeds } from "./beds.ts";
import { drawsFor } from "./draws.ts";
import { type ExampleFind, type ExampleSearch, exampleFinds, exampleSearches } from "./fossils.ts";
import { type ExampleMeasurement, exampleMeasurements } from "./geochemistry.ts";
import { type ExampleSample, exampleSamples } from "./sampling.ts";
import type { TrueSection, Truth } from "./truth.ts";

/** Everything that one section yielded, in its own upward scale. */
export interface SectionData {
  readonly index: number;
  readonly section: TrueSection;
  readonly beds: readonly ExampleBed[];
  readonly samples: readonly ExampleSample[];
  readonly searches: readonly ExampleSearch[];
  readonly finds: readonly ExampleFind[];
  readonly measurements: readonly ExampleMeasurement[];
}

export function sectionData(truth: Truth, section: TrueSection, index: number): SectionData {
  const draws = (purpose: Parameters<typeof drawsFor>[2]) => drawsFor(truth.seed, index, purpose);
  const beds = exampleBeds(truth, section, draws("beds"));
  const samples = exampleSamples(section, beds, draws("sampling"));
  const searches = exampleSearches(truth, section, { samples, draws: draws("searching") });
  const finds = exampleFinds({ truth, section, searches, draws: draws("fossils") });
  const measurements = exampleMeasurements({ truth, section, samples, draws: draws("geochemistry") });
  return { index, section, beds, samples, searches, finds, measurements };
}

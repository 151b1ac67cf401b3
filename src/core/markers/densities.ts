import type { Basis } from "../basis.ts";
import type { Bed, Measurement, Section } from "../study/model.ts";

/** Dry bulk density of one sample with one standard deviation, g/cm3. A stated density is taken as exact. */
export interface Density {
  readonly value: number;
  readonly sigma: number;
  readonly isAssumed: boolean;
}

interface LithologyDensity {
  readonly words: readonly string[];
  readonly value: number;
  readonly sigma: number;
}

/** Handbook-type ranges (from memory, mean and one standard deviation, g/cm3); always shown as assumed. */
const lithologyDensities: readonly LithologyDensity[] = [
  { words: ["limestone", "wackestone", "packstone", "grainstone", "micrite"], value: 2.55, sigma: 0.12 },
  { words: ["chalk"], value: 2.0, sigma: 0.2 },
  { words: ["marl", "marlstone"], value: 2.3, sigma: 0.15 },
  { words: ["claystone", "shale", "mudstone", "siltstone"], value: 2.3, sigma: 0.15 },
  { words: ["clay"], value: 1.9, sigma: 0.2 },
  { words: ["sandstone"], value: 2.3, sigma: 0.15 },
  { words: ["dolomite", "dolostone"], value: 2.7, sigma: 0.1 },
  { words: ["ash", "tuff", "bentonite"], value: 1.9, sigma: 0.25 },
  { words: ["chert"], value: 2.5, sigma: 0.1 },
  { words: ["coal", "lignite"], value: 1.3, sigma: 0.1 },
];

/** Where no lithology is logged, or none that is known: the middle of the sedimentary rocks above, widened. */
const unknownLithology: Density = { value: 2.3, sigma: 0.25, isAssumed: true };

export const densityBasis: Basis = {
  method: "dry-bulk-density",
  statement:
    "Dry bulk density of each sample: the measurement's, else the sample's, else the section's, else a default by the lithology of its bed.",
  assumptions: [
    "stated densities are dry, of the state in which the thickness was measured, and exact",
    "defaults are handbook-type ranges from memory; their error is common to the whole profile",
  ],
  sources: [],
  after: true,
};

/**
 * Dry bulk density (g/cm3) that belongs to a measurement: its own, else its sample's, else its section's, else the
 * default of the lithology logged there (`isAssumed`).
 */
export function densityOf(measurement: Measurement, section: Section): Density {
  const sample = section.samples.find((s) => s.name === measurement.sample);
  const stated = measurement.densityGCm3 ?? sample?.densityGCm3 ?? section.densityGCm3;
  if (stated !== undefined) return { value: stated, sigma: 0, isAssumed: false };
  const bed = bedAt(section.beds, measurement.heightM);
  return bed === undefined ? unknownLithology : densityOfLithology(bed.lithology);
}

/** The default for a lithology as written: the last known word names the rock ("marly limestone" is a limestone). */
export function densityOfLithology(lithology: string): Density {
  const text = lithology.toLowerCase();
  const found = lithologyDensities
    .flatMap((entry) => entry.words.map((word) => ({ entry, word, at: text.lastIndexOf(word) })))
    .filter(({ at }) => at >= 0)
    .toSorted((a, b) => b.at - a.at || b.word.length - a.word.length);
  if (found.length === 0) return unknownLithology;
  return { value: found[0].entry.value, sigma: found[0].entry.sigma, isAssumed: true };
}

/** The bed at a height; at a contact the upper one, since a sample is named by what it rests in. */
export function bedAt(beds: readonly Bed[], heightM: number): Bed | undefined {
  const holding = beds.filter((bed) => bed.baseM <= heightM && heightM <= bed.topM);
  return holding.find((bed) => heightM < bed.topM) ?? holding[0];
}

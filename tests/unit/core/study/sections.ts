import type { Occurrence, Sample, Search, Section, Study, Taxon } from "../../../../src/core/study/model.ts";
import { defaultSettings, type Settings } from "../../../../src/core/study/settings.ts";

const origin = (row: number) => ({ file: "occurrences.csv", row });

export const sampleAt = (name: string, heightM: number): Sample => ({
  name,
  baseM: heightM,
  topM: heightM,
  heightM,
  notes: "",
  origin: { file: "samples.csv", row: 2 },
});

export const find = (taxon: string, heightM: number, more: Partial<Occurrence> = {}): Occurrence => ({
  verbatim: taxon,
  taxon,
  heightM,
  reworked: "no",
  doubtful: false,
  origin: origin(2 + Math.round(heightM * 100)),
  ...more,
});

export const searchOf = (sample: Sample, group: string): Search => ({
  sample: sample.name,
  group,
  heightM: sample.heightM,
  counting: "presence",
  derived: false,
});

export const sectionWith = (more: Partial<Section>): Section => ({
  name: "orskel-ledge",
  title: "Orskel Ledge",
  axis: "height",
  unit: "m",
  datum: "base of the ledge",
  bottomM: 0,
  topM: 20,
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
  ...more,
});

export const studyOf = (
  section: Section,
  { taxa = [], settings = defaultSettings }: { taxa?: readonly Taxon[]; settings?: Settings } = {},
): Study => ({
  name: "trial",
  settings,
  sections: [section],
  taxa: new Map(taxa.map((taxon) => [taxon.name, taxon])),
  choices: [],
  claims: [],
  problems: [],
  sheets: [],
  files: [],
});

export const taxonOf = (name: string, group: string, more: Partial<Taxon> = {}): Taxon => ({
  name,
  group,
  traits: {},
  notes: "",
  origin: { file: "taxa.csv", row: 2 },
  ...more,
});

export const withTaxa = (change: Partial<Settings["taxa"]>): Settings => ({
  ...defaultSettings,
  taxa: { ...defaultSettings.taxa, ...change },
});

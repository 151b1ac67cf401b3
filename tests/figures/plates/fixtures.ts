import type { Analysis } from "../../../src/core/analysis-result.ts";
import type { MarkerHorizon, Profile } from "../../../src/core/markers/result.ts";
import type { Candidate, Find, LocalTaxon, Role } from "../../../src/core/study/finds-result.ts";
import type {
  Bed,
  GivenHorizon,
  Measurement,
  Sample,
  Search,
  Section,
  Taxon,
} from "../../../src/core/study/model.ts";
import { defaultSettings } from "../../../src/core/study/settings.ts";
import type {
  Influence,
  LastFindsPoint,
  ScenarioDensity,
  Timing,
  TimingAnswer,
} from "../../../src/core/timing/result.ts";

const origin = { file: "made.csv", row: 2 };

export function section(name: string, parts: Partial<Section> = {}): Section {
  return {
    name,
    title: name,
    axis: "height",
    unit: "m",
    datum: "",
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
    ...parts,
  };
}

/** An assemblage that nothing was asked of. */
const noTiming: Timing = {
  sets: [],
  answers: [],
  curves: [],
  scenarios: [],
  offsets: [],
  membership: [],
  densities: [],
  leftOut: [],
  lastFinds: [],
  influence: [],
  distrusted: [],
  cautions: [],
  basis: [],
};

/** A study of these sections with nothing found, aligned or asked. */
export function analysisOf(sections: readonly Section[], parts: Partial<Analysis> = {}): Analysis {
  return {
    study: {
      name: "made study",
      settings: defaultSettings,
      sections,
      taxa: new Map(),
      choices: [],
      claims: [],
      problems: [],
      sheets: [],
      files: [],
    },
    markers: {
      horizons: [],
      profiles: [],
      flags: [],
      main: { settledBy: "none", isShared: false, bySection: new Map() },
      cautions: [],
      basis: [],
    },
    alignment: { horizons: [], beyond: "rigid", sections: [], ties: [], cautions: [], basis: [] },
    finds: [],
    taxa: [],
    candidates: [],
    ranges: { ends: [], tapers: [], baseTapers: [], leanings: [], cautions: [], basis: [] },
    timing: noTiming,
    ...parts,
  };
}

export function bed(baseM: number, topM: number, lithology: string, parts: Partial<Bed> = {}): Bed {
  return { baseM, topM, lithology, notes: "", origin, ...parts };
}

export function sample(name: string, heightM: number): Sample {
  return { name, baseM: heightM - 0.05, topM: heightM + 0.05, heightM, notes: "", origin };
}

export function search(of: Sample, group: string): Search {
  return { sample: of.name, group, heightM: of.heightM, counting: "presence", derived: false };
}

export function measured(
  analyte: string,
  heightM: number,
  value: number,
  parts: Partial<Measurement> = {},
): Measurement {
  return {
    analyte,
    quantity: "mass-fraction",
    baseM: heightM - 0.05,
    topM: heightM + 0.05,
    heightM,
    reading: { kind: "value", value },
    unit: "ng/g",
    givenValue: String(value),
    givenUnit: "ppb",
    origin,
    ...parts,
  };
}

export function horizon(
  section: string,
  name: string,
  positionM: number,
  parts: Partial<MarkerHorizon> = {},
): MarkerHorizon {
  return {
    section,
    name,
    horizon: name,
    kind: "impact",
    refersTo: "event-surface",
    source: "given",
    evidence: "",
    positionM,
    lowM: positionM - 0.1,
    highM: positionM + 0.1,
    level: 0.95,
    shape: "normal",
    sigmaM: 0.05,
    outcome: "closed",
    note: "",
    ...parts,
  };
}

export function ashBed(name: string, heightM: number): GivenHorizon {
  return {
    name,
    kind: "ash",
    heightM,
    belowM: 0.05,
    aboveM: 0.05,
    shape: "uniform",
    ageMa: 83.5,
    ageSigmaMa: 0.02,
    notes: "",
    origin,
  };
}

interface MadeTaxon {
  readonly section: string;
  readonly taxon: string;
  readonly group: string;
  readonly heightsM: readonly number[];
  readonly role?: Role;
  readonly reachesTop?: boolean;
  readonly openM?: readonly number[];
}

function localTaxon({ section, taxon, group, heightsM }: MadeTaxon): LocalTaxon {
  const samples = heightsM.map((heightM) => `S${heightM}`);
  return { section, taxon, group, heightsM, samples, lastInclusiveM: heightsM.at(-1) ?? 0 };
}

function candidate({
  section,
  taxon,
  group,
  heightsM,
  role = "candidate",
  reachesTop = false,
}: MadeTaxon): Candidate {
  const lastM = heightsM.at(-1) ?? 0;
  return {
    section,
    taxon,
    group,
    role,
    reachesTop,
    horizons: heightsM.length,
    firstM: heightsM[0] ?? 0,
    lastM,
    lastInclusiveM: lastM,
    findsBelowCeiling: 0,
    reason: { rule: "ends-in-question", value: lastM, limit: 0 },
  };
}

function openFind({ section, taxon }: MadeTaxon, heightM: number): Find {
  return { origin, section, verbatim: taxon, accepted: taxon, heightM, used: "no", reason: "reworked" };
}

/** Everything that an analysis holds about these taxa; candidates get a taper of two metres. */
export function withTaxa(analysis: Analysis, taxa: readonly MadeTaxon[]): Analysis {
  const table = taxa.map(({ taxon, group }): [string, Taxon] => [
    taxon,
    { name: taxon, group, traits: {}, notes: "", origin },
  ]);
  return {
    ...analysis,
    study: { ...analysis.study, taxa: new Map(table) },
    taxa: taxa.map(localTaxon),
    candidates: taxa.map(candidate),
    finds: taxa.flatMap((taxon) => (taxon.openM ?? []).map((heightM) => openFind(taxon, heightM))),
    ranges: {
      ...analysis.ranges,
      tapers: taxa
        .filter(({ role = "candidate" }) => role === "candidate")
        .map(({ section, taxon, heightsM }) => {
          const last = heightsM.at(-1) ?? 0;
          return {
            section,
            taxon,
            method: "uniform" as const,
            heightsM: [last, last + 0.5, last + 1, last + 2],
            chances: [1, 0.4, 0.1, 0.01],
            endM: last + 1.4,
          };
        }),
    },
  };
}

export function answer(parts: Partial<TimingAnswer>): TimingAnswer {
  return {
    section: "cliff",
    set: "candidates",
    question: "where",
    method: "common-end-given",
    taxa: 4,
    taxaOfSet: 4,
    outcome: "closed",
    note: "",
    ...parts,
  };
}

const GROUPS = ["shelly things", "small things"];
const SAMPLES = Array.from({ length: 20 }, (_, i) => sample(`S${i + 0.5}`, i + 0.5));

function cliff(): Section {
  const background = SAMPLES.map((own, i) => measured("iridium", own.heightM, 0.02 + (i % 4) * 0.004));
  const layer = [1.9, 1.2, 0.5, 0.2].map((value, i) =>
    measured("iridium", 12 + i * 0.1, value, { sigma: value * 0.2 }),
  );
  const limit = measured("iridium", 3.2, 0, { reading: { kind: "below", limit: 0.01 } });
  const grains = [0, 4, 9, 3].map((value, i) =>
    measured("shocked-quartz", 11.8 + i * 0.2, value, {
      quantity: "count",
      trials: 90,
      givenUnit: "count",
      unit: "count",
    }),
  );
  const spheres = [1, 14, 6].map((value, i) =>
    measured("spherules", 11.9 + i * 0.2, value, {
      quantity: "count",
      amount: 2,
      amountUnit: "g",
      givenUnit: "count",
    }),
  );
  const carbon = SAMPLES.map((own, i) =>
    measured("d13c", own.heightM, i < 12 ? 2 : 0.6, { quantity: "per-mil", unit: "‰", givenUnit: "per mil" }),
  );
  const polarity = SAMPLES.map((own, i) =>
    measured("polarity", own.heightM, i < 7 ? 1 : -1, {
      quantity: "polarity",
      unit: "polarity",
      givenUnit: "polarity",
    }),
  );
  return section("cliff", {
    title: "Brenn Cliff",
    datum: "foot of the cliff",
    beds: [
      bed(0, 6, "marl", { formation: "Lower Beds" }),
      bed(8, 12, "limestone", { formation: "Lower Beds", baseContact: "erosive" }),
      bed(12, 12.4, "clay", { formation: "Upper Beds", baseContact: "burrowed" }),
      bed(12.4, 20, "greywacke", { formation: "Upper Beds" }),
    ],
    intervals: [{ kind: "covered", baseM: 6, topM: 8, notes: "", origin }],
    samples: SAMPLES,
    searches: SAMPLES.flatMap((own) => GROUPS.map((group) => search(own, group))),
    horizons: [ashBed("grey ash", 16)],
    measurements: [...background, limit, ...layer, ...grains, ...spheres, ...carbon, ...polarity],
  });
}

/** A core logged in feet of depth, from 100 ft up to 60 ft. */
function core(): Section {
  const [bottomM, topM] = [-100 * 0.3048, -60 * 0.3048];
  return section("core", {
    title: "Core 4",
    axis: "depth",
    unit: "ft",
    bottomM,
    topM,
    beds: [bed(bottomM, -25, "marl"), bed(-25, topM, "limestone", { baseContact: "gradational" })],
    intervals: [{ kind: "core-loss", baseM: -29, topM: -28, notes: "", origin }],
    horizons: [ashBed("grey ash", -22)],
  });
}

const profile: Profile = {
  section: "cliff",
  analyte: "iridium",
  unit: "ng/g",
  samples: [12, 12.1, 12.2, 12.3].map((heightM) => ({
    sample: "",
    baseM: heightM,
    topM: heightM,
    heightM,
    value: 1,
    censored: "none",
    sigma: 0.1,
    densityGCm3: 2.4,
    flagged: true,
  })),
  background: { median: 0.024, mean: 0.024, logSd: 0.08, kept: 20, censored: 1, threshold: 0.042 },
  anomalies: [
    {
      name: "iridium-1",
      firstSample: 0,
      lastSample: 3,
      windowBaseM: 11.9,
      windowTopM: 12.4,
      enrichment: 79,
      accepted: "M1",
      models: [
        {
          id: "M1",
          logLikelihood: 0,
          parameters: 4,
          curve: { heightsM: [11.95, 12, 12.1, 12.2, 12.3, 12.4], values: [0.024, 1.9, 1.1, 0.5, 0.2, 0.03] },
        },
      ],
    },
  ],
};

const found = horizon("cliff", "iridium-1", 12.1, {
  horizon: "rusty layer",
  source: "found",
  mixing: { baseM: 11.95, lengthM: 0.15, lowM: 0.1, highM: 0.2 },
});
const given = horizon("cliff", "rusty layer", 12.05, { refersTo: "level" });
const inCore = horizon("core", "rusty layer", -24, { refersTo: "level" });
const ash = (name: string, positionM: number) =>
  horizon(name, "grey ash", positionM, { kind: "ash", refersTo: "level" });

/** Two small sections with one of everything that a plate draws. */
export function smallAnalysis(): Analysis {
  const base = analysisOf([cliff(), core()], {
    markers: {
      horizons: [found, given, ash("cliff", 16), inCore, ash("core", -22)],
      profiles: [profile],
      flags: [],
      main: {
        name: "rusty layer",
        settledBy: "setting",
        isShared: true,
        bySection: new Map([
          ["cliff", found],
          ["core", inCore],
        ]),
      },
      cautions: [],
      basis: [],
    },
    alignment: {
      datum: "rusty layer",
      horizons: ["rusty layer"],
      beyond: "rigid",
      sections: [aligned("cliff", 12.1), aligned("core", -24)],
      ties: [],
      cautions: [],
      basis: [],
    },
    timing: {
      ...noTiming,
      sets: [
        { section: "cliff", set: "candidates", taxa: ["Aurea prima", "Aurea secunda", "Bellona minor"] },
      ],
      answers: [
        answer({ question: "one-level", method: "common-end", p: 0.31 }),
        answer({ low: 11.5, high: 12.6 }),
        answer({ method: "common-end-joint", low: 11.5, high: 13.1 }),
        answer({ question: "how-gradual", method: "duration-lower", low: 0.4 }),
        answer({ question: "how-gradual", method: "duration-box", low: 0.2, high: 5.5 }),
      ],
      curves: [
        {
          section: "cliff",
          set: "candidates",
          heightsM: [11.5, 12, 12.5, 13, 14],
          p: [0.3, 0.7, 0.2, 0.04, 0],
        },
      ],
      scenarios: [
        { section: "cliff", set: "candidates", scenario: "single", prior: 0.5, probability: 0.3, note: "" },
        { section: "cliff", set: "candidates", scenario: "pulses-2", prior: 0.5, probability: 0.7, note: "" },
      ],
      densities: [
        density({ scenario: "single", heightsM: [11.5, 12, 13], density: [1.4, 0.3, 0] }),
        density({ scenario: "pulses-2", pulse: 1, heightsM: [8.5, 9, 10], density: [0.9, 0.6, 0] }),
        density({ scenario: "pulses-2", pulse: 2, heightsM: [11.5, 12, 13], density: [1.6, 0.2, 0] }),
      ],
      influence: [
        influences("Aurea secunda", "highest-find", -0.4),
        influences("Aurea prima", "taxon", 0.02),
      ],
      lastFinds: [
        lasts({ positionM: 8.5, observed: 2, expected: 2.4, low: 1, lowAll: 1, high: 3, highAll: 3 }),
        lasts({ positionM: 10.5, observed: 1, expected: 1.2, low: 0, lowAll: 0, high: 2, highAll: 3 }),
        lasts({ positionM: 11.5, observed: 0, expected: 0.4, low: 0, lowAll: 0, high: 1, highAll: 2 }),
        lasts({ positionM: 12, observed: 0, expected: 0, low: 0, lowAll: 0, high: 0, highAll: 0 }),
      ],
    },
  });
  return withTaxa(base, TAXA);
}

const density = (part: Omit<ScenarioDensity, "section" | "set">): ScenarioDensity => ({
  section: "cliff",
  set: "candidates",
  ...part,
});

const influences = (taxon: string, removed: Influence["removed"], levelM: number): Influence => ({
  section: "cliff",
  set: "candidates",
  taxon,
  removed,
  levelM,
});

const lasts = (part: Omit<LastFindsPoint, "section" | "set" | "level">): LastFindsPoint => ({
  section: "cliff",
  set: "candidates",
  level: 0.95,
  ...part,
});

function aligned(section: string, heightM: number) {
  return {
    section,
    horizons: ["rusty layer"],
    heightsM: [heightM],
    sigmasM: [0.05],
    targets: [0],
    targetSigmas: [0],
  };
}

const [SHELLY, SMALL] = ["shelly things", "small things"];
const TAXA: readonly MadeTaxon[] = [
  { section: "cliff", taxon: "Aurea prima", group: SHELLY, heightsM: [1.5, 3.5, 5.5, 8.5] },
  { section: "cliff", taxon: "Aurea secunda", group: SHELLY, heightsM: [0.5, 4.5, 9.5, 11.5], openM: [13.5] },
  {
    section: "cliff",
    taxon: "Aurea ultima",
    group: SHELLY,
    heightsM: [0.5, 9.5, 15.5, 19.5],
    role: "survivor",
  },
  { section: "cliff", taxon: "Bellona minor", group: SMALL, heightsM: [2.5, 5.5, 10.5], reachesTop: true },
  { section: "cliff", taxon: "Bellona rara", group: SMALL, heightsM: [3.5, 9.5], role: "too-few" },
  { section: "cliff", taxon: "Bellona sera", group: SMALL, heightsM: [13.5, 15.5, 17.5], role: "aftermath" },
  { section: "core", taxon: "Aurea prima", group: SHELLY, heightsM: [-30, -27, -25] },
];

/** One section with this many taxa in three groups, and a main horizon. */
export function manyTaxa(count: number): Analysis {
  const main = horizon("cliff", "rusty layer", 12);
  const base = analysisOf([section("cliff")]);
  const taxa = Array.from(
    { length: count },
    (_, i): MadeTaxon => ({
      section: "cliff",
      taxon: `Longinomen ${"abcdefghij"[i % 10]}perplexum${i}`,
      group: `group ${i % 3}`,
      heightsM: [1 + (i % 4), 6, 8 + (i % 9) * 0.4],
    }),
  );
  const markers = {
    ...base.markers,
    horizons: [main],
    main: { ...base.markers.main, bySection: new Map([["cliff", main]]) },
  };
  return withTaxa({ ...base, markers }, taxa);
}

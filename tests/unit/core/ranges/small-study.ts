import type { MarkerHorizon, Markers } from "../../../../src/core/markers/result.ts";
import type { Candidate, LocalTaxon, Role } from "../../../../src/core/study/finds-result.ts";
import type { RockInterval, Sample, Search, Section, Study } from "../../../../src/core/study/model.ts";
import { defaultSettings, type Settings } from "../../../../src/core/study/settings.ts";

const origin = { file: "test.csv", row: 2 };
export const sectionName = "Orskel Ledge";

/** A section from 0 to `topM` metres with a sample every metre, named by its height, searched for both groups. */
export function section(options: Partial<Section> & { readonly efforts?: readonly number[] } = {}): Section {
  const topM = options.topM ?? 40;
  const heights = Array.from({ length: topM + 1 }, (_, i) => i);
  const samples: Sample[] = heights.map((heightM) => ({
    name: `s${heightM}`,
    baseM: heightM,
    topM: heightM,
    heightM,
    notes: "",
    origin,
  }));
  const searches: Search[] = ["shells", "spores"].flatMap((group) =>
    heights.map((heightM, i) => ({
      sample: `s${heightM}`,
      group,
      heightM,
      ...(options.efforts === undefined
        ? {}
        : { effort: options.efforts[i % options.efforts.length], effortUnit: "kg" }),
      counting: "presence" as const,
      derived: false,
    })),
  );
  const { efforts: _efforts, ...given } = options;
  return {
    name: sectionName,
    title: sectionName,
    axis: "height",
    unit: "m",
    datum: "",
    bottomM: 0,
    topM,
    source: "",
    legs: [],
    intervals: [],
    beds: [],
    samples,
    searches,
    occurrences: [],
    publishedRanges: [],
    measurements: [],
    horizons: [],
    recovery: [],
    ...given,
  };
}

export function covered(baseM: number, topM: number): RockInterval {
  return { kind: "covered", baseM, topM, notes: "", origin };
}

export function study(sections: readonly Section[], change: (s: Settings) => Settings = (s) => s): Study {
  return {
    name: "test",
    settings: change(defaultSettings),
    sections,
    taxa: new Map(),
    choices: [],
    claims: [],
    problems: [],
    sheets: [],
    files: [],
  };
}

/** A taxon found at these heights, each in the sample of that height where there is one. */
export function taxon(
  name: string,
  heightsM: readonly number[],
  extra: Partial<LocalTaxon> = {},
): LocalTaxon {
  const lastM = heightsM[heightsM.length - 1];
  return {
    section: sectionName,
    taxon: name,
    group: "shells",
    heightsM,
    samples: heightsM.map((heightM) => (Number.isInteger(heightM) ? `s${heightM}` : undefined)),
    lastStrictM: lastM,
    lastInclusiveM: lastM,
    ...extra,
  };
}

export function candidate(of: LocalTaxon, role: Role = "candidate", reachesTop = false): Candidate {
  const lastM = of.heightsM[of.heightsM.length - 1];
  return {
    section: of.section,
    taxon: of.taxon,
    group: of.group,
    role,
    reachesTop,
    horizons: of.publishedHorizons ?? of.heightsM.length,
    firstM: of.heightsM[0],
    lastM,
    lastInclusiveM: of.lastInclusiveM,
    findsBelowCeiling: 0,
    reason: { rule: "ends-in-question", value: lastM, limit: lastM },
  };
}

export function horizon(positionM: number, extra: Partial<MarkerHorizon> = {}): MarkerHorizon {
  return {
    section: sectionName,
    name: "impact",
    horizon: "impact",
    kind: "impact",
    refersTo: "event-surface",
    source: "given",
    evidence: "",
    positionM,
    lowM: positionM,
    highM: positionM,
    level: 0.95,
    shape: "normal",
    sigmaM: 0,
    outcome: "closed",
    note: "",
    ...extra,
  };
}

export function markers(main?: MarkerHorizon, others: readonly MarkerHorizon[] = []): Markers {
  return {
    horizons: main === undefined ? others : [main, ...others],
    profiles: [],
    flags: [],
    main: {
      settledBy: main === undefined ? "none" : "given-impact",
      isShared: main !== undefined,
      bySection: new Map(main === undefined ? [] : [[main.section, main] as const]),
      ...(main === undefined ? {} : { name: main.horizon }),
    },
    cautions: [],
    basis: [],
  };
}

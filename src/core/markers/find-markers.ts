import type { Basis, Caution, Progress } from "../basis.ts";
import type { Study } from "../study/model.ts";
import { type AnomalyOptions, anomaliesOf, type JudgedAnomaly } from "./anomalies.ts";
import { anomalyBasis } from "./anomaly-test.ts";
import { backgroundBasis } from "./background.ts";
import { densityBasis } from "./densities.ts";
import { type ElementProfile, elementProfile } from "./element-profile.ts";
import { horizonFlags, profileFlags } from "./flags.ts";
import { fluenceBasis } from "./fluence.ts";
import { foundHorizons } from "./found-horizons.ts";
import { givenHorizons } from "./given-horizons.ts";
import { type JudgedProfile, judgeProfiles, reportedBackground, testProfile } from "./judged-profile.ts";
import { settleMainHorizon } from "./main-horizon.ts";
import { mixingBasis } from "./mixing-fit.ts";
import type { Flag, MarkerHorizon, Markers, Profile } from "./result.ts";
import { reworkingBasis } from "./reworking.ts";
import { sigmaBasis } from "./sigmas.ts";

/** The element that makes horizons; it is tested alone, before the others. */
const horizonElement = "iridium";
const fewestSamples = 5;

const elementBasis: readonly Basis[] = [
  densityBasis,
  sigmaBasis,
  backgroundBasis,
  anomalyBasis,
  fluenceBasis,
  mixingBasis,
  reworkingBasis,
];

interface Examined {
  readonly judged: JudgedProfile;
  readonly anomalies: readonly JudgedAnomaly[];
}

/**
 * Marker horizons of every section: given ones as stated, found ones from iridium, and the main horizon H. Every
 * mass-fraction element with at least five samples in a section gets its profile; iridium is tested first and alone,
 * the other elements of a section share one family of tests. Pure: the same study gives the same bits.
 */
export function findMarkers(study: Study, progress?: Progress): Markers {
  const { confidence, replicates, seed, boundary } = study.settings;
  const options = { level: confidence, replicates, seed };
  const cautions: Caution[] = [];
  const flags: Flag[] = [];
  const horizons: MarkerHorizon[] = [];
  const profiles: Profile[] = [];
  study.sections.forEach((section, i) => {
    progress?.("markers", i, study.sections.length);
    horizons.push(...givenHorizons(section, confidence));
    const elements = elementsOf(section.measurements);
    const read = elements.map((analyte) => elementProfile(section, analyte));
    cautions.push(...read.flatMap((profile) => profileCautions(profile)));
    const usable = read.filter((profile) => profile.samples.length >= fewestSamples);
    const tested = usable.map((profile) => testProfile(section, profile));
    const first = judgeProfiles(tested.filter(({ profile }) => profile.analyte === horizonElement));
    const others = judgeProfiles(tested.filter(({ profile }) => profile.analyte !== horizonElement));
    for (const judged of [...first, ...others]) {
      const examined = examine(judged, options);
      profiles.push(reportedProfile(examined));
      flags.push(...profileFlags(judged));
      if (judged.profile.analyte !== horizonElement) continue;
      const found = foundHorizons(judged, examined.anomalies, confidence);
      horizons.push(...found);
      for (const horizon of found) {
        const anomaly = examined.anomalies.find((a) => a.anomaly.name === horizon.name);
        if (anomaly === undefined) continue;
        flags.push(...horizonFlags(judged, anomaly, horizon));
        cautions.push(...misfitCautions(horizon, anomaly));
      }
    }
  });
  progress?.("markers", study.sections.length, study.sections.length);
  const settled = settleMainHorizon(horizons, boundary);
  return {
    horizons: settled.horizons,
    profiles,
    flags,
    main: settled.main,
    cautions: [...cautions, ...settled.cautions],
    basis: profiles.length > 0 ? elementBasis : [],
  };
}

function elementsOf(measurements: Study["sections"][number]["measurements"]): readonly string[] {
  const names = measurements.filter((m) => m.quantity === "mass-fraction").map((m) => m.analyte);
  return [...new Set(names)].toSorted((a, b) => (a < b ? -1 : a > b ? 1 : 0));
}

function profileCautions({ section, analyte, samples, cautions }: ElementProfile): readonly Caution[] {
  if (samples.length >= fewestSamples) return cautions;
  const numbers = { samples: samples.length, needed: fewestSamples };
  return [...cautions, { code: "profile-too-short", section, subject: analyte, numbers }];
}

function misfitCautions({ section, name }: MarkerHorizon, { mixing }: JudgedAnomaly): readonly Caution[] {
  if (mixing.accepted !== "M2" || mixing.inflation === 1) return [];
  const { chiSquare, misfitP: p, inflation } = mixing;
  return [{ code: "mixing-misfit", section, subject: name, numbers: { chiSquare, p, inflation } }];
}

function examine(judged: JudgedProfile, options: AnomalyOptions): Examined {
  return {
    judged,
    anomalies: judged.fit.kind === "background" ? anomaliesOf(judged, judged.fit, options) : [],
  };
}

function reportedProfile({ judged, anomalies }: Examined): Profile {
  const { profile, fit, samples, family, falseThreeSigmaChance } = judged;
  const shared = { section: profile.section, analyte: profile.analyte, unit: profile.unit, samples };
  const reported = anomalies.map(({ anomaly }) => anomaly);
  if (fit.kind !== "background") return { ...shared, anomalies: reported };
  return {
    ...shared,
    background: reportedBackground(fit, profile),
    tests: family,
    falseThreeSigmaChance,
    anomalies: reported,
  };
}

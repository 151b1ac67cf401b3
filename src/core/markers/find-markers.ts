import type { Basis, Caution, Progress } from "../basis.ts";
import type { Section, Study } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
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
import { pickedHorizons } from "./picked-horizons.ts";
import type { Flag, MarkerHorizon, Markers, Profile } from "./result.ts";
import { reworkingBasis } from "./reworking.ts";
import { sigmaBasis } from "./sigmas.ts";

/** The element that makes horizons; it is tested alone, before the others. */
const horizonElement = "iridium";
const fewestSamples = 5;
/** What carries or dilutes trace elements: it sets their background and marks no event of its own. */
const carriers: ReadonlySet<string> = new Set(["toc", "tic", "carbonate", "sulfur", "aluminium"]);

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

/** What one section's measurements and given horizons say, before sections are compared. */
export interface SectionSurvey {
  readonly section: string;
  readonly horizons: readonly MarkerHorizon[];
  readonly profiles: readonly Profile[];
  readonly flags: readonly Flag[];
  readonly cautions: readonly Caution[];
}

/**
 * Marker horizons of every section: given ones as stated, found ones from iridium, and the main horizon H. Every
 * mass-fraction element with at least five samples in a section gets its profile; iridium is tested first and alone,
 * the other elements of a section share one family of tests. Pure: the same study gives the same bits.
 */
export function findMarkers(study: Study, progress?: Progress): Markers {
  const surveys = study.sections.map((section, i) => {
    progress?.("markers", i, study.sections.length);
    return surveySection(section, study.settings);
  });
  progress?.("markers", study.sections.length, study.sections.length);
  return settleMarkers(surveys, study.settings);
}

/** Markers of a study from the surveys of its sections, in their order. */
export function settleMarkers(surveys: readonly SectionSurvey[], { boundary }: Settings): Markers {
  const settled = settleMainHorizon(
    surveys.flatMap((survey) => survey.horizons),
    boundary,
  );
  const profiles = surveys.flatMap((survey) => survey.profiles);
  return {
    horizons: settled.horizons,
    profiles,
    flags: surveys.flatMap((survey) => survey.flags),
    main: settled.main,
    cautions: [...surveys.flatMap((survey) => survey.cautions), ...settled.cautions],
    basis: profiles.length > 0 ? elementBasis : [],
  };
}

/** Horizons, profiles and flags of one section: it needs no other section, so sections can be surveyed apart. */
export function surveySection(section: Section, settings: Settings): SectionSurvey {
  const { confidence, replicates, seed, boundary } = settings;
  const options = { level: confidence, replicates, seed };
  const read = elementsOf(section.measurements).map((analyte) => elementProfile(section, analyte));
  const tested = read
    .filter((profile) => profile.samples.length >= fewestSamples)
    .map((profile) => testProfile(section, profile));
  const first = judgeProfiles(tested.filter(({ profile }) => profile.analyte === horizonElement));
  const others = judgeProfiles(tested.filter(({ profile }) => profile.analyte !== horizonElement));
  const examined = [...first, ...others].map((judged) => examine(judged, options));
  const found = examined.flatMap((one) => foundIn(one, confidence));
  const automatic = [...givenHorizons(section, confidence), ...found.map(({ horizon }) => horizon)];
  return {
    section: section.name,
    horizons: [...automatic, ...pickedHorizons(section, boundary.picks, { automatic, level: confidence })],
    profiles: examined.map(reportedProfile),
    flags: [
      ...examined.flatMap(({ judged }) => profileFlags(judged)),
      ...found.flatMap(({ judged, anomaly, horizon }) => horizonFlags(judged, anomaly, horizon)),
    ],
    cautions: [
      ...read.flatMap(profileCautions),
      ...found.flatMap(({ horizon, anomaly }) => misfitCautions(horizon, anomaly)),
    ],
  };
}

/** The horizons that an examined profile makes, each with the anomaly behind it; only iridium makes horizons. */
function foundIn({ judged, anomalies }: Examined, confidence: number) {
  if (judged.profile.analyte !== horizonElement) return [];
  return foundHorizons(judged, anomalies, confidence).flatMap((horizon) => {
    const anomaly = anomalies.find((a) => a.anomaly.name === horizon.name);
    return anomaly === undefined ? [] : [{ judged, anomaly, horizon }];
  });
}

function elementsOf(measurements: Study["sections"][number]["measurements"]): readonly string[] {
  const names = measurements
    .filter((m) => m.quantity === "mass-fraction" && !carriers.has(m.analyte))
    .map((m) => m.analyte);
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

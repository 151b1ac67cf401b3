import { normalQuantile } from "../numeric/normal.ts";
import { centimetresPerMetre, type JudgedAnomaly } from "./anomalies.ts";
import type { JudgedProfile } from "./judged-profile.ts";
import type { MarkerHorizon } from "./result.ts";

/** Half of the central 68.27 % of a uniform law, as a share of its whole width. */
const uniformSigmaShare = 0.34135;
const evidenceDigits = 3;

interface Placement {
  readonly positionM: number;
  readonly lowM: number;
  readonly highM: number;
  readonly sigmaM: number;
  readonly isOpen: boolean;
}

/**
 * Horizons found in one element: each run of flagged samples in which a layer beats plain background.
 *
 * Where box mixing is accepted the horizon is the event surface h0 with its profile-likelihood interval. Where it is
 * not, the position is the middle of the sample that would hold a thin layer, and the interval is the union of that
 * sample (with the unsampled gap beneath it) and the interval of h0 under box mixing of any length, down to none: it
 * covers the event whichever of the two happened. Stated position errors of the peak sample are added in quadrature.
 */
export function foundHorizons(
  judged: JudgedProfile,
  anomalies: readonly JudgedAnomaly[],
  level: number,
): readonly MarkerHorizon[] {
  return anomalies
    .filter(({ anomaly }) => anomaly.accepted !== "M0")
    .map((judgedAnomaly) => foundHorizon(judged, judgedAnomaly, level));
}

function foundHorizon(judged: JudgedProfile, found: JudgedAnomaly, level: number): MarkerHorizon {
  const { anomaly, mixing, peak } = found;
  const isMixed = mixing.accepted === "M2";
  const placed = isMixed ? mixedPlacement(found) : thinPlacement(judged, found);
  const { positionM, lowM, highM, sigmaM, isOpen } = widen(
    placed,
    judged.profile.samples[peak].positionSigmaM,
    level,
  );
  const { fluence } = anomaly;
  const { baseCm, lengthCm } = mixing.reported;
  return {
    section: judged.section.name,
    name: anomaly.name,
    horizon: anomaly.name,
    kind: "impact",
    refersTo: isMixed ? "event-surface" : "level",
    source: "found",
    evidence: evidenceOf(judged, found),
    positionM,
    lowM,
    highM,
    level,
    shape: isMixed ? "profile-likelihood" : "sample-bounds",
    sigmaM,
    enrichment: anomaly.enrichment,
    ...(fluence === undefined
      ? {}
      : { fluence: { value: fluence.value, low: fluence.low, high: fluence.high } }),
    ...(isMixed
      ? {
          mixing: {
            baseM: found.datumM + baseCm / centimetresPerMetre,
            lengthM: lengthCm / centimetresPerMetre,
            lowM: mixing.length.isOpenLow ? 0 : mixing.length.low / centimetresPerMetre,
            highM: mixing.length.high / centimetresPerMetre,
          },
        }
      : {}),
    outcome: isOpen ? "open" : "closed",
    note: noteOf(found),
  };
}

function mixedPlacement({ mixing, datumM }: JudgedAnomaly): Placement {
  const height = (cm: number) => datumM + cm / centimetresPerMetre;
  const { reported, surface, surface68 } = mixing;
  return {
    positionM: height(reported.baseCm + reported.lengthCm),
    lowM: height(surface.low),
    highM: height(surface.high),
    sigmaM: (surface68.high - surface68.low) / 2 / centimetresPerMetre,
    isOpen: surface.isOpenLow || surface.isOpenHigh,
  };
}

function thinPlacement(judged: JudgedProfile, { mixing, mixingWindow, datumM }: JudgedAnomaly): Placement {
  const { samples } = judged.profile;
  const at = mixingWindow.first + mixing.m1.at;
  const layer = samples[at];
  const isPoint = layer.topM <= layer.baseM;
  const beneath = at > 0 ? Math.min(layer.baseM, samples[at - 1].topM) : layer.baseM;
  const above = isPoint && at < samples.length - 1 ? samples[at + 1].baseM : layer.topM;
  const lowM = Math.min(beneath, datumM + mixing.surface.low / centimetresPerMetre);
  const highM = Math.max(above, datumM + mixing.surface.high / centimetresPerMetre);
  return {
    positionM: layer.heightM,
    lowM,
    highM,
    sigmaM: uniformSigmaShare * (highM - lowM),
    isOpen: mixing.surface.isOpenHigh,
  };
}

function widen(placed: Placement, positionSigmaM: number, level: number): Placement {
  if (positionSigmaM === 0) return placed;
  const z = normalQuantile((1 + level) / 2);
  const reach = (half: number) => Math.sqrt(half * half + (z * positionSigmaM) ** 2);
  return {
    ...placed,
    lowM: placed.positionM - reach(placed.positionM - placed.lowM),
    highM: placed.positionM + reach(placed.highM - placed.positionM),
    sigmaM: Math.sqrt(placed.sigmaM ** 2 + positionSigmaM ** 2),
  };
}

function evidenceOf({ profile, samples }: JudgedProfile, { anomaly, peak, run }: JudgedAnomaly): string {
  const { value, sample } = samples[peak];
  const count = run.last - run.first + 1;
  const where = sample === "" ? "" : ` in ${sample}`;
  const samplesInRun = count === 1 ? "one sample" : `${count} adjacent samples`;
  return `${profile.analyte} ${rounded(value)} ${profile.unit}${where}, ${rounded(anomaly.enrichment)} times background, ${samplesInRun}`;
}

function noteOf({ mixing }: JudgedAnomaly): string {
  const delta = mixing.deltaAicc === undefined ? "" : ` (AICc difference ${rounded(mixing.deltaAicc)})`;
  switch (mixing.accepted) {
    case "M2":
      return `box mixing${delta}; position is the event surface`;
    case "M1":
      return `thin layer in one sample${delta}`;
    default:
      return `mixing not resolved${delta}; interval covers a thin layer and box mixing`;
  }
}

function rounded(value: number): string {
  return String(Number(value.toPrecision(evidenceDigits)));
}

import type { Caution } from "../basis.ts";
import { median } from "../numeric/sums.ts";
import type { Measurement, Section } from "../study/model.ts";
import { type Density, densityOf } from "./densities.ts";
import { assumedSigma } from "./sigmas.ts";

/** One sample of an element's profile as measured. A point sample has equal base and top. */
export interface ElementSample {
  readonly sample: string;
  readonly baseM: number;
  readonly topM: number;
  readonly heightM: number;
  /** The measured value; the limit where censored; the middle of an interval. */
  readonly value: number;
  readonly censored: "none" | "left" | "right" | "interval";
  readonly sigma: number;
  readonly isSigmaAssumed: boolean;
  readonly density: Density;
  /** One standard deviation of the sample's position, 0 where none is stated. */
  readonly positionSigmaM: number;
}

/** The measurements of one element in one section, ordered from below upward, replicates merged. */
export interface ElementProfile {
  readonly section: string;
  readonly analyte: string;
  readonly unit: string;
  readonly samples: readonly ElementSample[];
  readonly cautions: readonly Caution[];
}

/** Heights nearer than this are the same height. */
export const sameHeightM = 1e-9;

interface Cell {
  readonly value: number;
  readonly censored: ElementSample["censored"];
  readonly spread: number;
}

/**
 * Orders the measurements of one element into a profile. Replicates of one slab become their inverse-variance mean,
 * its sigma not below the standard error that their scatter shows. A plain 0 is "below the detection limit" where one
 * is stated, else it is set aside: a concentration is never 0.
 */
export function elementProfile(section: Section, analyte: string): ElementProfile {
  const measurements = section.measurements.filter((m) => m.analyte === analyte);
  const detects = measurements.flatMap((m) => (m.reading.kind === "value" ? [m.reading.value] : []));
  const middle = detects.length === 0 ? 0 : median(detects);
  const samples = measurements
    .flatMap((m) => elementSample(m, section, middle))
    .toSorted((a, b) => a.heightM - b.heightM || a.baseM - b.baseM);
  const merged = mergeReplicates(samples);
  const at = { section: section.name, subject: analyte };
  const cautions: Caution[] = [];
  const setAside = measurements.length - samples.length;
  if (setAside > 0) cautions.push({ code: "zero-set-aside", ...at, numbers: { measurements: setAside } });
  const overlaps = merged.slice(1).filter((s, i) => merged[i].topM - s.baseM > sameHeightM).length;
  if (overlaps > 0) cautions.push({ code: "overlapping-slabs", ...at, numbers: { pairs: overlaps } });
  return { section: section.name, analyte, unit: measurements[0]?.unit ?? "", samples: merged, cautions };
}

function elementSample(measurement: Measurement, section: Section, middle: number): readonly ElementSample[] {
  const cell = readCell(measurement);
  if (cell === undefined) return [];
  const limit = cell.censored === "left" ? cell.value : measurement.detectionLimit;
  const given = measurement.sigma !== undefined && measurement.sigma > 0 ? measurement.sigma : undefined;
  const sigma = given ?? assumedSigma(cell.value, limit, middle);
  const sample = section.samples.find((s) => s.name === measurement.sample);
  return [
    {
      sample: measurement.sample ?? "",
      baseM: measurement.baseM,
      topM: measurement.topM,
      heightM: measurement.heightM,
      value: cell.value,
      censored: cell.censored,
      sigma: Math.sqrt(sigma * sigma + cell.spread * cell.spread),
      isSigmaAssumed: given === undefined && cell.censored !== "left",
      density: densityOf(measurement, section),
      positionSigmaM: sample?.positionErrorM ?? 0,
    },
  ];
}

function readCell({ reading, detectionLimit }: Measurement): Cell | undefined {
  switch (reading.kind) {
    case "value":
      if (reading.value > 0) return { value: reading.value, censored: "none", spread: 0 };
      return detectionLimit === undefined || detectionLimit <= 0
        ? undefined
        : { value: detectionLimit, censored: "left", spread: 0 };
    case "below":
      return reading.limit > 0 ? { value: reading.limit, censored: "left", spread: 0 } : undefined;
    case "above":
      return reading.limit > 0 ? { value: reading.limit, censored: "right", spread: 0 } : undefined;
    case "between": {
      const width = reading.high - reading.low;
      const centre = (reading.low + reading.high) / 2;
      return centre > 0 ? { value: centre, censored: "interval", spread: width / Math.sqrt(12) } : undefined;
    }
    default:
      return reading satisfies never;
  }
}

function mergeReplicates(samples: readonly ElementSample[]): readonly ElementSample[] {
  const groups: ElementSample[][] = [];
  for (const sample of samples) {
    const last = groups[groups.length - 1]?.[0];
    const isReplicate =
      last !== undefined &&
      Math.abs(last.baseM - sample.baseM) <= sameHeightM &&
      Math.abs(last.topM - sample.topM) <= sameHeightM;
    if (isReplicate) groups[groups.length - 1].push(sample);
    else groups.push([sample]);
  }
  return groups.map(replicateMean);
}

function replicateMean(group: readonly ElementSample[]): ElementSample {
  if (group.length === 1) return group[0];
  const measured = group.filter((s) => s.censored !== "left");
  if (measured.length === 0) return group.reduce((a, b) => (b.value < a.value ? b : a));
  if (measured.length === 1) return measured[0];
  const weights = measured.map((s) => 1 / (s.sigma * s.sigma));
  const total = weights.reduce((a, b) => a + b, 0);
  const mean = measured.reduce((a, s, i) => a + weights[i] * s.value, 0) / total;
  const squares = measured.reduce((a, s) => a + (s.value - mean) ** 2, 0);
  const fromScatter = Math.sqrt(squares / (measured.length - 1) / measured.length);
  return {
    ...measured[0],
    value: mean,
    censored: measured.some((s) => s.censored === "right") ? "right" : measured[0].censored,
    sigma: Math.max(1 / Math.sqrt(total), fromScatter),
    isSigmaAssumed: measured.some((s) => s.isSigmaAssumed),
  };
}

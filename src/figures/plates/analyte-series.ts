import { group } from "d3";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Profile } from "../../core/markers/result.ts";
import type { Measurement, Section } from "../../core/study/model.ts";
import type { CountBar } from "../columns/count-column.tsx";
import type { CurvePoint, ValuePoint } from "../columns/value-column.tsx";
import { analyteTitle, type DrawnUnit, drawnUnit } from "./analyte-names.ts";

/** What was measured of one analyte in one section, in the unit it is drawn in. */
export interface AnalyteSeries {
  readonly analyte: string;
  readonly title: string;
  readonly unit: string;
  readonly kind: "concentration" | "isotope" | "share" | "rate" | "polarity" | "other";
  readonly points: readonly ValuePoint[];
  readonly bars: readonly CountBar[];
  readonly background?: readonly [number, number];
  /** Of each anomaly whose mixing was accepted. */
  readonly curves: readonly (readonly CurvePoint[])[];
}

/** Order in which columns stand; whatever else was measured follows. */
const ORDER = [
  "iridium",
  "nickel",
  "shocked-quartz",
  "spherules",
  "d13c",
  "d18o",
  "mercury",
  "toc",
  "polarity",
];

export function analyteSeries(analysis: Analysis, section: Section): readonly AnalyteSeries[] {
  const byAnalyte = group(section.measurements, (measurement) => measurement.analyte);
  const known = ORDER.filter((analyte) => byAnalyte.has(analyte));
  const others = [...byAnalyte.keys()].filter((analyte) => !known.includes(analyte)).toSorted();
  return [...known, ...others].map((analyte) => {
    const profile = analysis.markers.profiles.find(
      (candidate) => candidate.section === section.name && candidate.analyte === analyte,
    );
    return seriesOf(byAnalyte.get(analyte) ?? [], profile);
  });
}

function seriesOf(measurements: readonly Measurement[], profile: Profile | undefined): AnalyteSeries {
  const analyte = measurements[0]?.analyte ?? "";
  const kind = kindOf(measurements);
  const unit = kind === "share" || kind === "rate" ? { unit: "", factor: 1 } : drawnUnit(measurements);
  const flagged = new Set(
    profile?.samples.filter((sample) => sample.flagged).map((sample) => sample.heightM),
  );
  const base = { analyte, kind, title: analyteTitle(analyte), ...fitted(profile, unit) };
  if (kind === "share")
    return { ...base, unit: "% of grains", points: measurements.flatMap(sharePoint), bars: [] };
  if (kind === "rate") {
    const massUnit = measurements[0]?.amountUnit;
    return {
      ...base,
      unit: massUnit ? `per ${massUnit}` : "count",
      points: [],
      bars: measurements.flatMap(rateBar),
    };
  }
  const points = measurements.map((measurement) => ({
    ...valuePoint(measurement, unit),
    isAnomaly: flagged.has(measurement.heightM),
  }));
  return { ...base, unit: unit.unit, points, bars: [] };
}

function kindOf(measurements: readonly Measurement[]): AnalyteSeries["kind"] {
  const [first] = measurements;
  if (first === undefined) return "other";
  if (first.quantity === "polarity" || first.analyte === "polarity") return "polarity";
  if (measurements.every((measurement) => (measurement.trials ?? 0) > 0)) return "share";
  if (first.quantity === "count" || first.quantity === "per-gram") return "rate";
  if (first.quantity === "per-mil") return "isotope";
  return first.quantity === "mass-fraction" ? "concentration" : "other";
}

function valuePoint({ heightM, reading, sigma }: Measurement, { factor }: DrawnUnit): ValuePoint {
  switch (reading.kind) {
    case "value": {
      const value = reading.value / factor;
      if (sigma === undefined) return { heightM, value };
      return { heightM, value, low: value - sigma / factor, high: value + sigma / factor };
    }
    case "below":
      return { heightM, value: reading.limit / factor, censored: "below" };
    case "above":
      return { heightM, value: reading.limit / factor, censored: "above" };
    case "between": {
      const [low, high] = [reading.low / factor, reading.high / factor];
      return { heightM, value: (low + high) / 2, low, high };
    }
    default:
      return reading satisfies never;
  }
}

function sharePoint({ heightM, reading, trials }: Measurement): readonly ValuePoint[] {
  if (reading.kind !== "value" || trials === undefined) return [];
  return [{ heightM, value: (100 * reading.value) / trials }];
}

function rateBar({ baseM, topM, reading, amount }: Measurement): readonly CountBar[] {
  return reading.kind === "value" ? [{ baseM, topM, value: reading.value / (amount ?? 1) }] : [];
}

/** Background and accepted mixing curve of a profile, as they were fitted. */
function fitted(profile: Profile | undefined, { factor }: DrawnUnit) {
  const { background, anomalies = [] } = profile ?? {};
  const curves = anomalies.map(({ models, accepted }) => {
    const model = models.find((candidate) => candidate.id === accepted);
    return (model?.curve?.heightsM ?? []).map((heightM, i) => ({
      heightM,
      value: (model?.curve?.values[i] ?? 0) / factor,
    }));
  });
  if (background === undefined) return { curves };
  const ceiling = background.threshold / factor;
  const median = background.median / factor;
  return { curves, background: [median ** 2 / ceiling, ceiling] as const };
}

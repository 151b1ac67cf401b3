import { extent } from "d3";
import type { Analysis } from "../../core/analysis-result.ts";
import { columnHeadWidth } from "../columns/column-head.tsx";
import { CountColumn } from "../columns/count-column.tsx";
import { PolarityColumn } from "../columns/polarity-column.tsx";
import { ValueColumn } from "../columns/value-column.tsx";
import { linearColumn, logColumn } from "../columns/value-scale.ts";
import type { LegendEntry } from "../legend.tsx";
import { fitText } from "../text.ts";
import { TEXT } from "../theme.ts";
import { type AnalyteSeries, analyteSeries } from "./analyte-series.ts";
import type { PlateColumn } from "./plate-columns.ts";
import type { SectionFrame } from "./section-frame.ts";

interface AnalyteColumnOptions {
  /** Only these analytes; default all that were measured. */
  readonly only?: readonly string[];
  readonly width?: number;
}

const LONGEST_HEAD = 90;
const WIDTH = 36;
const LOG_FACTOR = 1.5;

/** A column for each analyte of a section, in a fixed order. */
export function analyteColumns(
  analysis: Analysis,
  frame: SectionFrame,
  options: AnalyteColumnOptions = {},
): readonly PlateColumn[] {
  return analyteSeries(analysis, frame.section)
    .filter((series) => options.only === undefined || options.only.includes(series.analyte))
    .flatMap((series) => analyteColumn(series, frame, options));
}

function analyteColumn(
  series: AnalyteSeries,
  { y }: SectionFrame,
  { width: wanted = WIDTH }: AnalyteColumnOptions,
): readonly PlateColumn[] {
  const title = fitText(series.title, LONGEST_HEAD, TEXT.heading);
  const unit = fitText(headUnit(series), LONGEST_HEAD, TEXT.unit);
  const body = series.analyte === "iridium" ? wanted * 1.4 : series.kind === "polarity" ? 15 : wanted;
  const drawn = drawing({ ...series, title, unit }, body);
  if (drawn === undefined) return [];
  return [
    {
      key: series.analyte,
      width: Math.max(body, columnHeadWidth(title, series.kind === "polarity" ? "" : unit)),
      draw: (x) => drawn(x, y),
      legend: analyteLegend(series),
    },
  ];
}

function headUnit(series: AnalyteSeries): string {
  return isLogarithmic(series) ? `${series.unit}, log` : series.unit;
}

const WIDE_RANGE = 20;

/** Concentrations that span more than an order of magnitude; iridium always. */
function isLogarithmic({ analyte, kind, points }: AnalyteSeries): boolean {
  if (kind !== "concentration") return false;
  const [low = 1, high = 1] = extent(points.map((point) => point.value).filter((value) => value > 0));
  return analyte === "iridium" || high > WIDE_RANGE * low;
}

type Drawn = ((x: number, y: SectionFrame["y"]) => React.ReactNode) | undefined;

function drawing(series: AnalyteSeries, width: number): Drawn {
  const { kind, title, unit, points, bars, background, curves } = series;
  if (kind === "polarity") {
    const samples = points.map(({ heightM, value }) => ({ heightM, isNormal: value > 0 }));
    return (x, y) => <PolarityColumn {...{ x, width, y, samples }} />;
  }
  if (kind === "rate") {
    if (bars.length === 0) return undefined;
    const column = linearColumn([0, Math.max(1, ...bars.map((bar) => bar.value))], width);
    return (x, y) => <CountColumn {...{ x, width, y, title, unit, bars }} {...column} />;
  }
  if (points.length === 0) return undefined;
  const column = isLogarithmic(series) ? logarithmicScale(series, width) : linearScale(series, width);
  return (x, y) => (
    <ValueColumn
      {...{ x, width, y, title, unit, points, background, curves }}
      {...column}
      isJoined={kind === "isotope"}
    />
  );
}

/** From the smallest to the largest positive value, limit, background or fitted value. */
function logarithmicScale({ points, background, curves }: AnalyteSeries, width: number) {
  const values = [...points, ...curves.flat()].map((point) => point.value);
  const [low, high] = extent([...values, ...(background ?? [])].filter((value) => value > 0));
  if (low === undefined || high === undefined) return linearColumn([0, 1], width);
  return logColumn([low / LOG_FACTOR, high * LOG_FACTOR], width);
}

function linearScale({ points, kind, background }: AnalyteSeries, width: number) {
  const startsAtZero = kind === "share" || kind === "concentration";
  const values = [...points.map((point) => point.value), ...(background ?? []), ...(startsAtZero ? [0] : [])];
  const [low = 0, high = 1] = extent(values);
  const room = (high - low || Math.abs(high) || 1) * 0.06;
  return linearColumn([startsAtZero ? Math.min(0, low) : low - room, high + room], width);
}

type ValueSign =
  | "value"
  | "anomaly"
  | "limit"
  | "background"
  | "curve"
  | "normal"
  | "reversed"
  | "unknown-polarity";

function entry(kind: ValueSign, label: string): LegendEntry {
  return { sign: { kind }, label };
}

function analyteLegend({ points, background, curves, analyte }: AnalyteSeries): readonly LegendEntry[] {
  if (analyte === "polarity")
    return points.length === 0
      ? []
      : [
          entry("normal", "normal polarity"),
          entry("reversed", "reversed"),
          entry("unknown-polarity", "polarity unknown"),
        ];
  return [
    ...(points.length > 0 ? [entry("value", "measured")] : []),
    ...(points.some((point) => point.isAnomaly) ? [entry("anomaly", "above background")] : []),
    ...(points.some((point) => point.censored) ? [entry("limit", "limit only")] : []),
    ...(background ? [entry("background", "background")] : []),
    ...(curves.some((curve) => curve.length > 0) ? [entry("curve", "fitted mixing")] : []),
  ];
}

/** What the bars through measured values are, where any is drawn. */
export function errorBarNotes({ section }: SectionFrame, only?: readonly string[]): readonly string[] {
  const hasErrors = section.measurements.some(
    ({ analyte, sigma, trials }) =>
      sigma !== undefined && trials === undefined && (only?.includes(analyte) ?? true),
  );
  return hasErrors
    ? ["Bars through measured values, where longer than the mark: one standard deviation each way."]
    : [];
}

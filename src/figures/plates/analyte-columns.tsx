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
  /** Error bars of one standard deviation. */
  readonly hasErrors?: boolean;
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
  { width: wanted = WIDTH, hasErrors = false }: AnalyteColumnOptions,
): readonly PlateColumn[] {
  const title = fitText(series.title, LONGEST_HEAD, TEXT.heading);
  const unit = fitText(headUnit(series), LONGEST_HEAD, TEXT.unit);
  const body = series.analyte === "iridium" ? wanted * 1.4 : series.kind === "polarity" ? 15 : wanted;
  const points = hasErrors ? series.points : series.points.map(({ low: _, high: __, ...point }) => point);
  const drawn = drawing({ ...series, points, title, unit }, body);
  if (drawn === undefined) return [];
  return [
    {
      key: series.analyte,
      width: Math.max(body, columnHeadWidth(title, series.kind === "polarity" ? "" : unit)),
      draw: (x) => drawn(x, y),
      legend: analyteLegend(series, hasErrors),
    },
  ];
}

function headUnit({ kind, unit }: AnalyteSeries): string {
  if (kind === "isotope" && unit === "‰") return "‰";
  return kind === "concentration" ? `${unit}, log` : unit;
}

type Drawn = ((x: number, y: SectionFrame["y"]) => React.ReactNode) | undefined;

function drawing(series: AnalyteSeries, width: number): Drawn {
  const { kind, title, unit, points, bars, background, curve } = series;
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
  const column = kind === "concentration" ? concentrationScale(series, width) : linearScale(series, width);
  return (x, y) => (
    <ValueColumn {...{ x, width, y, title, unit, points, background, curve }} {...column} isJoined={kind === "isotope"} />
  );
}

/** Logarithmic from the smallest to the largest positive value, limit, background or fitted value. */
function concentrationScale({ points, background = [], curve }: Omit<AnalyteSeries, "background"> & { readonly background?: readonly number[] }, width: number) {
  const values = [...points, ...curve].map((point) => point.value);
  const [low, high] = extent([...values, ...background].filter((value) => value > 0));
  if (low === undefined || high === undefined) return linearColumn([0, 1], width);
  return logColumn([low / LOG_FACTOR, high * LOG_FACTOR], width);
}

function linearScale({ points, kind }: AnalyteSeries, width: number) {
  const values = points.map((point) => point.value);
  const [low = 0, high = 1] = extent(kind === "share" ? [0, ...values] : values);
  const room = (high - low || Math.abs(high) || 1) * 0.06;
  return linearColumn([kind === "share" ? 0 : low - room, high + room], width);
}

function analyteLegend({ points, background, curve, analyte }: AnalyteSeries, hasErrors: boolean): readonly LegendEntry[] {
  if (analyte === "polarity") return [];
  const entry = (kind: "value" | "anomaly" | "limit" | "background" | "curve", label: string): LegendEntry => ({
    sign: { kind },
    label,
  });
  const hasBars = hasErrors && points.some((point) => point.low !== undefined);
  return [
    ...(points.length > 0 ? [entry("value", hasBars ? "measured, ± 1 standard deviation" : "measured")] : []),
    ...(points.some((point) => point.isAnomaly) ? [entry("anomaly", "above background")] : []),
    ...(points.some((point) => point.censored) ? [entry("limit", "limit only")] : []),
    ...(background ? [entry("background", "background")] : []),
    ...(curve.length > 0 ? [entry("curve", "fitted mixing")] : []),
  ];
}

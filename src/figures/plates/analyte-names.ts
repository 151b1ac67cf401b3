import type { Measurement } from "../../core/study/model.ts";
import { measurementUnit } from "../../core/study/units.ts";

const TITLES: ReadonlyMap<string, string> = new Map([
  ["d13c", "δ¹³C"],
  ["d18o", "δ¹⁸O"],
  ["toc", "TOC"],
  ["shocked-quartz", "Shocked quartz"],
  ["osmium-ratio", "Os ratio"],
]);

/** How an analyte is headed on a plate. */
export function analyteTitle(analyte: string): string {
  const known = TITLES.get(analyte);
  if (known !== undefined) return known;
  const words = analyte.replaceAll("-", " ");
  return words.slice(0, 1).toUpperCase() + words.slice(1);
}

/** The unit a column is drawn in, and canonical units in one of it. */
export interface DrawnUnit {
  readonly unit: string;
  readonly factor: number;
}

/** The unit as given where all rows agree on it, else the canonical one. */
export function drawnUnit(measurements: readonly Measurement[]): DrawnUnit {
  const [first] = measurements;
  if (first === undefined) return { unit: "", factor: 1 };
  const isOne = measurements.every((measurement) => measurement.givenUnit === first.givenUnit);
  const given = measurementUnit(first.givenUnit, first.analyte);
  if (!isOne || given === undefined || given === "refused" || first.quantity !== "mass-fraction")
    return { unit: first.unit, factor: 1 };
  return { unit: first.givenUnit, factor: given.factor };
}

import type { Reading } from "./model.ts";
import type { ProblemCode } from "./problem-wordings.ts";

/** What a value cell was read as. */
export type ReadCell =
  | { readonly kind: "reading"; readonly reading: Reading }
  | { readonly kind: "missing" }
  | { readonly kind: "problem"; readonly code: ProblemCode };

const number = String.raw`[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?`;
const plain = new RegExp(`^${number}$`);
const below = new RegExp(`^(?:<|≤|<=)\\s*(${number})$`);
const belowByLetter = new RegExp(`^(${number})\\s*[uU]$`);
const above = new RegExp(`^(?:>|≥|>=)\\s*(${number})$`);
const between = new RegExp(`^(${number})\\s*\\.\\.\\s*(${number})$`);
const notDetectedOrNotDetermined = /^(?:nd|n\.d\.?|--)$/i;
const belowDetection = /^(?:bdl|b\.d\.l\.?|<\s*dl|<\s*lod|<\s*d\.l\.)$/i;
const trace = /^(?:tr|tr\.|trace)$/i;
const missing = /^(?:|na|n\/a)$/i;

const reading = (reading: Reading): ReadCell => ({ kind: "reading", reading });
const problem = (code: ProblemCode): ReadCell => ({ kind: "problem", code });

/**
 * Reads a value cell, in this order: left-censored (`<x`, `≤x`, `x U`), `bdl` (left-censored at the row's detection
 * limit), `nd` (asks: it can mean two things), right-censored (`>x`), interval (`a..b`), trace (asks for its limits),
 * missing (blank, `na`), plain number. In the unit of the cell. Common laboratory practice; nothing is substituted.
 */
export function readValueCell(text: string, detectionLimit?: number): ReadCell {
  const cell = text.trim().replaceAll("\u2212", "-");
  const left = below.exec(cell) ?? belowByLetter.exec(cell);
  if (left) return finite(left[1], (limit) => ({ kind: "below", limit }));
  if (belowDetection.test(cell)) {
    return detectionLimit === undefined
      ? problem("no-detection-limit")
      : reading({ kind: "below", limit: detectionLimit });
  }
  if (notDetectedOrNotDetermined.test(cell)) return problem("nd-ambiguous");
  const right = above.exec(cell);
  if (right) return finite(right[1], (limit) => ({ kind: "above", limit }));
  const pair = between.exec(cell);
  if (pair) return interval(Number(pair[1]), Number(pair[2]));
  if (trace.test(cell)) return problem("trace-limits");
  if (missing.test(cell)) return { kind: "missing" };
  if (plain.test(cell)) return finite(cell, (value) => ({ kind: "value", value }));
  return problem(/^[+-]?(?:nan|inf(?:inity)?)$/i.test(cell) ? "not-finite" : "not-a-reading");
}

function finite(text: string, make: (value: number) => Reading): ReadCell {
  const value = Number(text);
  return Number.isFinite(value) ? reading(make(value)) : problem("not-finite");
}

function interval(low: number, high: number): ReadCell {
  if (!Number.isFinite(low) || !Number.isFinite(high)) return problem("not-finite");
  if (low > high) return problem("interval-reversed");
  return reading({ kind: "between", low, high });
}

const polarities = new Map([
  ["n", 1],
  ["normal", 1],
  ["1", 1],
  ["+1", 1],
  ["r", -1],
  ["reversed", -1],
  ["reverse", -1],
  ["-1", -1],
]);

/** Reads a polarity cell: normal is 1, reversed is -1. */
export function readPolarityCell(text: string): ReadCell {
  const cell = text.trim().toLowerCase();
  if (missing.test(cell)) return { kind: "missing" };
  const value = polarities.get(cell);
  return value === undefined ? problem("not-a-polarity") : reading({ kind: "value", value });
}

/** A reading times a factor, to its canonical unit. */
export function scaleReading(reading: Reading, factor: number): Reading {
  switch (reading.kind) {
    case "value":
      return { kind: "value", value: reading.value * factor };
    case "below":
    case "above":
      return { kind: reading.kind, limit: reading.limit * factor };
    case "between":
      return { kind: "between", low: reading.low * factor, high: reading.high * factor };
    default:
      return reading satisfies never;
  }
}

/** Every number of a reading. */
export function readingNumbers(reading: Reading): readonly number[] {
  switch (reading.kind) {
    case "value":
      return [reading.value];
    case "below":
    case "above":
      return [reading.limit];
    case "between":
      return [reading.low, reading.high];
    default:
      return reading satisfies never;
  }
}

/** The size of a reading that a percent error refers to: the value, the limit, or the middle. */
export function readingSize(reading: Reading): number {
  switch (reading.kind) {
    case "value":
      return reading.value;
    case "below":
    case "above":
      return reading.limit;
    case "between":
      return (reading.low + reading.high) / 2;
    default:
      return reading satisfies never;
  }
}

import { oneSigma } from "../errors.ts";
import type { Measurement, Reading } from "../model.ts";
import { readingNumbers, readingSize, readPolarityCell, readValueCell, scaleReading } from "../readings.ts";
import { settingPath } from "../setting-path.ts";
import type { RowOf } from "../tables/declare.ts";
import { measurements } from "../tables/measurements.ts";
import { isTrace, type MeasurementUnit, measurementUnit, measurementUnitsInWords } from "../units.ts";
import { plainAnalyte } from "./analyte-names.ts";
import { isSound, scaleRegister, tellBelowLimit } from "./check-readings.ts";
import { type Assembly, type BySection, gather, present, type ReadSheet, type Row } from "./context.ts";
import { type Frames, frameFor } from "./frame-for.ts";
import { onlyNumber } from "./one-mend.ts";
import { type Place, placeOf } from "./place.ts";
import type { SampleLists } from "./read-samples.ts";
import { rowsOf } from "./rows.ts";

type MeasurementRow = Row<typeof measurements>;

/** Every usable measurement by section, in the canonical unit of its quantity. */
export function readMeasurements(
  frames: Frames,
  samples: SampleLists,
  assembly: Assembly,
): BySection<Measurement> {
  const read = assembly.sheets.get("measurements");
  const lists = new Map<string, Measurement[]>();
  if (!read) return lists;
  const isOnScale = scaleRegister(assembly);
  for (const row of rowsOf(measurements, assembly)) {
    const { cells, origin } = row;
    const frame = frameFor(cells.section, origin, { frames, read, assembly });
    const place = frame && placeOf(cells, frame, { origin, samples, assembly });
    if (!frame || !place) continue;
    const value = valueOf(row, read, assembly);
    const amountUnit = row.cells.amount_unit ?? read.hints.get("amount")?.bracket;
    if (value && row.cells.amount !== undefined && amountUnit === undefined) tellAmount(row, read, assembly);
    if (value && isOnScale(row, value.unit.scale))
      gather(
        lists,
        frame.name,
        measurementOf(row, place, { ...value, amountUnit, density: frame.declared.densityGCm3 }),
      );
  }
  return lists;
}

interface Value {
  readonly reading: Reading;
  readonly unit: MeasurementUnit;
  readonly givenUnit: string;
  readonly sigma?: number;
}

function valueOf({ cells, origin }: MeasurementRow, read: ReadSheet, assembly: Assembly): Value | undefined {
  const analyte = plainAnalyte(cells.analyte);
  const givenUnit = cells.unit || (read.hints.get("value")?.bracket ?? "");
  if (givenUnit === "") {
    tellUnitless({ cells, origin }, read, assembly);
    return undefined;
  }
  const unit = measurementUnit(givenUnit, analyte);
  if (unit === undefined || unit === "refused") {
    const code = unit === undefined ? "unknown-unit" : "ambiguous-ppt";
    assembly.problems.add(code, {
      ...origin,
      column: "unit",
      found: givenUnit,
      detail: measurementUnitsInWords,
    });
    return undefined;
  }
  const cell =
    unit.quantity === "polarity"
      ? readPolarityCell(cells.value)
      : readValueCell(cells.value, cells.detection_limit);
  if (cell.kind === "missing") {
    assembly.problems.addOnce(analyte, "value-missing", { ...origin, column: "value", found: cells.value });
    return undefined;
  }
  if (cell.kind === "problem") {
    const now = cell.code === "not-a-reading" ? onlyReading(cells, unit, read) : undefined;
    assembly.problems.add(cell.code, { ...origin, column: "value", found: cells.value, now });
    return undefined;
  }
  const { reading } = cell;
  if (!isSound({ cells, origin }, reading, assembly)) return undefined;
  tellBelowLimit({ cells, origin }, reading, assembly);
  if (reading.kind === "value" && reading.value === 0 && isTrace(unit)) {
    assembly.problems.addOnce(analyte, "trace-zero", { ...origin, column: "value", found: cells.value });
  }
  const value = {
    reading: scaleReading(reading, unit.factor),
    unit,
    givenUnit,
    sigma: sigmaOf(cells, reading, unit),
  };
  const largest = unit.quantity === "mass-fraction" ? wholeRockNgG : largestReading;
  const sizes = [
    ...readingNumbers(value.reading),
    value.sigma ?? 0,
    (cells.detection_limit ?? 0) * unit.factor,
  ];
  const isBeyond = sizes.some(
    (size) => !(Math.abs(size) <= largest) || (size !== 0 && Math.abs(size) < smallestReading),
  );
  const isLimitless = reading.kind === "below" && unit.quantity === "mass-fraction" && !(reading.limit > 0);
  if (!isBeyond && !isLimitless) return value;
  const detail = isLimitless
    ? "above 0 as the limit of detection"
    : `within ${largest / unit.factor} of zero and no smaller than ${smallestReading / unit.factor}, its error and detection limit too,`;
  assembly.problems.add("out-of-limits", { ...origin, column: "value", found: cells.value, detail });
  return undefined;
}

/** No unit is assumed of values in a table without a column for it. */
function tellUnitless({ cells, origin }: MeasurementRow, read: ReadSheet, { problems }: Assembly): void {
  const header = read.hints.get("value")?.header ?? "value";
  const detail = settingPath(["tables", read.sheet.file, "columns", header, "unit"]);
  problems.addOnce("unit", "values-without-unit", { ...origin, column: "value", found: cells.value, detail });
}

/** An amount of no unit cannot be set beside another. */
function tellAmount({ cells, origin }: MeasurementRow, read: ReadSheet, { problems }: Assembly): void {
  const header = read.hints.get("amount")?.header ?? "amount";
  const detail = settingPath(["tables", read.sheet.file, "columns", header, "unit"]);
  const found = String(cells.amount);
  problems.addOnce("amount", "amount-without-unit", { ...origin, column: "amount", found, detail });
}

/** A value that carries its unit, or the other decimal sign. */
function onlyReading(
  { value, analyte }: RowOf<typeof measurements>,
  { factor, quantity }: MeasurementUnit,
  { sheet }: ReadSheet,
): string | undefined {
  const isOwnUnit = (written: string) => {
    const unit = measurementUnit(written, plainAnalyte(analyte));
    return typeof unit === "object" && unit.factor === factor && unit.quantity === quantity;
  };
  return onlyNumber(value, { decimal: sheet.dialect.decimal, isOwnUnit });
}

/** A content of 100 % by mass. */
const wholeRockNgG = 1e9;

/** No isotope ratio, count or other reading is larger, and none but 0 smaller; their squares are far from what a double holds. */
const largestReading = 1e15;
const smallestReading = 1e-20;

function sigmaOf(
  cells: RowOf<typeof measurements>,
  reading: Reading,
  unit: MeasurementUnit,
): number | undefined {
  if (cells.error === undefined || cells.error_kind === undefined) return undefined;
  return oneSigma(cells.error, cells.error_kind, readingSize(reading)) * unit.factor;
}

interface OfSample {
  readonly amountUnit?: string;
  readonly density?: number;
}

function measurementOf(
  { cells, origin }: MeasurementRow,
  place: Place,
  { reading, unit, givenUnit, sigma, amountUnit, density }: Value & OfSample,
): Measurement {
  const limit = cells.detection_limit;
  return {
    analyte: plainAnalyte(cells.analyte),
    quantity: unit.quantity,
    ...present({ sample: place.sample?.name }),
    baseM: place.baseM,
    topM: place.topM,
    heightM: place.heightM,
    reading,
    unit: unit.unit,
    givenValue: cells.value,
    givenUnit,
    ...present({ sigma, detectionLimit: limit === undefined ? undefined : limit * unit.factor }),
    ...present({
      trials: cells.trials,
      amount: cells.amount,
      amountUnit: cells.amount === undefined ? undefined : amountUnit,
      method: cells.method,
    }),
    ...present({ densityGCm3: place.sample?.densityGCm3 ?? density }),
    origin,
  };
}

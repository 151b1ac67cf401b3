import type { Reading } from "../model.ts";
import type { measurements } from "../tables/measurements.ts";
import { plainAnalyte } from "./analyte-names.ts";
import { type Assembly, gather, type Row } from "./context.ts";

type MeasurementRow = Row<typeof measurements>;

/** Tells, for the rows of one table in turn, whether the scale of an isotope ratio is that of the rows before. */
export function scaleRegister({
  problems,
}: Assembly): (row: MeasurementRow, scale: string | undefined) => boolean {
  const known = new Map<string, { readonly scale: string; readonly row: number }>();
  const unsaid = new Map<string, MeasurementRow[]>();
  return (row, scale) => {
    const key = JSON.stringify([row.cells.section, plainAnalyte(row.cells.analyte)]);
    if (scale === undefined) gather(unsaid, key, row);
    const first = known.get(key) ?? (scale === undefined ? undefined : { scale, row: row.origin.row });
    if (first === undefined) return true;
    known.set(key, first);
    const detail = `${first.scale}, as in row ${first.row}`;
    const placeOf = ({ cells, origin }: MeasurementRow) => ({
      ...origin,
      column: "unit",
      found: cells.unit,
      detail,
    });
    for (const bare of unsaid.get(key) ?? []) problems.addOnce(key, "isotope-scale-unsaid", placeOf(bare));
    unsaid.delete(key);
    if (scale === undefined || scale === first.scale) return true;
    problems.addOnce(JSON.stringify([key, scale]), "isotope-scale-mixed", placeOf(row));
    return false;
  };
}

/** Trials bound the successes; an error must say what it is. */
export function isSound({ cells, origin }: MeasurementRow, reading: Reading, assembly: Assembly): boolean {
  if (cells.error !== undefined && cells.error_kind === undefined) {
    assembly.problems.add("error-kind-missing", { ...origin, column: "error_kind", found: "" });
    return false;
  }
  if (cells.trials === undefined || reading.kind !== "value") return true;
  if (reading.value < 0 || reading.value > cells.trials || !Number.isInteger(reading.value)) {
    assembly.problems.add("more-successes", {
      ...origin,
      column: "value",
      found: `${cells.value} of ${cells.trials}`,
    });
    return false;
  }
  return true;
}

/** A number under the limit of detection: an estimate that is worth keeping, or a limit that lost its sign. */
export function tellBelowLimit(
  { cells, origin }: MeasurementRow,
  reading: Reading,
  { problems }: Assembly,
): void {
  const limit = cells.detection_limit;
  if (limit === undefined || reading.kind !== "value" || reading.value >= limit || reading.value === 0)
    return;
  const subject = plainAnalyte(cells.analyte);
  const detail = String(limit);
  problems.addOnce(subject, "below-detection-limit", {
    ...origin,
    column: "value",
    found: cells.value,
    detail,
  });
}

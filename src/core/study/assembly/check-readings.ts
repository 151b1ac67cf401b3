import type { Reading } from "../model.ts";
import type { measurements } from "../tables/measurements.ts";
import { plainAnalyte } from "./analyte-names.ts";
import type { Assembly, Row } from "./context.ts";

type MeasurementRow = Row<typeof measurements>;

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

import type { Analysis } from "../../core/analysis-result.ts";
import { alignmentTable, tiesTable } from "./alignment.ts";
import { candidatesTable, findsTable } from "./finds.ts";
import { lastFindsTable } from "./last-finds.ts";
import { anomaliesTable, flagsTable, markersTable } from "./markers.ts";
import { membershipTable } from "./membership.ts";
import { offsetsTable } from "./offsets.ts";
import { rangeEndsTable } from "./ranges.ts";
import type { ResultDeclaration, ResultTable } from "./result-table.ts";
import { scenariosTable } from "./scenarios.ts";
import { timingTable } from "./timing.ts";

/** Every result table, in the order of the flow. */
export const resultDeclarations: readonly ResultDeclaration[] = [
  findsTable,
  markersTable,
  flagsTable,
  anomaliesTable,
  alignmentTable,
  tiesTable,
  candidatesTable,
  rangeEndsTable,
  timingTable,
  scenariosTable,
  offsetsTable,
  membershipTable,
  lastFindsTable,
];

/** The result tables of an analysis, as they are written to CSV. */
export function resultTables(analysis: Analysis): readonly ResultTable[] {
  return resultDeclarations.map((declaration) => declaration.fill(analysis));
}

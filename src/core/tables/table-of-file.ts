import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import { tables } from "../study/tables/index.ts";
import { tablePath } from "./dialect/declared.ts";
import { type FilePlan, type OtherPlans, type PlannedFile, plansByColumns } from "./file-plan.ts";
import { MOST_BYTES } from "./limits.ts";

export type StudyTable = (typeof tables)[number];

/** A file that may be a table. */
export interface CandidateFile extends PlannedFile {
  readonly file: string;
  readonly path: string;
}

/** The name of the sheet in a workbook, where the file is one. */
export const sheetName = (file: string): string | undefined =>
  /\[(.*)\]$/.exec(file)?.[1].trim() || undefined;

/** The table's own name in a file's name; a sheet of a workbook stands in brackets behind the workbook's name. */
export function tableNamed(file: string): StudyTable | undefined {
  const name = sheetName(file) ?? (/^(.*)\.(?:csv|tsv|tab|txt)$/i.exec(file)?.[1] || undefined);
  const plain = name
    ?.trim()
    .toLowerCase()
    .replace(/[\s_]+/g, "-");
  return tables.find(({ name }) => name === plain);
}

const isTableFile = (file: string): boolean => /(?:\.(?:csv|tsv|tab|txt)|\])$/i.test(file);

/** How an oddly named file is to be read by its columns, told; undefined, told, where it is no table or could be several. */
export function planByColumns(
  candidate: CandidateFile,
  others: OtherPlans,
  problems: ProblemList,
): FilePlan | undefined {
  const { file, path, bytes } = candidate;
  const plans = isTableFile(file) && bytes.byteLength <= MOST_BYTES ? plansByColumns(candidate, others) : [];
  const names = plans.map((plan) => (plan.kind === "wide" ? "occurrences" : plan.table.name));
  if (plans.length === 1) {
    const [plan] = plans;
    // A wide sheet is told as such when it is read.
    if (plan.kind === "long")
      problems.add("taken-as", { file, found: file, detail: plan.table.name, nearest: tablePath(file) });
    return plan;
  }
  const nearest = suggestName(
    file,
    tables.map(({ name }) => `${name}.csv`),
  );
  const detail = plans.length > 1 ? names.map((name) => `${name}.csv`).join(" or ") : undefined;
  problems.add("unknown-file", { file: path, found: file, detail, nearest });
  return undefined;
}

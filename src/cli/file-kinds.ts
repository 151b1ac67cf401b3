import { tables } from "../core/study/tables/index.ts";

/** Endings of a single file that can be a study or a table of one. */
const ending = /\.(?:csv|tsv|tab|txt|xlsx|xlsm|xls|ods|zip)$/i;

/** A study's name from that of its file or folder. */
export const withoutEnding = (name: string): string => name.replace(ending, "");

/** True for a file that is named as a table of a study, in whatever form. */
export function isStudyTable(name: string): boolean {
  const stem = withoutEnding(name);
  if (stem === name) return false;
  const plain = stem.toLowerCase().replace(/[\s_]+/g, "-");
  return tables.some((table) => table.name === plain);
}

import type { Section, Sheet, Study } from "../core/study/model.ts";
import { columnOccurrences } from "../core/study/occurrence-list.ts";
import { columnRows } from "../core/study/sheet-rows.ts";

/** A message carries data alone: what makes its items when they are asked for arrives as its columns. */
export const receivedStudy = <T extends Pick<Study, "sheets" | "sections">>(study: T): T => ({
  ...study,
  sheets: receivedSheets(study.sheets),
  sections: study.sections.map(receivedSection),
});

export const receivedSheets = (sheets: readonly Sheet[]): readonly Sheet[] =>
  sheets.map((sheet) => {
    const { columns, length } = sheet.rows;
    return columns === undefined ? sheet : { ...sheet, rows: columnRows(columns, length) };
  });

function receivedSection(section: Section): Section {
  const { columns } = section.occurrences;
  return columns === undefined ? section : { ...section, occurrences: columnOccurrences(columns) };
}

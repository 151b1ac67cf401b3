export { formatGiven, givenToHeight, heightToGiven, type OwnScale } from "./study/heights.ts";
export type * from "./study/model.ts";
export { suggestName } from "./study/nearest.ts";
export type { Fix, Problem } from "./study/problem.ts";
export type * from "./study/recognised.ts";
export {
  knownSettingPaths,
  mergeSettings,
  type SetSetting,
  setSetting,
  settingPath,
} from "./study/setting-path.ts";
export { defaultSettings, type Settings, settingsSchema } from "./study/settings.ts";
export { tablesGuide } from "./study/table-guide.ts";
export { tableSchema } from "./study/table-schema.ts";
export {
  type ColumnDeclaration,
  type TableDeclaration,
  type TableName,
  tables,
} from "./study/tables/index.ts";
export { readWrittenCsv } from "./tables/csv.ts";
export { type PackageResource, tableResource, writeDataPackage } from "./tables/data-package.ts";
export { readSources } from "./tables/read-sources.ts";
export { type ReadStudyOptions, readStudy } from "./tables/read-study.ts";
export { packStudy } from "./tables/sources/pack-study.ts";
export { packWorkbook, type WorkbookTable } from "./tables/sources/pack-workbook.ts";
export { pastedFile } from "./tables/sources/pasted.ts";
export { studyTemplate } from "./tables/templates.ts";
export { type CsvCell, type WrittenCsv, writeCsv } from "./tables/write-csv.ts";

import { plural } from "../../report/wordings/words.ts";
import { handOver } from "../hand-over.ts";
import { type History, heldEdits } from "../tables/history.ts";
import { desk } from "./desk.ts";
import { canWriteFolders, writeFolder } from "./folder.ts";
import type { ReadOut } from "./read-out.ts";

const WORKBOOK = "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet";

/** Hands over one table of the study as it is now, as its file; what a person should know of it. */
export async function giveOutTable(study: ReadOut, history: History, file: string): Promise<string> {
  const { files, edits, to } = parts(study, history);
  const table = await desk().table(files, edits, { ...to, file });
  if (table === undefined) return `${file} could not be saved: it is no table of the study.`;
  handOver(table.name, new Uint8Array(table.bytes), "text/csv");
  if (table.formulas === 0) return `${table.name} saved.`;
  return `${table.name} saved as it stands: ${plural(table.formulas, "cell")} would run as a formula in a spreadsheet. The zip and the workbook guard them.`;
}

/** Hands over the whole study as it is now, as a data package in a zip. */
export async function giveOutStudy(study: ReadOut, history: History): Promise<string> {
  const { files, edits, to } = parts(study, history);
  const bytes = await desk().packed(files, edits, to);
  const name = `${to.name}.zip`;
  handOver(name, new Uint8Array(bytes), "application/zip");
  return `${name} saved.`;
}

/** Hands over the tables as they are now, as a workbook of a sheet each. */
export async function giveOutWorkbook(study: ReadOut, history: History): Promise<string> {
  const { files, edits, to } = parts(study, history);
  const bytes = await desk().workbook(files, edits, to);
  const name = `${to.name}.xlsx`;
  handOver(name, new Uint8Array(bytes), WORKBOOK);
  return `${name} saved: the tables alone. Settings go into the zip.`;
}

/** Writes the whole study as it is now into a new folder inside one that the person chooses; a zip where no folder can be. */
export async function giveOutFolder(study: ReadOut, history: History): Promise<string> {
  if (!canWriteFolders()) {
    const said = await giveOutStudy(study, history);
    return `This browser writes no folders: ${said}`;
  }
  const { files, edits, to } = parts(study, history);
  const folder = await writeFolder(to.name, () => desk().files(files, edits, to));
  return folder === undefined ? "Nothing was saved." : `Saved in the new folder ${folder}.`;
}

/** The tables of the study without their rows, which the files hold. */
function parts({ given, tables, study }: ReadOut, history: History) {
  const now = new Map(study.sheets.map((sheet) => [sheet.file, sheet]));
  const forms = tables.map(({ file, table, headers, dialect, columns }) => ({
    file,
    table: table ?? now.get(file)?.table,
    headers,
    dialect,
    columns: now.get(file)?.columns ?? columns,
  }));
  return { files: given.files, edits: heldEdits(history), to: { name: study.name, forms } };
}

import { tables } from "../../../src/core/study/tables/index.ts";
import { tableResource, writeDataPackage } from "../../../src/core/tables/data-package.ts";
import { trueRange } from "./fossils.ts";
import { choicesTable, settingsJson } from "./settings.ts";
import { studyTables } from "./tables.ts";
import { readTruth, type Truth } from "./truth.ts";

/** True first and last level of every taxon in every section, m; blank where it lies beyond the section. */
export interface TrueLevel {
  readonly section: string;
  readonly taxon: string;
  readonly end: string;
  readonly firstM?: number;
  readonly lastM?: number;
}

export const trueLevels = (truth: Truth): TrueLevel[] =>
  truth.sections.flatMap((section) =>
    truth.taxa.map((taxon) => ({
      section: section.section,
      taxon: taxon.name,
      end: taxon.end,
      ...trueRange(taxon, section, truth),
    })),
  );

/** The whole study folder from the text of truth.json: file name to contents. */
export const exampleStudy = (truthText: string): Map<string, string> => studyFiles(readTruth(truthText));

/** The study folder of any truth, the written one or a variant of it. */
export function studyFiles(truth: Truth): Map<string, string> {
  const files = studyTables(truth)
    .set("choices.csv", choicesTable(truth))
    .set("settings.json", settingsJson(truth));
  return files.set("datapackage.json", packageJson([...files.keys()]));
}

/** What the folder holds, and the study's title. */
function packageJson(files: readonly string[]): string {
  const held = tables.filter(({ name }) => files.includes(`${name}.csv`));
  return writeDataPackage(
    "veyra-shelf",
    held.map((table) => tableResource(table)),
    "Veyra Shelf",
  );
}

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
export function exampleStudy(truthText: string): Map<string, string> {
  const truth = readTruth(truthText);
  return studyTables(truth).set("choices.csv", choicesTable(truth)).set("settings.json", settingsJson(truth));
}

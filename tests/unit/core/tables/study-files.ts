import type { Study } from "../../../../src/core/study/model.ts";
import type { Problem } from "../../../../src/core/study/problem.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const encoder = new TextEncoder();

/** A study read from texts by file name. */
export const studyFrom = (files: Record<string, string>, settings?: unknown): Study =>
  readStudy(new Map(Object.entries(files).map(([name, text]) => [name, encoder.encode(text)])), { settings });

/** Lines as a CSV text. */
export const lines = (...rows: readonly string[]): string => `${rows.join("\n")}\n`;

export const sections = lines("section,axis,unit,datum", "Orskel Ledge,height,m,lowest bed");

export const problemsOf = (study: Study, code: string): readonly Problem[] =>
  study.problems.filter((problem) => problem.code === code);

export const errorsOf = (study: Study): readonly Problem[] =>
  study.problems.filter(({ severity }) => severity === "error");

export const onlySection = (study: Study) => {
  if (study.sections.length !== 1) throw new Error(`expected one section, got ${study.sections.length}`);
  const [section] = study.sections;
  return { ...section, occurrences: [...section.occurrences] };
};

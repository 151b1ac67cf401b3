import { describe, expect, it } from "vitest";
import { readSources } from "../../../../../src/core/tables/read-sources.ts";
import { archives } from "./archives.ts";
import { bytesOf } from "./awkward-file.ts";
import { dialects } from "./dialects.ts";
import { wideAndForeign } from "./wide-and-foreign.ts";

/** What any study of few finds is told. */
const usual = new Set(["one-occurrence", "one-level", "ungrouped", "searches-derived"]);

describe("awkward files", () => {
  it.each([...dialects, ...archives, ...wideAndForeign])(
    "$title",
    async ({ files, settings, finds, told }) => {
      const given = new Map(Object.entries(files).map(([name, content]) => [name, bytesOf(content)]));
      const study = await readSources(given, { settings });
      const found = study.sections.flatMap((section) =>
        Array.from(section.occurrences, ({ verbatim, heightM }) => [
          section.name,
          verbatim,
          Number(heightM.toFixed(9)),
        ]),
      );
      expect(study.problems.map(({ code }) => code).filter((code) => !usual.has(code))).toEqual(told);
      expect(found).toEqual(finds);
      expect(study.files).toEqual([...given].map(([name, bytes]) => ({ name, bytes })));
    },
  );
});

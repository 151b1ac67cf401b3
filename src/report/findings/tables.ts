import type { Analysis } from "../../core/analysis-result.ts";
import type { FindReason } from "../../core/study/finds-result.ts";
import type { Study } from "../../core/study/model.ts";
import { list, plural, say, strong } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";

/** What was read, and what stands in the way. */
export function tablesFinding({ study, taxa, finds }: Analysis): Finding {
  const names = new Set(taxa.map((taxon) => taxon.taxon));
  const errors = study.problems.filter((problem) => problem.severity === "error").length;
  const cautions = study.problems.length - errors;
  const setAside = finds.filter((find) => find.used === "no").length;
  const mapped = finds.filter((find) => find.reason === "fault-repeat-mapped").length;
  const state =
    errors > 0
      ? say` ${strong(plural(errors, "error"))} must be mended; what is unusable is left out.`
      : say` Nothing had to be left out for errors.`;
  return {
    station: "tables",
    sentence: say`${strong(plural(study.sections.length, "section"))} with ${heldWords(study)} of ${plural(names.size, "taxon", "taxa")} were read.${state}`,
    numbers: [
      { label: "Tables read", value: String(study.sheets.length) },
      { label: "Errors", value: String(errors) },
      { label: "Cautions", value: String(cautions) },
      { label: "Finds set aside by the rules", value: String(setAside), note: list(reasons(finds), 4) },
      ...(mapped > 0
        ? [{ label: "Finds mapped from a repeated passage to the first", value: String(mapped) }]
        : []),
    ],
    weaknesses: [],
    methods: [],
  };
}

/** What the sections hold, in words; finds are left out where there are published ranges alone. */
export function heldWords({ sections }: Pick<Study, "sections">): string {
  const count = (of: "samples" | "occurrences" | "publishedRanges") =>
    sections.reduce((sum, section) => sum + section[of].length, 0);
  const ranges = count("publishedRanges");
  const published = ranges === 0 ? [] : [plural(ranges, "published range")];
  const isPublishedAlone = ranges > 0 && count("samples") === 0 && count("occurrences") === 0;
  const found = [plural(count("samples"), "sample"), plural(count("occurrences"), "find")];
  return list(isPublishedAlone ? published : [...found, ...published]);
}

function reasons(finds: Analysis["finds"]): string[] {
  const counts = new Map<FindReason, number>();
  for (const find of finds)
    if (find.used === "no") counts.set(find.reason, (counts.get(find.reason) ?? 0) + 1);
  return [...counts]
    .toSorted((a, b) => b[1] - a[1])
    .map(([reason, count]) => `${count} ${reasonWords[reason]}`);
}

const reasonWords: Readonly<Record<FindReason, string>> = {
  used: "used",
  "same-horizon": "of a horizon already counted",
  "zero-count": "looked for and not found",
  qualifier: "with cf. or ?",
  "genus-doubtful": "of a doubtful genus",
  affinity: "with aff.",
  "not-to-species": "not named to species",
  reworked: "reworked",
  "reworking-suspected": "suspected of reworking",
  doubtful: "doubtful",
  "fault-repeat": "in a repeated passage",
  "fault-repeat-mapped": "mapped from a repeated passage to the first",
  "no-recovery": "in rock that could not be searched",
  "below-reworking-ceiling": "within reach of mixing",
};

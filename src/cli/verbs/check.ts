import { readSources } from "../../core/tables/read-sources.ts";
import { jobOf } from "../job.ts";
import { hasErrors, problemCount, problemLines } from "../problem-lines.ts";
import type { Screen } from "../screen.ts";
import type { VerbOptions } from "./verb.ts";

/** Reads and validates a study, writes nothing; exit 1 on errors. */
export async function check(path: string, options: VerbOptions, screen: Screen): Promise<number> {
  const { name, files, settings } = await jobOf(path, options);
  const study = await readSources(files, { name, settings });
  screen.say(`${study.name}: ${problemCount(study.problems)}`);
  screen.say(problemLines(study.problems));
  screen.document({
    command: "check",
    problems: study.problems,
    summary: {
      study: study.name,
      sections: study.sections.map((section) => ({
        section: section.name,
        samples: section.samples.length,
        occurrences: section.occurrences.length,
        measurements: section.measurements.length,
      })),
    },
    files: [],
  });
  return hasErrors(study.problems) ? 1 : 0;
}

import type { Analysis } from "../core/analysis-result.ts";
import { findings } from "./findings/index.ts";
import { plain } from "./wordings/words.ts";

/** One section of the summary: a heading and its sentences, in the order of the argument. */
export interface SummaryPart {
  readonly heading: string;
  readonly sentences: readonly string[];
  readonly warnings: readonly string[];
}

/** The result as a person would tell it: the study, the fence, then each section. */
export function summary(analysis: Analysis): readonly SummaryPart[] {
  const all = findings(analysis).filter((finding) => !finding.set?.startsWith("group:"));
  const part = (heading: string, chosen: typeof all): SummaryPart => ({
    heading,
    sentences: chosen.map((finding) => plain(finding.sentence)),
    warnings: [
      ...new Set(
        chosen.flatMap((finding) =>
          finding.weaknesses
            .filter(({ severity, code }) => severity === "warning" || code === "timing-survivors")
            .map((weakness) => plain(weakness.words)),
        ),
      ),
    ],
  });
  const whole = all.filter((finding) => finding.section === undefined);
  return [
    part(analysis.study.name, whole),
    ...analysis.study.sections.map((section) =>
      part(
        section.title,
        all.filter((finding) => finding.section === section.name),
      ),
    ),
  ];
}

import type { Analysis } from "../core/analysis-result.ts";
import { findings } from "./findings/index.ts";
import { plain } from "./wordings/words.ts";

/** One section of the summary: a heading and its sentences, in the order of the argument. */
export interface SummaryPart {
  readonly heading: string;
  readonly sentences: readonly string[];
  readonly warnings: readonly string[];
}

/** The result as a person would tell it: the study, the fence, all sections together, then each. */
export function summary(analysis: Analysis): readonly SummaryPart[] {
  const all = findings(analysis).filter((finding) => !finding.set?.startsWith("group:"));
  const part = (heading: string, chosen: typeof all): SummaryPart => ({
    heading,
    sentences: chosen.map((finding) => plain(finding.sentence)),
    warnings: [
      ...new Set(
        chosen.flatMap((finding) =>
          finding.weaknesses
            .filter(({ severity, code }) => severity === "warning" || code?.endsWith("-survivors"))
            .map((weakness) => plain(weakness.words)),
        ),
      ),
    ],
  });
  const whole = all.filter((finding) => finding.section === undefined);
  const together = all.filter((finding) => finding.section === "joint");
  return [
    part(analysis.study.name, whole),
    ...(together.length > 0 ? [part("All sections together", together)] : []),
    ...analysis.study.sections.map((section) =>
      part(
        section.title,
        all.filter((finding) => finding.section === section.name),
      ),
    ),
  ];
}

import type { Analysis } from "../../core/analysis-result.ts";
import { fenceFinding } from "./fence.ts";
import type { Finding } from "./finding.ts";
import { jointFindings } from "./joint.ts";
import { markersFinding } from "./markers.ts";
import { rangesFinding } from "./ranges.ts";
import { tablesFinding } from "./tables.ts";
import { timingFinding } from "./timing.ts";

/** Every finding of an analysis in words: the study, then section by section what was found. */
export function findings(analysis: Analysis): readonly Finding[] {
  const { sections } = analysis.study;
  return [
    tablesFinding(analysis),
    ...sections.map((section) => markersFinding(analysis, section)),
    fenceFinding(analysis),
    ...jointFindings(analysis),
    ...sections.map((section) => rangesFinding(analysis, section)),
    ...sections.flatMap((section) =>
      analysis.timing.sets
        .filter((set) => set.section === section.name)
        .map((set) => timingFinding(analysis, section, set.set)),
    ),
  ];
}

import { alignSections } from "./alignment/align-sections.ts";
import type { Analysis } from "./analysis-result.ts";
import type { Progress } from "./basis.ts";
import { boundaryIn } from "./markers/boundary.ts";
import { findMarkers } from "./markers/find-markers.ts";
import type { Markers } from "./markers/result.ts";
import { estimateRanges } from "./ranges/range-ends.ts";
import { settleFinds } from "./study/finds.ts";
import type { Study } from "./study/model.ts";
import { assignRoles, type Boundary, markBelowCeiling } from "./study/roles.ts";
import { answerTiming } from "./timing/answer.ts";

const quiet: Progress = () => {};

/**
 * The whole flow: markers are found, sections lined up, finds and taxa settled, true ends estimated and the
 * assemblage questioned. Pure: the same study gives the same bits.
 *
 * @example
 * const study = readStudy(files);
 * const analysis = analyse(study);
 * analysis.timing.answers.filter((answer) => answer.question === "one-level");
 */
export function analyse(study: Study, progress: Progress = quiet): Analysis {
  return analyseFrom(findMarkers(study, progress), study, progress);
}

/** The flow from the markers on: for callers that surveyed the sections apart. */
export function analyseFrom(markers: Markers, study: Study, progress: Progress = quiet): Analysis {
  const alignment = alignSections(study, markers);
  const settled = settleFinds(study);
  const boundaries = new Map<string, Boundary>();
  for (const section of study.sections) {
    const boundary = boundaryIn(section.name, markers, study);
    if (boundary !== undefined) boundaries.set(section.name, boundary);
  }
  const assigned = study.sections.map((section) =>
    assignRoles({
      section,
      taxa: settled.taxa.filter((taxon) => taxon.section === section.name),
      boundary: boundaries.get(section.name),
      settings: study.settings,
    }),
  );
  const candidates = assigned.flatMap((a) => a.candidates);
  const taxa = assigned.flatMap((a) => a.taxa);
  const finds = markBelowCeiling(settled.finds, candidates, boundaries);
  const ranges = estimateRanges(study, { taxa, candidates, markers }, progress);
  const untrimmed = settled.taxa;
  const timing = answerTiming(study, { taxa, candidates, markers, ranges, untrimmed, alignment }, progress);
  return { study, markers, alignment, finds, taxa, candidates, ranges, timing };
}

import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import type { Finding } from "./finding.ts";
import { timingCase } from "./timing-case.ts";
import { timingNumbers } from "./timing-numbers.ts";
import { timingSentence } from "./timing-sentence.ts";

/** What a set of taxa in one section answers: the scenarios weighed, where their levels lie, how gradual it could be. */
export function timingFinding(analysis: Analysis, section: Section, set: string): Finding {
  const { timing, study } = analysis;
  const told = timingCase(analysis, section, set);
  const cautions = timing.cautions.filter(
    (c) =>
      (c.section === undefined || c.section === section.name) &&
      (c.subject === undefined || c.subject === set),
  );
  return {
    station: "timing",
    section: section.name,
    set,
    sentence: timingSentence(told),
    numbers: timingNumbers(told),
    weaknesses: cautions.toSorted((a, b) => rank(a.code) - rank(b.code)).map((c) => weaknessOf(c, study)),
    methods: timing.basis,
  };
}

/** What can change the answer most stands first; all others follow in the order in which they were found. */
const GRAVEST: readonly string[] = [
  "timing-recovery-declines",
  "scenario-order-changes",
  "scenario-leans-on-recovery",
  "timing-turns-on-top",
  "timing-turns-on-isolated",
  "timing-turns-on-trimming",
  "scenario-horizon-favoured",
  "scenario-level-mixed",
  "scenario-mass-at-edge",
  "timing-aligned-too-well",
  "timing-less-effort-above",
  "timing-clustered-at-surfaces",
  "scenario-pulses-too-near",
  "timing-one-level-rejected",
  "timing-no-common-end",
  "timing-isolated-finds",
];

function rank(code: string): number {
  const place = GRAVEST.indexOf(code);
  return place < 0 ? GRAVEST.length : place;
}

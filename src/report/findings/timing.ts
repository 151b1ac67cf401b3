import type { Analysis } from "../../core/analysis-result.ts";
import type { Section } from "../../core/study/model.ts";
import { isAlignedTooWell, rejectsOneLevel } from "../../core/timing/common-end.ts";
import type { TimingAnswer, TimingMethod } from "../../core/timing/result.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { inMetres, offsetInterval, percent, positionInterval, pValue } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";
import { isBeyond, timingLine } from "./timing-lines.ts";

/** The sentence that a set of taxa in one section earns: one level or not, where, and how gradual it could still be. */
export function timingFinding(analysis: Analysis, section: Section, set: string): Finding {
  const { timing, study } = analysis;
  const answers = timing.answers.filter(
    (a) => a.section === section.name && a.set === set && a.taxon === undefined,
  );
  const cautions = timing.cautions.filter(
    (c) =>
      (c.section === undefined || c.section === section.name) &&
      (c.subject === undefined || c.subject === set),
  );
  return {
    station: "timing",
    section: section.name,
    set,
    sentence: sentence({ analysis, section, set, answers }),
    numbers: mainFirst(answers, analysis, section).map((answer) => timingLine(answer, section)),
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: timing.basis,
  };
}

/**
 * The answers in their order, but of the horizons the main one first and by one method for the others; and where recovery
 * declines the bound that a decline does not harm before all.
 */
function mainFirst(
  answers: readonly TimingAnswer[],
  analysis: Analysis,
  section: Section,
): readonly TimingAnswer[] {
  const main = analysis.markers.main.bySection.get(section.name);
  const isMain = ({ horizon }: TimingAnswer) => horizon !== undefined && horizon === main?.horizon;
  const atHorizons = answers.filter(({ question }) => question === "at-horizon");
  const first = answers.findIndex(({ question }) => question === "at-horizon");
  const others = answers.filter(({ question }) => question !== "at-horizon");
  const shown = [
    ...atHorizons.filter(isMain),
    ...atHorizons.filter((answer) => !isMain(answer) && answer.method === "confidence-levels"),
  ];
  const ordered = first < 0 ? answers : others.toSpliced(first, 0, ...shown);
  const isDistrusted = analysis.timing.distrusted.some(
    (one) => one.section === section.name && one.set === answers[0]?.set,
  );
  return isDistrusted
    ? [...ordered.filter(isProof), ...ordered.filter((answer) => !isProof(answer))]
    : ordered;
}

/** Whether a decline of recovery lower down does a method no harm. */
const isProof = ({ method }: TimingAnswer) => method === "two-highest";

/** The set in words: `39 candidates`, `8 taxa of ammonoids`, `27 taxa of open-shelf`. */
function taxaOf(set: string, count: number): string {
  if (set === "candidates") return plural(count, "candidate");
  if (set === "candidates-closed") return `${plural(count, "candidate")} that end below the top`;
  if (set === "candidates-without-isolated")
    return `${plural(count, "candidate")} without isolated highest finds`;
  if (set === "candidates-untrimmed")
    return `${plural(count, "candidate")} with finds below the reworking ceiling`;
  if (set === "step:early") return `${plural(count, "taxon", "taxa")} of the declared earlier step`;
  if (set === "step:late") return `${plural(count, "taxon", "taxa")} of the declared later step`;
  return `${plural(count, "taxon", "taxa")} of ${set.replace(/^group:/, "")}`;
}

interface Telling {
  readonly analysis: Analysis;
  readonly section: Section;
  readonly set: string;
  readonly answers: readonly TimingAnswer[];
}

function sentence({ analysis, section, set, answers }: Telling): Words {
  const by = (method: TimingMethod) => answers.find((answer) => answer.method === method);
  const test = by("common-end");
  const taxa = taxaOf(set, test?.taxa ?? 0);
  if (test?.p === undefined)
    return say`${strong(taxa)} in ${section.title}: too few to ask whether they ended together.`;
  const { confidence } = analysis.study.settings;
  const isDistrusted = analysis.timing.distrusted.some(
    (one) => one.section === section.name && one.set === set,
  );
  const gate = isDistrusted
    ? say`${strong("Finds of these taxa thin out upward")}, so what follows is not to be trusted. `
    : [];
  if (rejectsOneLevel(test.p, confidence)) return [...gate, ...rejected(taxa, test, by("duration-lower"))];
  const told = isAlignedTooWell(test.p)
    ? alignedTooWell(taxa, test)
    : notRejected({ analysis, section, set, taxa, test }, by("common-end-given"));
  return [...gate, ...told, ...longestWords(by("duration-box"), section)];
}

function rejected(taxa: string, test: TimingAnswer, shortest: TimingAnswer | undefined): Words {
  const opening = say`One level is ${strong("rejected")} for ${strong(taxa)} (${pValue(test.p ?? 0)}) if recovery is uniform`;
  if (shortest?.low === undefined || shortest.level === undefined) return [...opening, "."];
  return [
    ...opening,
    ...say`; their local disappearance then took at least ${strong(inMetres(shortest.low))} (${percent(shortest.level)}).`,
  ];
}

/** Nothing is said about where: the model of uniform recovery fails from the other side. */
function alignedTooWell(taxa: string, test: TimingAnswer): Words {
  return say`${strong(taxa)} ${strong("cannot be told from one level")} (${pValue(test.p ?? 1)}), but their last finds agree better than chance allows: where they would have ended together is not to be trusted.`;
}

interface Kept {
  readonly analysis: Analysis;
  readonly section: Section;
  readonly set: string;
  readonly taxa: string;
  readonly test: TimingAnswer;
}

/** An offset from the main horizon reaches from one end of both intervals to the other. */
function notRejected({ analysis, section, set, taxa, test }: Kept, where: TimingAnswer | undefined): Words {
  const opening = say`${strong(taxa)} ${strong("cannot be told from one level")} (${pValue(test.p ?? 1)})`;
  if (where?.low === undefined || where.high === undefined || where.level === undefined)
    return [...opening, "."];
  const main = analysis.markers.main.bySection.get(section.name);
  const level = percent(where.level);
  const orHigher = hasLessEffortAbove(analysis, section, set)
    ? ", or higher, since the samples just above their last finds are small"
    : "";
  if (main === undefined)
    return [
      ...opening,
      ...say`; if they ended together, it was at ${strong(positionInterval(section, where.low, where.high))} (${level})${orHigher}.`,
    ];
  const [low, high] = [where.low - main.highM, where.high - main.lowM];
  return [
    ...opening,
    ...say`; if they ended together, it was ${strong(offsetInterval(low, high))} from the main horizon (${level})${orHigher}.`,
  ];
}

const hasLessEffortAbove = ({ timing }: Analysis, section: Section, set: string) =>
  timing.cautions.some(
    (c) => c.code === "timing-less-effort-above" && c.section === section.name && c.subject === set,
  );

/** A duration that the section is too short to hold is told as that: its number says nothing about the rock. */
function longestWords(longest: TimingAnswer | undefined, section: Section): Words {
  if (longest?.high === undefined)
    return say` How long their local disappearance took cannot be bounded from above.`;
  return isBeyond(longest, section)
    ? say` A local disappearance of ${longestOf(longest)} spread over ${strong("more than the whole section")} cannot be excluded.`
    : say` A local disappearance of ${longestOf(longest)} spread over up to ${strong(inMetres(longest.high))} cannot be excluded.`;
}

const longestOf = (longest: TimingAnswer) =>
  longest.taxa === longest.taxaOfSet ? "these taxa" : `the ${longest.taxa} best sampled of them`;

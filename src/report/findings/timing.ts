import type { Analysis } from "../../core/analysis-result.ts";
import type { Outcome } from "../../core/basis.ts";
import type { Section } from "../../core/study/model.ts";
import { isAlignedTooWell, rejectsOneLevel } from "../../core/timing/common-end.ts";
import type { TimingAnswer, TimingMethod } from "../../core/timing/result.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { inMetres, offsetInterval, percent, positionInterval, pValue } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding, NumberLine } from "./finding.ts";

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
    numbers: mainFirst(answers, analysis, section).flatMap((answer) => line(answer, section)),
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: timing.basis,
  };
}

/** The answers in their order, but of the horizons the main one first. */
function mainFirst(
  answers: readonly TimingAnswer[],
  analysis: Analysis,
  section: Section,
): readonly TimingAnswer[] {
  const main = analysis.markers.main.bySection.get(section.name);
  const isMain = ({ horizon }: TimingAnswer) => horizon !== undefined && horizon === main?.horizon;
  const first = answers.findIndex((answer) => answer.method === "confidence-levels");
  if (first < 0) return answers;
  const rest = answers.slice(first);
  return [...answers.slice(0, first), ...rest.filter(isMain), ...rest.filter((answer) => !isMain(answer))];
}

/** The set in words: `39 candidates`, `8 taxa of ammonoids`, `27 taxa of open-shelf`. */
function taxaOf(set: string, count: number): string {
  if (set === "candidates") return plural(count, "candidate");
  if (set === "candidates-closed") return `${plural(count, "candidate")} that end below the top`;
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

const isBeyond = ({ high }: TimingAnswer, { bottomM, topM }: Section) =>
  high !== undefined && high > topM - bottomM;

const longestOf = (longest: TimingAnswer) =>
  longest.taxa === longest.taxaOfSet ? "these taxa" : `the ${longest.taxa} best sampled of them`;

function line(answer: TimingAnswer, section: Section): NumberLine[] {
  const interval =
    answer.low === undefined || answer.high === undefined
      ? undefined
      : positionInterval(section, answer.low, answer.high);
  const level = answer.level === undefined ? "" : `${percent(answer.level)}, `;
  switch (answer.method) {
    case "common-end":
      return answer.p === undefined
        ? [{ label: "All at one level?", value: outcomeWords(answer.outcome) }]
        : [
            {
              label: "All at one level?",
              value: pValue(answer.p),
              note: `${answer.taxa} taxa, exact chi\u2011square`,
            },
          ];
    case "common-end-given":
      return [
        {
          label: "The common level, if there is one",
          value: interval ?? outcomeWords(answer.outcome),
          note: `${level}all taxa pooled`,
        },
      ];
    case "common-end-joint":
      return [
        {
          label: "Levels at which all could have ended",
          value: answer.outcome === "empty" ? "none" : (interval ?? outcomeWords(answer.outcome)),
          note: `${level}none where one level is refuted`,
        },
      ];
    case "confidence-levels":
      return [
        {
          label: `All at ${answer.horizon ?? "the horizon"}?`,
          value: answer.p === undefined ? outcomeWords(answer.outcome) : pValue(answer.p),
          note: `${answer.taxa} taxa, exact Kolmogorov\u2011Smirnov`,
        },
      ];
    case "duration-lower":
      return [
        {
          label: "It took at least",
          value: answer.low === undefined ? outcomeWords(answer.outcome) : inMetres(answer.low),
          note: `${level}all taxa`,
        },
      ];
    case "duration-box":
      return [
        {
          label:
            answer.taxa === answer.taxaOfSet ? "It took at most" : "It took at most, of the best sampled",
          value:
            answer.high === undefined
              ? `not bounded (${outcomeWords(answer.outcome)})`
              : inMetres(answer.high),
          note: `${level}${answer.taxa} of ${answer.taxaOfSet} taxa${isBeyond(answer, section) ? ", longer than the section" : ""}`,
        },
      ];
    case "centroid":
      return [
        {
          label: "Recovery falls upward?",
          value: answer.p === undefined ? outcomeWords(answer.outcome) : pValue(answer.p),
          note: "pooled centroid of finds, one-sided",
        },
      ];
    default:
      return [];
  }
}

function outcomeWords(outcome: Outcome): string {
  return {
    closed: "closed",
    open: "open",
    "leaves-section": "beyond the section",
    "in-hiatus": "inside a gap",
    empty: "none",
    undefined: "cannot be asked of so few finds",
    "not-applicable": "does not apply here",
  }[outcome];
}

import type { Outcome } from "../../core/basis.ts";
import type { Section } from "../../core/study/model.ts";
import type { TimingAnswer, TimingMethod } from "../../core/timing/result.ts";
import {
  inMetres,
  percent,
  positionInterval,
  probability,
  pValue,
  significant,
} from "../wordings/numbers.ts";
import { plural } from "../wordings/words.ts";
import type { NumberLine } from "./finding.ts";

/** One answer as a line of the margin. */
export function timingLine(answer: TimingAnswer, section: Section): NumberLine {
  return lines[answer.method](answer, section);
}

/** True where a duration is longer than the section. */
export const isBeyond = ({ high }: TimingAnswer, { bottomM, topM }: Section): boolean =>
  high !== undefined && high > topM - bottomM;

type Line = (answer: TimingAnswer, section: Section) => NumberLine;

/** A test: its p, or why there is none; where a question was not put, how to put it. */
const test =
  (label: string, note: (answer: TimingAnswer) => string): Line =>
  (answer) => ({
    label,
    value: answer.p === undefined ? outcomeWords(answer.outcome) : pValue(answer.p),
    note: answer.p === undefined && answer.note !== "" ? answer.note : note(answer),
  });

const atHorizon =
  (method: string): Line =>
  (answer, section) =>
    test(`All at ${answer.horizon ?? "the horizon"}?`, ({ taxa }) => `${taxa} taxa, ${method}`)(
      answer,
      section,
    );

/** A set of levels in the section's own unit. */
const levels =
  (label: string, note: (answer: TimingAnswer) => string): Line =>
  (answer, section) => ({
    label,
    value:
      answer.low === undefined || answer.high === undefined
        ? outcomeWords(answer.outcome)
        : positionInterval(section, answer.low, answer.high),
    note: `${levelOf(answer)}${note(answer)}`,
  });

const levelOf = ({ level }: TimingAnswer) => (level === undefined ? "" : `${percent(level)}, `);

const pooledBy = (what: string) => () => `pooled, ${what}`;

const lines: Readonly<Record<TimingMethod, Line>> = {
  "common-end": test("All at one level?", ({ taxa }) => `${taxa} taxa, exact chi\u2011square`),
  "common-end-given": levels("The common level, if there is one", () => "all taxa pooled"),
  "common-end-joint": levels("Levels at which all could have ended", () => "none where one level is refuted"),
  "half-intervals": (answer, section) =>
    answer.question === "where"
      ? levels("The common level, from 50% intervals", ({ taxa }) => plural(taxa, "taxon", "taxa"))(
          answer,
          section,
        )
      : atHorizon("two-sided binomial of 50% intervals")(answer, section),
  "two-highest": levels(
    "Levels from the two highest finds alone",
    ({ note }) => note.match(/tail [^;]*/)?.[0] ?? "",
  ),
  "pooled-offset": (answer) => ({ label: "The level common to sections", ...metresRange(answer) }),
  "pooled-offset-densest": (answer) => ({ label: "The densest such levels", ...metresRange(answer) }),
  "pooled-offset-sampled": (answer) => ({ label: "The same by sampled horizons", ...metresRange(answer) }),
  "pooled-offset-without": (answer) => ({ label: "The same without a section", ...metresRange(answer) }),
  "confidence-levels": atHorizon("exact Kolmogorov\u2011Smirnov"),
  combined: atHorizon("chances combined by Fisher"),
  "duration-lower": (answer) => ({
    label: "It took at least",
    value: answer.low === undefined ? outcomeWords(answer.outcome) : inMetres(answer.low),
    note: `${levelOf(answer)}all taxa`,
  }),
  "duration-box": boxLine,
  "duration-posterior": (answer) => ({ label: "It took, if gradual", ...metresRange(answer) }),
  separation: (answer) => ({ label: "Later step minus earlier step", ...metresRange(answer) }),
  "pulses-bootstrap": (answer, section) =>
    test(pulsesLabel(answer), ({ p, mcError }) => `bootstrap against one more${errorWords(p, mcError)}`)(
      answer,
      section,
    ),
  "pulses-posterior": (answer) => ({
    label: (answer.part ?? 1) === 1 ? "One level for all" : `${answer.part} pulses`,
    value: answer.estimate === undefined ? outcomeWords(answer.outcome) : probability(answer.estimate),
    note: "posterior probability",
  }),
  "rank-correlation": (answer, section) =>
    test("Rarer taxa disappear lower?", ({ testStatistic = 0, note }) =>
      `rho ${significant(testStatistic, 2)}, ${note}`)(answer, section),
  centroid: test("Recovery falls upward?", ({ note }) =>
    `pooled centroid of finds, one-sided${note.match(/; (?:least|no) decline .*/)?.[0] ?? ""}`),
  distance: test("Finds uniform between first and last?", pooledBy("exact Kolmogorov\u2011Smirnov")),
  "gap-trend": test("Gaps lengthen upward?", pooledBy("Kendall\u2019s tau, one-sided")),
  runs: test("Dense and sparse stretches?", pooledBy("few runs of gaps about the median")),
  "largest-gap": test("A gap too long?", pooledBy("longest gap of each taxon")),
  binomial: test("Last finds cluster below surfaces?", ({ note }) => `binomial; ${note}`),
  shift: test("Last finds cluster below surfaces?", () => "all surfaces slid along the zone together"),
  "highest-find": test("A highest find isolated?", ({ note }) => note),
};

function boxLine(answer: TimingAnswer, section: Section): NumberLine {
  const { taxa, taxaOfSet, high, outcome } = answer;
  return {
    label: taxa === taxaOfSet ? "It took at most" : "It took at most, of the best sampled",
    value: high === undefined ? `not bounded (${outcomeWords(outcome)})` : inMetres(high),
    note: `${levelOf(answer)}${taxa} of ${taxaOfSet} taxa${isBeyond(answer, section) ? ", longer than the section" : ""}`,
  };
}

function metresRange(answer: TimingAnswer): Pick<NumberLine, "value" | "note"> {
  const { low, high, outcome, note } = answer;
  if (low === undefined || high === undefined) return { value: outcomeWords(outcome), note };
  return { value: `${inMetres(low)} to ${inMetres(high)}`, note: `${levelOf(answer)}${note}` };
}

const pulsesLabel = ({ part = 1 }: TimingAnswer) =>
  part === 1 ? "One pulse enough?" : `${part} pulses enough?`;

function errorWords(p: number | undefined, mcError: number | undefined): string {
  return p === undefined || mcError === undefined ? "" : `, simulated to \u00b1${significant(mcError, 1)}`;
}

function outcomeWords(outcome: Outcome): string {
  return {
    closed: "closed",
    open: "open",
    "leaves-section": "beyond the section",
    "in-hiatus": "inside a gap",
    empty: "none",
    undefined: "cannot be asked of so few finds",
    "not-applicable": "not asked",
  }[outcome];
}

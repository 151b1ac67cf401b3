import { mostInfluential } from "../../core/timing/influential.ts";
import type { Offset, TimingAnswer } from "../../core/timing/result.ts";
import { offset, offsetInterval, percent, probability, significant } from "../wordings/numbers.ts";
import { pulseWords, scenarioTitle } from "../wordings/scenarios.ts";
import type { NumberLine } from "./finding.ts";
import type { TimingCase, Weight } from "./timing-case.ts";
import { timingLine } from "./timing-lines.ts";

/**
 * The numbers of a set: where recovery declines the bounds that it does not harm first; then the scenarios with their
 * weights, the levels of the leading one against each horizon, how gradual, the test; all other answers are folded.
 */
export function timingNumbers(told: TimingCase): readonly NumberLine[] {
  const lines = [...weightLines(told), ...offsetLines(told), ...influenceLines(told), ...answerLines(told)];
  const isProof = ({ isProof }: Line) => told.isDistrusted && isProof === true;
  return [...lines.filter(isProof), ...lines.filter((line) => !isProof(line))].map(
    ({ isProof: holds, ...line }) =>
      told.isDistrusted && holds === true
        ? { ...line, isMore: false, group: "Proof against a decline" }
        : line,
  );
}

interface Line extends NumberLine {
  /** Whether a decline of recovery lower down does it no harm. */
  readonly isProof?: boolean;
}

/** Weights under this are folded. */
const LEAST_SHOWN = 0.005;

function weightLines({ weights, analysis }: TimingCase): readonly Line[] {
  const isDeclared = Object.keys(analysis.study.settings.timing.priors).length > 0;
  const group = `Scenarios, ${isDeclared ? "declared" : "equal"} priors`;
  return weights.map((weight) => ({
    group,
    label: scenarioTitle(weight),
    value: probability(weight.probability),
    share: weight.probability,
    note: priorNote(weight),
    isMore: weight.probability < LEAST_SHOWN,
  }));
}

const priorNote = ({ prior, error }: Weight): string => {
  const own = `${probability(prior)} beforehand`;
  return error === undefined ? own : `${own}, ln evidence to \u00b1${Number(error.toPrecision(1))}`;
};

function offsetLines({ offsets, main }: TimingCase): readonly Line[] {
  const ordered = [
    ...offsets.filter(({ horizon }) => horizon === main),
    ...offsets.filter(({ horizon }) => horizon !== main),
  ];
  return ordered.map((one) => ({
    group:
      one.pulse === undefined
        ? "One level, if there is one"
        : `${scenarioTitle({ scenario: one.scenario })}, if so`,
    label: `${levelOf(one)} from ${one.horizon}`,
    value: offsetInterval(one.low, one.high),
    note: `${percent(one.level)}, middle ${offset(one.median)}\u00a0m, after it with probability ${probability(one.probabilityAfter)}`,
    isMore: one.horizon !== main,
  }));
}

/** What the level of one common end leans on most. */
function influenceLines({ analysis, section, set }: TimingCase): readonly Line[] {
  const few = mostInfluential(analysis.timing.influence, { section: section.name, set });
  return few.map(({ taxon, removed, levelM = 0, p }) => ({
    group: "The level moves most",
    label: removed === "taxon" ? `without ${taxon}` : `without the highest find of ${taxon}`,
    value: `${offset(levelM)}\u00a0m`,
    ...(p === undefined ? {} : { note: `and p of one level by ${p > 0 ? "+" : ""}${significant(p, 2)}` }),
  }));
}

function levelOf({ scenario, pulse }: Offset): string {
  if (pulse === undefined) return "The level";
  const words = pulseWords(scenario, pulse);
  return `${words.slice(0, 1).toUpperCase()}${words.slice(1)} pulse`;
}

const FIRST: ReadonlySet<TimingAnswer["method"]> = new Set<TimingAnswer["method"]>([
  "common-end",
  "duration-lower",
  "duration-posterior",
]);

/** The answers in their order, but of the horizons the main one first and by one method for the others. */
function answerLines(told: TimingCase): readonly Line[] {
  const { answers, section, main } = told;
  const isMain = ({ horizon }: TimingAnswer) => horizon !== undefined && horizon === main;
  const shown = answers.filter(
    (answer) => answer.question !== "at-horizon" || isMain(answer) || answer.method === "confidence-levels",
  );
  const boxes = shown.filter(({ method }) => method === "duration-box");
  return shown
    .toSorted((a, b) =>
      a.question === "at-horizon" && b.question === "at-horizon" ? Number(isMain(b)) - Number(isMain(a)) : 0,
    )
    .map((answer) => ({
      ...timingLine(answer, section),
      group: groupOf(answer),
      isMore:
        !FIRST.has(answer.method) &&
        answer !== boxes[0] &&
        !(isMain(answer) && answer.method === "confidence-levels"),
      isProof: answer.method === "two-highest",
    }))
    .toSorted((a, b) => GROUPS.indexOf(a.group) - GROUPS.indexOf(b.group));
}

const [GRADUAL, LEVEL, CHECKS] = ["How gradual", "One level for all", "Pre-checks and other questions"];
const GROUPS: readonly string[] = [GRADUAL, LEVEL, CHECKS];

function groupOf({ question }: TimingAnswer): string {
  if (question === "how-gradual") return GRADUAL;
  return question === "one-level" || question === "where" || question === "at-horizon" ? LEVEL : CHECKS;
}

import { formatGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";
import { rejectsOneLevel } from "../../core/timing/common-end.ts";
import type { TimingAnswer } from "../../core/timing/result.ts";
import { roundedWords } from "./rounded-words.ts";

/** The answers that a timing plate draws, picked from the rows of one section and set. */
export interface DrawnTiming {
  readonly oneLevel?: TimingAnswer;
  readonly ifOne?: TimingAnswer;
  readonly joint: readonly TimingAnswer[];
  readonly durationLower?: TimingAnswer;
  /** Of the taxa with enough horizons first; of all taxa after it, where that differs. */
  readonly durationBoxes: readonly TimingAnswer[];
}

export function drawnTiming(answers: readonly TimingAnswer[]): DrawnTiming {
  const by = (method: TimingAnswer["method"]) => answers.find((answer) => answer.method === method);
  return {
    oneLevel: by("common-end"),
    ifOne: by("common-end-given"),
    joint: answers.filter((answer) => answer.method === "common-end-joint"),
    durationLower: by("duration-lower"),
    durationBoxes: answers.filter((answer) => answer.method === "duration-box"),
  };
}

/** The same answers in words, each with its method; what could not be answered says so. */
export function timingNotes(timing: DrawnTiming, section: Section, confidence: number): readonly string[] {
  return [
    oneLevelWords(timing.oneLevel, confidence),
    whereWords(timing, section),
    durationWords(timing),
  ].filter((words) => words !== "");
}

function oneLevelWords(answer: TimingAnswer | undefined, confidence: number): string {
  if (answer === undefined) return "Whether they could have ended at one level was not asked.";
  if (answer.p === undefined)
    return "Whether they could have ended at one level cannot be answered from these finds.";
  const test = `${answer.taxa} taxa, exact test of one common end, p ${pWords(answer.p)}`;
  if (rejectsOneLevel(answer.p, confidence)) return `One level for all of them is rejected (${test}).`;
  return `They cannot be told from one level (${test}).`;
}

function pWords(p: number): string {
  return p < 0.001 ? "< 0.001" : `= ${Number(p.toPrecision(2))}`;
}

function whereWords({ ifOne, joint }: DrawnTiming, section: Section): string {
  const given = levelsWords(ifOne, section);
  const single = given === "" ? "" : `If there was one level, it lies from ${given}.`;
  const isEmpty = joint.some((answer) => answer.outcome === "empty");
  if (isEmpty) return `${single} No single level fits these finds.`.trim();
  const parts = joint.map((answer) => levelsWords(answer, section)).filter((words) => words !== "");
  if (parts.length === 0) return single;
  return `${single} Levels not excluded: ${parts.join(" and ")}.`.trim();
}

/** As fine as a level can be read off a plate. */
const DECIMALS = { m: 2, cm: 0, mm: 0, ft: 2 } as const;

function levelsWords(answer: TimingAnswer | undefined, section: Section): string {
  if (answer?.low === undefined) return "";
  const low = formatGiven(answer.low, section, DECIMALS[section.unit]);
  if (answer.high === undefined) return `${low} to beyond the top of the section`;
  return `${low.replace(/ .*$/, "")} to ${formatGiven(answer.high, section, DECIMALS[section.unit])}`;
}

function durationWords({ durationLower, durationBoxes }: DrawnTiming): string {
  const least = durationLower?.low;
  const most = durationBoxes.map(boxWords);
  const words = [
    ...(least === undefined ? [] : [`at least ${roundedWords(least)} m`]),
    ...(most.length === 0 ? [] : [most.join(", ")]),
  ];
  return words.length === 0
    ? ""
    : `Height between the first and the last disappearance: ${words.join("; ")}.`;
}

function boxWords({ high, taxa, outcome }: TimingAnswer): string {
  if (high !== undefined) return `at most ${roundedWords(high)} m for ${taxa} taxa`;
  return outcome === "undefined"
    ? `no upper bound for ${taxa} taxa`
    : `no upper bound inside the section for ${taxa} taxa`;
}

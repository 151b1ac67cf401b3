import { isAlignedTooWell, rejectsOneLevel } from "../../core/timing/common-end.ts";
import type { Offset, TimingAnswer } from "../../core/timing/result.ts";
import {
  inMetres,
  offsetInterval,
  percent,
  positionInterval,
  probability,
  pValue,
} from "../wordings/numbers.ts";
import { pulseWords, scenarioPhrase } from "../wordings/scenarios.ts";
import { list, say, strong, type Words } from "../wordings/words.ts";
import { taxaOf } from "./taxa-of.ts";
import { type Lead, leadsOf, type TimingCase } from "./timing-case.ts";
import { isBeyond } from "./timing-lines.ts";

/**
 * The sentence that a set of taxa in one section earns, and no more: whether one level is rejected or cannot be told from
 * the record, which scenario has the most weight and how much, where its levels lie against the main horizon, and how
 * gradual it could still be. Where recovery declines, the bound that holds all the same comes first.
 */
export function timingSentence(told: TimingCase): Words {
  const test = told.by("common-end");
  const taxa = taxaOf(told.set, test?.taxa ?? told.by("common-end-given")?.taxa ?? 0);
  if (test?.p === undefined)
    return say`${strong(taxa)} in ${told.section.title}: too few to ask whether they ended together.`;
  const isRejected = rejectsOneLevel(test.p, told.analysis.study.settings.confidence);
  return [
    ...survivorWords(told),
    ...gateWords(told),
    ...openingWords({ told, test, taxa, isRejected }),
    ...(isAlignedTooWell(test.p) ? tooWellWords() : placeWords(told, isRejected)),
    ...gradualWords(told, isRejected),
  ];
}

/** Where most taxa live on, the few not found above the main horizon were picked by that. */
function survivorWords({ analysis, section }: TimingCase): Words {
  const isWarned = analysis.timing.cautions.some(
    (c) => c.code === "timing-most-survive" && c.section === section.name,
  );
  if (!isWarned) return [];
  return say`${strong("Most taxa live on above the main horizon")}, so the few not found there tell little of when they ended. `;
}

/** Where finds thin out upward: what a decline does not harm, before all that it does. */
function gateWords({ isDistrusted, answers, section, analysis }: TimingCase): Words {
  if (!isDistrusted) return [];
  const proof = answers
    .filter(({ method, question }) => method === "two-highest" && question === "where")
    .toSorted((a, b) => (b.high ?? Number.POSITIVE_INFINITY) - (a.high ?? Number.POSITIVE_INFINITY))[0];
  const opening = say`${strong("Finds of these taxa thin out upward")}: proof against that, `;
  if (proof?.low === undefined || proof.high === undefined)
    return [
      ...opening,
      "nothing bounds a common level from above. What follows takes recovery as constant: ",
    ];
  const main = analysis.markers.main.bySection.get(section.name);
  const where =
    main === undefined
      ? strong(positionInterval(section, proof.low, proof.high))
      : strong(offsetInterval(proof.low - main.highM, proof.high - main.lowM));
  const from = main === undefined ? "" : ` from ${main.horizon}`;
  return [
    ...opening,
    ...say`a common level, if there is one, lies ${where}${from} (${percent(proof.level ?? 0)}). What follows takes recovery as constant: `,
  ];
}

interface Opening {
  readonly told: TimingCase;
  readonly test: TimingAnswer;
  readonly taxa: string;
  readonly isRejected: boolean;
}

/** The test and the weights of the scenarios, told against each other where they do not agree. */
function openingWords({ told, test, taxa, isRejected }: Opening): Words {
  const tested = isRejected
    ? say`one level is ${strong("rejected")} for ${strong(taxa)} (${pValue(test.p ?? 0)}) if recovery is constant`
    : say`${strong(taxa)} ${strong("cannot be told from one level")} (${pValue(test.p ?? 1)})`;
  const start = told.isDistrusted ? tested : capital(tested);
  const leads = leadsOf(told.weights);
  const [lead] = leads;
  if (lead === undefined) return start;
  return [...start, ...weightWords(lead, leads, { told, isRejected })];
}

/** Weights at least this large are named where no scenario holds half of all. */
const NAMED = 0.1;

function weightWords(
  lead: Lead,
  leads: readonly Lead[],
  { told, isRejected }: { readonly told: TimingCase; readonly isRejected: boolean },
): Words {
  if (lead.probability <= 0.5) {
    const named = leads.filter((one) => one.probability >= NAMED);
    const beforehand = list(named.map(({ prior }) => probability(prior)));
    return say`; ${strong("no scenario holds half of the weight")}: ${list(named.map(leadWeight))} (beforehand ${beforehand})`;
  }
  const held = say`${strong(scenarioPhrase(lead.kind))} ${lead.kind.startsWith("pulses") ? "have" : "has"} ${strong(inWords(lead.probability))} of the weight (${probability(lead.prior)} beforehand)`;
  const at =
    lead.horizon === undefined
      ? []
      : say`, most of it at ${lead.horizon} (${inWords(weightAt(told, lead.horizon))})`;
  const isAgainst = isRejected === (lead.kind === "one-level");
  return [isAgainst ? "; yet " : "; ", ...held, ...at, ...earlierWords(told, lead)];
}

/** One level at a horizon does not compete with that and an earlier pulse: no scenario is both. */
function earlierWords({ analysis, section, set }: TimingCase, { kind }: Lead): Words {
  const isOpen = analysis.timing.cautions.some(
    (c) => c.code === "scenario-horizon-favoured" && c.section === section.name && c.subject === set,
  );
  return isOpen && kind === "one-level" ? say`; an earlier pulse besides is ${strong("not excluded")}` : [];
}

const leadWeight = ({ kind, probability: p }: Lead): string => `${scenarioPhrase(kind)} ${inWords(p)}`;

const weightAt = ({ weights }: TimingCase, horizon: string): number =>
  weights.find((one) => one.horizon === horizon)?.probability ?? 0;

/** Last finds that agree too well forbid to say where. */
const tooWellWords = (): Words =>
  say`. Their last finds agree better than chance allows: where they would have ended is not to be trusted.`;

/** Where the levels of the leading scenario lie against the main horizon; without one, or without scenarios, by height. */
function placeWords(told: TimingCase, isRejected: boolean): Words {
  const { offsets, main } = told;
  const [lead] = leadsOf(told.weights);
  const shown = offsets.filter(({ horizon }) => horizon === main).toReversed();
  if (main !== undefined && lead !== undefined && shown.length > 0 && lead.kind !== "gradual")
    return levelWords(told, main, shown, lead);
  const where = told.by("common-end-given");
  if (isRejected || where?.low === undefined || where.high === undefined) return ["."];
  const here = told.analysis.markers.main.bySection.get(told.section.name);
  const place =
    here === undefined
      ? strong(positionInterval(told.section, where.low, where.high))
      : strong(offsetInterval(where.low - here.highM, where.high - here.lowM));
  const from = here === undefined ? "" : ` from ${here.horizon}`;
  return say`. If they ended together, it was ${place}${from} (${percent(where.level ?? 0)})${higherWords(told)}.`;
}

function levelWords(told: TimingCase, main: string, shown: readonly Offset[], lead: Lead): Words {
  const [first] = shown;
  const level = percent(first?.level ?? 0);
  if (lead.kind === "one-level")
    return say`. If they ended together, it was ${strong(offsetInterval(first?.low ?? 0, first?.high ?? 0))} from ${main} (${level}), after it with probability ${inWords(first?.probabilityAfter ?? 0)}${higherWords(told)}.`;
  const each = shown.map(
    ({ scenario, pulse = 1, low, high }) => `the ${pulseWords(scenario, pulse)} ${offsetInterval(low, high)}`,
  );
  return say`: ${strong(list(each))} from ${main} (${level})${higherWords(told)}.`;
}

/** A chance inside a sentence: `over 0.999`. */
const inWords = (p: number): string =>
  probability(p)
    .replace(/^>\u00a0/, "over\u00a0")
    .replace(/^<\u00a0/, "under\u00a0");

function higherWords({ analysis, section, set }: TimingCase): string {
  const isLess = analysis.timing.cautions.some(
    (c) => c.code === "timing-less-effort-above" && c.section === section.name && c.subject === set,
  );
  return isLess ? ", or higher, since the samples just above are small" : "";
}

/** How gradual it must have been where one level is rejected, and how gradual it could still be in any case. */
function gradualWords({ by, section }: TimingCase, isRejected: boolean): Words {
  const shortest = by("duration-lower");
  const longest = longestWords(by("duration-box"), section);
  if (!isRejected || shortest?.low === undefined || shortest.level === undefined)
    return [" A local disappearance ", ...longest];
  return say` Their local disappearance then took at least ${strong(inMetres(shortest.low))} (${percent(shortest.level)}); one ${longest}`;
}

/** A duration that the section is too short to hold is told as that: its number says nothing about the rock. */
function longestWords(longest: TimingAnswer | undefined, section: TimingCase["section"]): Words {
  if (longest?.high === undefined) return ["of any length cannot be excluded."];
  const over = isBeyond(longest, section)
    ? say`over ${strong("more than the whole section")}`
    : say`over up to ${strong(inMetres(longest.high))}`;
  const of = longest.taxa === longest.taxaOfSet ? "" : ` (of the ${longest.taxa} best sampled)`;
  return say`${over}${of} cannot be excluded.`;
}

function capital([first = "", ...rest]: Words): Words {
  return typeof first === "string"
    ? [`${first.slice(0, 1).toUpperCase()}${first.slice(1)}`, ...rest]
    : [first, ...rest];
}

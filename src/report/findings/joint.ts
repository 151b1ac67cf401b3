import type { Analysis } from "../../core/analysis-result.ts";
import type { Caution } from "../../core/basis.ts";
import type { Offset, TimingAnswer, TimingMethod } from "../../core/timing/result.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { metres, offset, offsetInterval, percent, probability, pValue } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding, NumberLine } from "./finding.ts";
import { taxaOf } from "./taxa-of.ts";

/** The section of a finding about all sections together. */
const JOINT = "joint";

/** What all sections together say of each set of taxa; nothing where they are not answered together. */
export function jointFindings(analysis: Analysis): readonly Finding[] {
  const { sets, cautions } = analysis.timing;
  const together = sets.filter(({ section }) => section === JOINT);
  const ofAll = cautions.filter(({ section, subject }) => section === JOINT && subject === undefined);
  if (together.length === 0) return ofAll.length === 0 ? [] : [nothingTogether(analysis, ofAll)];
  return together.map(({ set }) => jointFinding(analysis, set));
}

function nothingTogether({ study, timing }: Analysis, cautions: readonly Caution[]): Finding {
  return {
    station: "timing",
    section: JOINT,
    sentence: say`The sections are answered one by one.`,
    numbers: [],
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: timing.basis,
  };
}

function jointFinding(analysis: Analysis, set: string): Finding {
  const { timing, study } = analysis;
  const isHere = (one: { readonly section?: string; readonly set?: string }) =>
    one.section === JOINT && one.set === set;
  const answers = timing.answers.filter(isHere);
  const offsets = timing.offsets.filter(isHere);
  const cautions = timing.cautions.filter(
    ({ section, subject }) => section === JOINT && (subject === undefined || subject === set),
  );
  return {
    station: "timing",
    section: JOINT,
    set,
    sentence: sentence(set, { answers, offsets, cautions, analysis }),
    numbers: [
      ...answers.map((answer) => jointLine(answer, analysis)),
      ...scenarioLines(analysis, set),
      ...offsets.map(offsetLine),
    ],
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: timing.basis,
  };
}

interface Told {
  readonly answers: readonly TimingAnswer[];
  readonly offsets: readonly Offset[];
  readonly cautions: readonly Caution[];
  readonly analysis: Analysis;
}

function sentence(set: string, { answers, offsets, cautions, analysis }: Told): Words {
  const by = (method: TimingMethod) => answers.find((answer) => answer.method === method);
  const [where, test] = [by("pooled-offset"), by("common-end")];
  const sections = analysis.timing.leftOut.filter((one) => one.set === set).length;
  const taxa = `${taxaOf(set, where?.taxa ?? 0)} in ${plural(sections, "section")}`;
  const main = offsets.find(({ horizon }) => horizon === where?.horizon);
  if (where?.low === undefined || where.high === undefined || main === undefined)
    return say`${strong(taxaOf(set, where?.taxa ?? 0))}: no level fits all sections together.`;
  const gate = gateWords(cautions, test);
  const sampled = cautions.some(({ code }) => code === "joint-between-samples")
    ? by("pooled-offset-sampled")
    : undefined;
  return [
    ...gate,
    ...say`If ${strong(taxa)} disappeared from these sections at one distance from ${main.horizon}, it was ${strong(
      interval(where.low, where.high, where.unit),
    )} (${percent(main.level)}), younger than it with probability ${strong(probability(main.probabilityAfter))}${
      sampled?.low === undefined || sampled.high === undefined
        ? ""
        : `; by the horizons searched alone ${interval(sampled.low, sampled.high, sampled.unit)}`
    }.`,
  ];
}

/** What forbids to trust the level comes before it. */
function gateWords(cautions: readonly Caution[], test: TimingAnswer | undefined): Words {
  const has = (code: string) => cautions.some((caution) => caution.code === code);
  const together = has("joint-sections-differ")
    ? say`One distance in all sections is ${strong("rejected")} (${pValue(test?.p ?? 0)}). `
    : has("joint-sections-likely-differ")
      ? say`A level of its own in every section is ${strong("likelier")} than one distance in all. `
      : [];
  if (has("joint-recovery-declines"))
    return [
      ...together,
      ...say`${strong("Finds of these taxa thin out upward")} in some sections, so what follows is not to be trusted. `,
    ];
  return has("joint-one-level-rejected")
    ? [
        ...together,
        ...say`${strong("One level is rejected")} within some sections, so what follows is not to be trusted. `,
      ]
    : together;
}

function interval(low: number, high: number, unit: TimingAnswer["unit"]): string {
  return unit === "ka" ? `${offset(low)} to ${offset(high)}\u00a0ka` : offsetInterval(low, high);
}

/** One answer about all sections as a line of the margin: levels are distances from the horizon. */
function jointLine(answer: TimingAnswer, { study }: Analysis): NumberLine {
  const { method, horizon = "the horizon", low, high, level, unit, note } = answer;
  if (method === "common-end")
    return {
      label: "One distance in all sections?",
      value: answer.p === undefined ? "cannot be asked of so few finds" : pValue(answer.p),
      note: answer.note,
    };
  const value = low === undefined || high === undefined ? "none" : interval(low, high, unit);
  const share = level === undefined ? "" : percent(level);
  if (method === "pooled-offset-without") {
    const without = note.replace("without ", "");
    const title = study.sections.find((section) => section.name === without)?.title ?? without;
    return { label: `Without ${title}`, value, note: share };
  }
  const middle = answer.estimate === undefined ? "" : `, middle ${metres(answer.estimate)}`;
  if (method === "pooled-offset-sampled")
    return { label: "By the horizons searched", value, note: `${share}${middle}` };
  return method === "pooled-offset-densest"
    ? { label: "Shortest such interval", value, note: share }
    : { label: `The common level, from ${horizon}`, value, note: `${share}${middle}` };
}

function scenarioLines({ timing }: Analysis, set: string): readonly NumberLine[] {
  return timing.scenarios.flatMap(({ section, set: other, scenario, variant, probability: p }) =>
    section === JOINT && other === set && scenario === "single" && variant === undefined && p !== undefined
      ? [
          {
            label: "One level for all, against one a section",
            value: probability(p),
            note: "posterior probability, equal beforehand",
          },
        ]
      : [],
  );
}

function offsetLine({ horizon, low, high, unit, level, probabilityAfter }: Offset): NumberLine {
  return {
    label: `Minus ${horizon}`,
    value: interval(low, high, unit === "m" ? "m" : "ka"),
    note: `${percent(level)}, younger with probability ${probability(probabilityAfter)}`,
  };
}

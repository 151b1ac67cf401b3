import { describe, expect, it } from "vitest";
import { analyse } from "../../../src/core/analysis.ts";
import type { Analysis } from "../../../src/core/analysis-result.ts";
import type { Caution } from "../../../src/core/basis.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import type { Offset, Scenario, ScenarioWeight, TimingAnswer } from "../../../src/core/timing/result.ts";
import { timingFinding } from "../../../src/report/findings/timing.ts";
import { plain } from "../../../src/report/wordings/words.ts";

const tables = {
  "sections.csv": "section,name,axis,unit,bottom,top\nledge,Long Ledge,height,m,0,30\n",
  "horizons.csv": "section,horizon,kind,position,below,above\nledge,clay,impact,12,0.1,0.1\n",
  "occurrences.csv": "section,taxon,position\nledge,Orbula vesta,4\nledge,Orbula vesta,8\n",
};
const base = analyse(
  readStudy(new Map(Object.entries(tables).map(([name, text]) => [name, new TextEncoder().encode(text)]))),
);
const here = { section: "ledge", set: "candidates" } as const;

const answer = (part: Partial<TimingAnswer> & Pick<TimingAnswer, "question" | "method">): TimingAnswer => ({
  ...here,
  taxa: 20,
  taxaOfSet: 20,
  outcome: "closed",
  note: "",
  ...part,
});
const weight = (scenario: Scenario, probability: number, part: Partial<ScenarioWeight> = {}) => ({
  ...here,
  scenario,
  prior: 0.25,
  probability,
  note: "",
  ...part,
});
const offset = (scenario: Scenario, [low, high]: readonly [number, number], part: Partial<Offset> = {}) => ({
  ...here,
  scenario,
  horizon: "clay",
  median: (low + high) / 2,
  low,
  high,
  level: 0.95,
  unit: "m" as const,
  probabilityAfter: 0.81,
  ...part,
});

interface Record {
  readonly p?: number;
  readonly scenarios?: readonly ScenarioWeight[];
  readonly offsets?: readonly Offset[];
  readonly longestM?: number;
  readonly isDistrusted?: boolean;
  readonly proofM?: number;
  readonly main?: Analysis["markers"]["main"];
  readonly cautions?: Analysis["timing"]["cautions"];
}

function findingOf(record: Record) {
  const { p, scenarios = [], offsets = [], longestM, isDistrusted = false, proofM, cautions = [] } = record;
  const answers = [
    answer({
      question: "one-level",
      method: "common-end",
      ...(p === undefined ? { outcome: "undefined" } : { p }),
    }),
    answer({ question: "where", method: "common-end-given", low: 11.5, high: 12.5, level: 0.95 }),
    answer({
      question: "where",
      method: "two-highest",
      low: 11.5,
      level: 0.95,
      ...(proofM === undefined ? { outcome: "open" } : { high: proofM }),
      note: "tail 2: finds thin out towards the end",
    }),
    answer({ question: "how-gradual", method: "duration-lower", low: 0.8, level: 0.95 }),
    answer({
      question: "how-gradual",
      method: "duration-box",
      taxa: 12,
      level: 0.95,
      ...(longestM === undefined ? { outcome: "open" } : { high: longestM }),
    }),
  ];
  const timing = {
    ...base.timing,
    answers,
    scenarios,
    offsets,
    cautions,
    distrusted: isDistrusted ? [here] : [],
  };
  const markers = { ...base.markers, main: record.main ?? base.markers.main };
  const [section] = base.study.sections;
  if (section === undefined) throw new Error("no section");
  return timingFinding({ ...base, markers, timing }, section, "candidates");
}
const told = (record: Record) => plain(findingOf(record).sentence).replaceAll("\u00a0", " ");

const one = [
  weight("single", 0.6),
  weight("at-horizon", 0.35, { horizon: "clay" }),
  weight("pulses-2", 0.05),
];
const two = [weight("single", 0.1), weight("pulses-2", 0.86), weight("gradual", 0.04)];
const pulses = [
  offset("pulses-2", [-4.1, -3.1], { pulse: 1 }),
  offset("pulses-2", [-0.15, 0.25], { pulse: 2 }),
];

describe("the sentence of a set of taxa", () => {
  it("with one level not rejected and of most weight: where, how probably after, and how gradual still", () => {
    const offsets = [offset("single", [-0.12, 0.6])];
    expect(told({ p: 0.46, scenarios: one, offsets, longestM: 1.4 })).toBe(
      "20 candidates cannot be told from one level (p = 0.46); one level has 0.95 of the weight (0.50 beforehand). " +
        "If they ended together, it was −0.12 to +0.60 m from clay (95 %), after it with probability 0.81. " +
        "A local disappearance over up to 1.40 m (of the 12 best sampled) cannot be excluded.",
    );
  });

  it("names the horizon that holds more than half of the weight", () => {
    const scenarios = [
      weight("single", 0.2),
      weight("at-horizon", 0.7, { horizon: "clay" }),
      weight("gradual", 0.1),
    ];
    expect(told({ p: 0.46, scenarios })).toContain(
      "one level has 0.90 of the weight (0.50 beforehand), most of it at clay (0.70)",
    );
  });

  it("with two pulses of most weight and one level rejected: both pulses, and the least duration", () => {
    const text = told({ p: 0.002, scenarios: two, offsets: pulses, longestM: 9 });
    expect(text).toMatch(
      /^One level is rejected for 20 candidates \(p = 0\.0020\) if recovery is constant; two pulses have 0\.86/,
    );
    expect(text).toContain(
      "of the weight (0.25 beforehand): the later −0.15 to +0.25 m and the earlier −4.10 to −3.10 m from clay (95 %).",
    );
    expect(text).toContain(
      "then took at least 0.80 m (95 %); one over up to 9.00 m (of the 12 best sampled) cannot be excluded.",
    );
  });

  it("tells the test and the weights against each other where they disagree", () => {
    expect(told({ p: 0.2, scenarios: two, offsets: pulses })).toMatch(
      /^20 candidates cannot be told from one level \(p = 0\.20\); yet two pulses have 0\.86/,
    );
    expect(told({ p: 0.002, scenarios: one })).toMatch(/^One level is rejected .*; yet one level has 0\.95/);
  });

  it("with no scenario above half of the weight says so and lists them", () => {
    const scenarios = [
      weight("single", 0.42),
      weight("pulses-2", 0.4),
      weight("gradual", 0.13),
      weight("pulses-3", 0.05),
    ];
    const text = told({ p: 0.2, scenarios, offsets: [offset("single", [-1, 1])] });
    expect(text).toContain(
      "no scenario holds half of the weight: one level 0.42, two pulses 0.40 and a gradual end 0.13 (beforehand 0.25, 0.25 and 0.25)",
    );
    expect(text).toContain("If they ended together, it was");
  });

  it("with a gradual end of most weight gives no level of a pulse", () => {
    const scenarios = [weight("single", 0.1), weight("gradual", 0.9)];
    const text = told({ p: 0.002, scenarios, offsets: [offset("single", [-1, 1])] });
    expect(text).toContain("a gradual end has 0.90 of the weight");
    expect(text).not.toContain("from clay");
  });

  it("where recovery declines begins with the bound that holds all the same", () => {
    const text = told({ p: 0.46, scenarios: one, isDistrusted: true, proofM: 14, longestM: 1.4 });
    expect(text).toMatch(
      /^Finds of these taxa thin out upward: proof against that, a common level, if there is one, lies −0\.70 to \+2\.20 m from clay \(95 %\)\. What follows takes recovery as constant: 20 candidates cannot/,
    );
    expect(told({ p: 0.46, isDistrusted: true })).toContain("nothing bounds a common level from above");
  });

  it("where last finds agree too well says nothing of where", () => {
    const text = told({ p: 0.99, scenarios: one, offsets: [offset("single", [-0.1, 0.1])] });
    expect(text).toContain("agree better than chance allows");
    expect(text).not.toContain("from clay (");
  });

  it("without scenarios gives the level of the pooled test, or none where it is rejected", () => {
    expect(told({ p: 0.46 })).toContain("If they ended together, it was −0.70 to +0.70 m from clay (95 %).");
    expect(told({ p: 0.002 })).not.toContain("from clay");
  });

  it("without a main horizon gives heights", () => {
    const main = { ...base.markers.main, bySection: new Map() };
    expect(told({ p: 0.46, main })).toContain("it was 11.50 to 12.50 m (95 %)");
  });

  it("tells a chance that rounds to one or none as over and under", () => {
    const scenarios = [weight("single", 0.9997), weight("gradual", 0.0003)];
    const offsets = [offset("single", [-0.5, -0.1], { probabilityAfter: 0.0002 })];
    const text = told({ p: 0.46, scenarios, offsets });
    expect(text).toContain("one level has over 0.999 of the weight");
    expect(text).toContain("after it with probability under 0.001");
  });

  it("of too few taxa asks nothing", () => {
    expect(told({})).toBe("20 candidates in Long Ledge: too few to ask whether they ended together.");
  });

  it("never names what only a person may declare, and never a bound that there is not", () => {
    for (const p of [0.002, 0.2, 0.99])
      for (const scenarios of [[], one, two]) {
        const text = told({ p, scenarios, offsets: pulses });
        expect(text).not.toMatch(/sudden|simultan|extinct/i);
        expect(text).toMatch(/of any length cannot be excluded\.$/);
      }
  });
});

describe("what stands beside the sentence", () => {
  const cautions: readonly Caution[] = [
    { code: "timing-survivors", section: "ledge", numbers: { taxa: 3, names: "a, b, c" } },
    {
      code: "timing-box-rarest",
      section: "ledge",
      subject: "candidates",
      numbers: { taxon: "a", horizons: 4 },
    },
    {
      code: "scenario-order-changes",
      section: "ledge",
      subject: "candidates",
      numbers: { best: "single", changes: "equal (pulses-2), sampled (at-horizon clay)" },
    },
  ];

  it("is first that another scenario leads under other priors, in words", () => {
    const [first, ...rest] = findingOf({ p: 0.46, scenarios: one, cautions }).weaknesses;
    expect(plain(first?.words ?? [])).toBe(
      "Which scenario comes first turns on what is taken for granted: as declared one level, otherwise two pulses with taxa shared evenly among pulses, one level at clay with horizons searched alone.",
    );
    expect(rest.map(({ code }) => code)).toEqual(["timing-survivors", "timing-box-rarest"]);
  });

  it("are the weights of the scenarios as bars, the heaviest first, each with its prior", () => {
    const { numbers } = findingOf({ p: 0.46, scenarios: one });
    const bars = numbers.filter(({ share }) => share !== undefined);
    expect(bars.map(({ label, share }) => [label, share])).toEqual([
      ["One level, anywhere", 0.6],
      ["One level at clay", 0.35],
      ["Two pulses", 0.05],
    ]);
    expect(bars.every(({ group }) => group === "Scenarios, equal priors")).toBe(true);
    expect(bars[0]?.note).toMatch(/0\.25 beforehand/);
  });

  it("puts the bounds that a decline does not harm before all where recovery declines", () => {
    expect(findingOf({ p: 0.46, scenarios: one, isDistrusted: true, proofM: 14 }).numbers[0]).toMatchObject({
      group: "Proof against a decline",
      isMore: false,
    });
    expect(findingOf({ p: 0.46, scenarios: one }).numbers[0]?.group).toBe("Scenarios, equal priors");
  });
});

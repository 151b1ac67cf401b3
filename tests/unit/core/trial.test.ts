import { describe, expect, it } from "vitest";
import { analyse } from "../../../src/core/analysis.ts";
import type { Analysis } from "../../../src/core/analysis-result.ts";
import type { Settings } from "../../../src/core/study/settings.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import type { TimingMethod } from "../../../src/core/timing/result.ts";
import { askLevel, followSection } from "../../../src/core/trial.ts";

const lasts = { "Orbula vesta": 11.5, "Lenta acuta": 10.2, "Spiralis nova": 11, "Nodula rara": 12.4 };
const occurrences = Object.entries(lasts).flatMap(([taxon, last]) =>
  [0.1, 0.25, 0.4, 0.6, 0.8, 0.9, 1].map((share) => `ledge,${taxon},${(share * last).toFixed(3)}`),
);
const tables = {
  "sections.csv": "section,axis,unit,bottom,top\nledge,height,m,0,30\n",
  "horizons.csv": "section,horizon,kind,position,below,above\nledge,clay,impact,12.6,0.1,0.1\n",
  "occurrences.csv": `section,taxon,position\n${occurrences.join("\n")}\n`,
  "settings.json": JSON.stringify({ replicates: 100, ranges: { methods: ["uniform", "declining"] } }),
};
const study = readStudy(
  new Map(Object.entries(tables).map(([name, text]) => [name, new TextEncoder().encode(text)])),
);
const before = analyse(study);
const exact: ReadonlySet<TimingMethod> = new Set<TimingMethod>([
  "common-end",
  "common-end-given",
  "common-end-joint",
  "half-intervals",
  "two-highest",
  "confidence-levels",
  "combined",
  "duration-lower",
  "duration-box",
]);
const exactOf = ({ timing }: Analysis) =>
  timing.answers.filter((a) => a.set === "candidates" && exact.has(a.method));
const pick = (position: number) => ({ section: "ledge", horizon: "clay", position, below: 0, above: 0 });
const changes: Readonly<Record<string, (s: Settings) => Settings>> = {
  "another confidence": (s) => ({ ...s, confidence: 0.8 }),
  "the main horizon moved up": (s) => ({ ...s, boundary: { ...s.boundary, picks: [pick(13.4)] } }),
  "the main horizon moved below a last find": (s) => ({
    ...s,
    boundary: { ...s.boundary, picks: [pick(11.8)] },
  }),
  "more horizons asked of a taxon": (s) => ({ ...s, taxa: { ...s.taxa, minimumHorizons: 8 } }),
};

describe.each(Object.entries(changes))("%s", (_, change) => {
  const settings = change(study.settings);
  const followed = followSection(before, "ledge")({ settings, set: "candidates" });
  const whole = analyse({ ...study, settings });

  it("gives the exact answers, roles and main horizon that the whole analysis gives", () => {
    expect(followed.candidates).toEqual(whole.candidates);
    expect(followed.markers.main).toEqual(whole.markers.main);
    if (whole.timing.sets.some(({ set }) => set === "candidates"))
      expect(exactOf(followed)).toEqual(exactOf(whole));
  });

  it("gives the tapers that the whole analysis gives", () => {
    expect(followed.ranges.tapers).toEqual(whole.ranges.tapers);
    expect(followed.ranges.baseTapers).toEqual(whole.ranges.baseTapers);
  });
});

const rows = (analysis: Analysis) =>
  analysis.ranges.ends.filter(({ method, end }) => method === "uniform" && end !== "both");

it("follows the ends of the methods in view at both ends", () => {
  const settings = { ...study.settings, confidence: 0.5 };
  const followed = followSection(before, "ledge")({ settings, methods: ["uniform"] });
  expect(rows(followed)).toEqual(rows(analyse({ ...study, settings })));
  expect(rows(followed)).not.toEqual(rows(before));
});

it("leaves what has no closed form as it was", () => {
  const settings = { ...study.settings, confidence: 0.8 };
  const followed = followSection(before, "ledge")({ settings, set: "candidates" });
  expect(followed.timing.scenarios).toBe(before.timing.scenarios);
  expect(followed.timing.offsets).toBe(before.timing.offsets);
});

const ask = (heightM: number) => askLevel(before, { section: "ledge", set: "candidates", heightM });

describe("one level asked about", () => {
  it("has the p of the curve, and none below the highest last find", () => {
    const [curve] = before.timing.curves;
    const at = Math.floor((curve?.heightsM.length ?? 0) / 2);
    expect(ask(curve?.heightsM[at] ?? 0)?.p).toBeCloseTo(curve?.p[at] ?? -1, 12);
    expect(ask(11.2)).toEqual({ p: 0, above: 2, taxa: 4 });
  });

  it("is not answered where there is no such set", () => {
    expect(askLevel(before, { section: "ledge", set: "group:none", heightM: 12 })).toBeUndefined();
  });
});

it("a section that is not there is refused", () => {
  expect(() => followSection(before, "lost")).toThrow(RangeError);
});

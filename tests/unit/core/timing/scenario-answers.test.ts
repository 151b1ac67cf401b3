import { describe, expect, it } from "vitest";
import type { MarkerHorizon } from "../../../../src/core/markers/result.ts";
import type { LocalTaxon } from "../../../../src/core/study/finds-result.ts";
import type { Section } from "../../../../src/core/study/model.ts";
import type { Settings } from "../../../../src/core/study/settings.ts";
import { answerTiming } from "../../../../src/core/timing/answer.ts";
import { candidate, covered, horizon, markers, section, study, taxon } from "../ranges/small-study.ts";

interface Setup {
  readonly place?: Section;
  readonly main?: MarkerHorizon;
  readonly timing?: Partial<Settings["timing"]>;
  readonly progress?: (step: string) => void;
}

function timingOf(
  taxa: readonly LocalTaxon[],
  { place = section(), main, timing = {}, progress }: Setup = {},
) {
  const input = { taxa, candidates: taxa.map((t) => candidate(t)), markers: markers(main) };
  const settings = (s: Settings): Settings => ({ ...s, timing: { ...s.timing, ...timing } });
  return answerTiming(study([place], settings), input, progress);
}

const evenly = (name: string, last: number, finds = 12) =>
  taxon(
    name,
    Array.from({ length: finds }, (_, i) => ((i + 1) * last) / finds),
  );
const together = ["Orbula vesta", "Lenta acuta", "Spiralis nova", "Tenera alba"].map((name, i) =>
  evenly(name, 29 - 0.3 * i),
);
const apart = [
  ...["Orbula vesta", "Lenta acuta", "Spiralis nova", "Tenera alba"].map((name, i) =>
    evenly(name, 30 - 0.2 * i, 25),
  ),
  ...["Prima lata", "Altera nova", "Tertia fusca", "Quarta levis"].map((name, i) =>
    evenly(name, 18 - 0.2 * i, 25),
  ),
];
const near = horizon(29.6);

const weightsOf = (timing: ReturnType<typeof timingOf>, variant?: string) =>
  timing.scenarios.filter((row) => row.set === "candidates" && row.variant === variant);
const chanceOf = (timing: ReturnType<typeof timingOf>, scenario: string, variant?: string) =>
  weightsOf(timing, variant).find((row) => row.scenario === scenario)?.probability;

const progress = (step: string) => {
  if (step.startsWith("scenarios")) throw new Error("stopped");
};

describe("scenarios of a set", () => {
  it("share probability 1 in every variant, horizons counted once", () => {
    const timing = timingOf(together, { main: near });
    const variants = [...new Set(timing.scenarios.map((row) => row.variant))];
    expect(variants).toEqual(
      expect.arrayContaining([undefined, "equal", "confined", "window-halved", "window-doubled"]),
    );
    for (const variant of variants.filter((name) => name !== "at-most")) {
      const sum = weightsOf(timing, variant).reduce((total, row) => total + (row.probability ?? 0), 0);
      expect(sum).toBeCloseTo(1, 10);
    }
    const among = weightsOf(timing).find((row) => row.scenario === "among-horizons");
    const at = weightsOf(timing).find((row) => row.scenario === "at-horizon");
    expect(among?.logEvidence).toBeCloseTo(at?.logEvidence ?? Number.NaN, 10);
    expect(among?.probability).toBeUndefined();
  });

  it("put one level first where ends agree, and two pulses where they do not", () => {
    const one = timingOf(together);
    expect(chanceOf(one, "single")).toBeGreaterThan(0.6);
    const two = timingOf(apart, { timing: { window: [5, 38] } });
    expect(chanceOf(two, "pulses-2")).toBeGreaterThan(0.8);
    const lower = two.membership.filter((row) => row.set === "candidates" && row.pulse === 1);
    expect(lower.find((row) => row.taxon === "Prima lata")?.probability).toBeGreaterThan(0.95);
    expect(lower.find((row) => row.taxon === "Orbula vesta")?.probability).toBe(0);
    const counts = two.answers.filter((a) => a.method === "pulses-posterior" && a.set === "candidates");
    expect(counts.map(({ part }) => part)).toEqual([1, 2]);
    expect(counts[1].estimate).toBeCloseTo(chanceOf(two, "pulses-2") ?? Number.NaN, 12);
  });

  it("tell the offset of every level from every horizon, its own uncertainty within", () => {
    const { offsets, densities } = timingOf(together, { main: near });
    const single = offsets.find((row) => row.scenario === "single" && row.set === "candidates");
    expect(single).toMatchObject({ unit: "m", level: 0.95 });
    expect(single?.low).toBeLessThan(single?.median ?? Number.NaN);
    expect(single?.high).toBeGreaterThan(single?.median ?? Number.NaN);
    const density = densities.find((row) => row.scenario === "single" && row.set === "candidates");
    expect(Math.max(...(density?.density ?? []))).toBeGreaterThan(0);
  });

  it("take declared priors", () => {
    const priors = { single: 0, "pulses-2": 0, gradual: 3, independent: 1, "at-horizon": 0 };
    const timing = timingOf(together, { main: near, timing: { priors } });
    expect(chanceOf(timing, "single")).toBe(0);
    const rows = weightsOf(timing).filter((row) => (row.prior ?? 0) > 0);
    expect(rows.map(({ scenario, prior }) => [scenario, prior])).toEqual([
      ["gradual", 0.75],
      ["independent", 0.25],
    ]);
  });

  it("show the answer with constant recovery beside where recovery is not", () => {
    const place = section({ intervals: [covered(20, 24)] });
    const timing = timingOf(together.slice(0, 2).concat(evenly("Media levis", 19)), { place });
    expect(weightsOf(timing, "constant-recovery").length).toBeGreaterThan(2);
    expect(weightsOf(timingOf(together), "constant-recovery")).toEqual([]);
  });

  it("are weighed from the horizons searched where all finds lie in samples, and beside as if finds could lie anywhere", () => {
    const sampled = ["Orbula vesta", "Lenta acuta", "Spiralis nova"].map((name, i) =>
      taxon(
        name,
        Array.from({ length: 9 }, (_, j) => 3 * (j + 1) - i),
      ),
    );
    const single = (timing: Partial<Settings["timing"]>, variant?: string) =>
      weightsOf(timingOf(sampled, { timing }), variant).find((row) => row.scenario === "single")?.logEvidence;
    expect(single({}, "sampled")).toBeUndefined();
    expect(single({}, "continuous")).toBeLessThan(0);
    expect(single({})).not.toBe(single({}, "continuous"));
    expect(single({ contamination: 0.02 }, "continuous")).toBeUndefined();
    expect(single({ contamination: 0.02 }, "sampled")).toBe(single({}));
    for (const variant of ["sampled", "continuous"])
      expect(weightsOf(timingOf(together), variant)).toEqual([]);
  });

  it("are not compared for one taxon", () => {
    expect(timingOf([together[0]]).scenarios).toEqual([]);
  });

  it("say so where the sampling above the last finds cannot close the level", () => {
    const few = [evenly("Orbula vesta", 20, 1), evenly("Lenta acuta", 19, 1)];
    const codes = timingOf(few).cautions.map((caution) => caution.code);
    expect(codes).toContain("scenario-mass-at-edge");
  });

  it("stop between steps of long work when told to", () => {
    expect(() => timingOf(apart, { timing: { pulses: 3 }, progress })).toThrow("stopped");
  });
});

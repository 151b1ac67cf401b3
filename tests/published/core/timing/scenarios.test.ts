import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  type Coordinate,
  pieceCoordinate,
  uniformCoordinate,
} from "../../../../src/core/ranges/coordinate.ts";
import { atHorizon } from "../../../../src/core/timing/scenarios/at-horizon.ts";
import { type EndLikelihood, endLikelihood } from "../../../../src/core/timing/scenarios/end-likelihood.ts";
import {
  exactlyFromAtMost,
  exactlyFromAtMostEqual,
} from "../../../../src/core/timing/scenarios/from-at-most.ts";
import { gradual } from "../../../../src/core/timing/scenarios/gradual.ts";
import { sampledPulses } from "../../../../src/core/timing/scenarios/sampled-pulses.ts";
import { pulsesByPartitions } from "../../../../src/core/timing/scenarios/set-partitions.ts";
import { singleLevel } from "../../../../src/core/timing/scenarios/single-level.ts";
import { threePulses } from "../../../../src/core/timing/scenarios/three-pulses.ts";
import { twoPulses } from "../../../../src/core/timing/scenarios/two-pulses.ts";

interface Case {
  readonly case: string;
  readonly quantity: string;
  readonly inputs: {
    readonly set: string;
    readonly window: readonly [number, number];
    readonly longest: number;
    readonly at: readonly number[];
    readonly top: number;
    readonly chance: number;
    readonly taxon: string;
    readonly find: number;
    readonly pieces: readonly (readonly [number, number, number])[];
    readonly taxa: readonly (readonly [number, number, number, number?])[];
    readonly cases: readonly (readonly [number, number, number, number, number])[];
  };
  readonly expected: never;
  readonly tolerance: number;
}

const read = (name: string) => readFileSync(new URL(name, import.meta.url), "utf8");
const cases: readonly Case[] = JSON.parse(read("./scenarios.json"));
const findsOf = readSections();

function readSections(): Map<string, Map<string, number[]>> {
  const sections = new Map<string, Map<string, number[]>>();
  for (const line of read("./synthetic-sections.csv").trim().split(/\r?\n/).slice(1)) {
    const [set, taxon, , height] = line.split(",");
    const taxa = sections.get(set) ?? new Map<string, number[]>();
    sections.set(
      set,
      taxa.set(
        taxon,
        [...(taxa.get(taxon) ?? []), Number(height)].toSorted((a, b) => a - b),
      ),
    );
  }
  return sections;
}

/** From the first find, optionally with one find that may be out of place. */
function taxaOf(
  finds: Map<string, number[]>,
  coordinate: Coordinate = uniformCoordinate,
  misplaced?: { readonly chance: number; readonly top: number },
): EndLikelihood[] {
  return [...finds].map(([taxon, h]) => {
    const lastM = h[h.length - 1];
    const [base, last] = [coordinate.toEffective(h[0]), coordinate.toEffective(lastM)];
    const contamination = misplaced && { ...misplaced, secondM: h[Math.max(0, h.length - 2)] };
    return endLikelihood({ taxon, lastM, base, last, exponent: h.length - 1 }, coordinate, contamination);
  });
}

const setOf = ({ inputs }: Case) => findsOf.get(inputs.set) ?? new Map<string, number[]>();
const windowOf = ({ inputs }: Case) => ({ lowM: inputs.window[0], topsM: [inputs.window[1]] });
const ranged = (taxa: Case["inputs"]["taxa"]) =>
  taxa.map(([base, last, exponent], i) =>
    endLikelihood({ taxon: `t${i}`, lastM: last, base, last, exponent }, uniformCoordinate),
  );

const got: Readonly<Record<string, (c: Case) => unknown>> = {
  tiny: (c) => {
    const taxa = ranged(c.inputs.taxa);
    const window = windowOf(c);
    return {
      single: singleLevel(taxa, window).logEvidence[0],
      pulses2: twoPulses(taxa, window).logEvidence[0],
      pulses3: pulsesByPartitions(taxa, window, 3).logEvidence[0],
      gradual: gradual(taxa, window, [c.inputs.longest]).logEvidence[0][0],
    };
  },
  evidence: (c) => {
    const taxa = taxaOf(setOf(c));
    const window = windowOf(c);
    const gradually = gradual(taxa, window, [c.inputs.longest]);
    const pulses = [2, 3, 4].map((count) => pulsesByPartitions(taxa, window, count));
    return {
      single: singleLevel(taxa, window).logEvidence[0],
      gradual: gradually.logEvidence[0][0],
      confined: gradually.logEvidenceConfined[0],
      marker30: atHorizon(taxa, { kind: "normal", meanM: 30, sdM: 0.5 }),
      marker33: atHorizon(taxa, { kind: "normal", meanM: 33, sdM: 0.5 }),
      exact30: atHorizon(taxa, { kind: "point", atM: 30 }),
      dirichlet: pulses.map((p) => p.logEvidence[0]),
      equal: pulses.map((p) => p.logEvidenceEqual[0]),
    };
  },
  ranked: (c) => {
    const { posterior } = twoPulses(taxaOf(setOf(c)), windowOf(c));
    if (posterior === undefined) throw new Error("expected two pulses to fit");
    const [lower, upper] = posterior.levels;
    return { inLower: [...posterior.membership[0]], lowerM: lower.meanM, upperM: upper.meanM };
  },
  level: (c) => {
    const { posterior } = singleLevel(taxaOf(setOf(c)), windowOf(c));
    if (posterior === undefined) throw new Error("expected one level to fit");
    return { mean: posterior.meanM, above: c.inputs.at.map((heightM) => 1 - posterior.cdf(heightM)) };
  },
  contaminated: (c) => singleLevel(taxaOf(setOf(c), uniformCoordinate, c.inputs), windowOf(c)).logEvidence[0],
  outlier: (c) => {
    const { taxon, find, top } = c.inputs;
    const finds = new Map(setOf(c));
    finds.set(taxon, [...(finds.get(taxon) ?? []), find]);
    const evidence = (chance: number) =>
      singleLevel(taxaOf(finds, uniformCoordinate, { chance, top }), windowOf(c)).logEvidence[0];
    return { none: evidence(0), some: evidence(0.02) };
  },
  misplaced: ({ inputs }) =>
    inputs.taxa.map(([base, last, second, exponent = 0], i) => {
      const range = { taxon: `t${i}`, lastM: last, base, last, exponent };
      const { log } = endLikelihood(range, uniformCoordinate, { ...inputs, secondM: second });
      return inputs.at.map((heightM) => Math.exp(log(heightM)));
    }),
  area: ({ inputs }) =>
    inputs.cases.map(([base, last, exponent, lowM, highM]) =>
      endLikelihood({ taxon: "t", lastM: last, base, last, exponent }, uniformCoordinate).area(lowM, highM),
    ),
  recovery: (c) => {
    const pieces = c.inputs.pieces.map(([baseM, topM, r]) => ({ baseM, topM, atBase: r, atTop: r }));
    const taxa = taxaOf(setOf(c), pieceCoordinate(pieces, { beyond: 1, origin: 0 }));
    const window = windowOf(c);
    const { logEvidence, posterior } = singleLevel(taxa, window);
    if (posterior === undefined) throw new Error("expected one level to fit");
    return {
      single: logEvidence[0],
      pulses: [twoPulses(taxa, window), pulsesByPartitions(taxa, window, 3)].map((p) => p.logEvidence[0]),
      gradual: gradual(taxa, window, [c.inputs.longest]).logEvidence[0][0],
      inGap: posterior.cdf(30.2) - posterior.cdf(29.8),
      aboveGap: 1 - posterior.cdf(30.2),
    };
  },
};

function holds(actual: unknown, expected: unknown, tolerance: number): void {
  if (typeof expected === "number")
    return expect(Math.abs(Number(actual) - expected)).toBeLessThanOrEqual(
      tolerance * Math.max(1, Math.abs(expected)),
    );
  const keys = Object.keys(Object(expected));
  expect(Object.keys(Object(actual))).toEqual(keys);
  for (const key of keys) holds(Object(actual)[key], Object(expected)[key], tolerance);
}

describe("evidence of scenarios against an independent quadrature", () => {
  it.each(cases.map((c) => [c.case, c] as const))("%s", (_, c) => {
    holds(got[c.quantity](c), c.expected, c.tolerance);
  });
});

describe("a second route to the evidence of pulses", () => {
  it.each([...findsOf.keys()])("%s", (set) => {
    const taxa = taxaOf(findsOf.get(set) ?? new Map());
    const window = { lowM: 10, topsM: [45, 60] };
    const one = singleLevel(taxa, window).logEvidence;
    const two = twoPulses(taxa, window);
    const [two2, three2] = [2, 3].map((count) => pulsesByPartitions(taxa, window, count));
    const three = threePulses(taxa, window);
    for (const t of [0, 1]) {
      expect(two.logEvidence[t]).toBeCloseTo(two2.logEvidence[t], 6);
      expect(two.logEvidenceEqual[t]).toBeCloseTo(two2.logEvidenceEqual[t], 6);
      const fewer = [one[t], two.logEvidence[t]];
      expect(exactlyFromAtMost(three.atMost[t], fewer, 8)).toBeCloseTo(three2.logEvidence[t], 4);
      const equal = exactlyFromAtMostEqual(three.atMostEqual[t], [one[t], two.logEvidenceEqual[t]], 8);
      expect(equal).toBeCloseTo(three2.logEvidenceEqual[t], 4);
    }
  });

  it.each([3, 4] as const)("simulated, for %i pulses, within four of its own standard errors", (pulses) => {
    for (const finds of findsOf.values()) {
      const window = { lowM: 10, topsM: [45] };
      const sampled = sampledPulses(taxaOf(finds), window, { pulses, draws: 2048, seed: 11 });
      const exact = pulsesByPartitions(taxaOf(finds), window, pulses).logEvidence[0];
      const off = Math.abs((sampled?.logEvidence[0] ?? Number.NaN) - exact);
      expect(off).toBeLessThan(4 * (sampled?.errors[0] ?? 0));
      expect(sampled?.errors[0]).toBeLessThan(0.1);
    }
  });
});

import { expect, it } from "vitest";
import { findMarkers } from "../../../../src/core/markers/find-markers.ts";
import { blockGenerator, type Generator } from "../../../../src/core/numeric/streams.ts";
import {
  handMadeSection,
  handMadeStudy,
  measurementsOf,
} from "../../../unit/core/markers/hand-made-section.ts";
import {
  binomialBounds,
  density,
  evenSlabs,
  farSlabs,
  isFull,
  type Laboratory,
  simulateProfile,
  unevenSlabs,
} from "./simulated-profiles.ts";

const trials = isFull ? 2000 : 30;
const level = 0.95;
const sharp: Laboratory = { relative: 0.07, floor: 0.002, detectionLimit: 0.005 };
const blunt: Laboratory = { relative: 0.07, floor: 0.008, detectionLimit: 0.028 };

type Slabs = readonly (readonly [number, number])[];
interface Design {
  readonly title: string;
  readonly lengthCm: number;
  readonly fluence: number;
  /** Least share of sections in which the horizon is found: a thin layer may lie in a gap. */
  readonly leastFound: number;
  readonly laboratory: Laboratory;
  readonly near: (generator: Generator) => Slabs;
}

const designs: readonly Design[] = [
  {
    title: "fine even slabs of 1 cm, L 5 cm",
    lengthCm: 5,
    fluence: 40,
    leastFound: 1,
    laboratory: sharp,
    near: () => evenSlabs(4.8, 5.3, 0.01),
  },
  {
    title: "fine slabs, a third of the background below detection",
    lengthCm: 5,
    fluence: 40,
    leastFound: 0.95,
    laboratory: blunt,
    near: () => evenSlabs(4.8, 5.3, 0.01),
  },
  {
    title: "uneven slabs of 1 to 5 cm with gaps, L 4 cm",
    lengthCm: 4,
    fluence: 40,
    leastFound: 1,
    laboratory: sharp,
    near: (generator) =>
      unevenSlabs({ fromM: 4.7, toM: 5.4 }, { thinnestM: 0.01, thickestM: 0.05, gapShare: 0.3 }, generator),
  },
  {
    title: "coarse slabs of 5 to 15 cm, L 3 cm",
    lengthCm: 3,
    fluence: 40,
    leastFound: 0.95,
    laboratory: sharp,
    near: (generator) =>
      unevenSlabs({ fromM: 4.3, toM: 5.9 }, { thinnestM: 0.05, thickestM: 0.15, gapShare: 0.2 }, generator),
  },
  {
    title: "coarse slabs, censored background, almost no mixing",
    lengthCm: 0.3,
    fluence: 15,
    leastFound: 0.7,
    laboratory: blunt,
    near: (generator) =>
      unevenSlabs({ fromM: 4.5, toM: 5.6 }, { thinnestM: 0.03, thickestM: 0.1, gapShare: 0.2 }, generator),
  },
];

/** Shares of simulated sections in which the found iridium horizon is there and its interval holds the event. */
function coverage({ lengthCm, fluence, laboratory, near }: Design, stream: number) {
  let found = 0;
  let covered = 0;
  for (let trial = 0; trial < trials; trial++) {
    const generator = blockGenerator(1000 + stream, "sampling", trial);
    const surfaceM = 5 + 0.1 * generator.uniform();
    const detail = near(generator);
    const slabs = [
      ...farSlabs(0, detail[0][0], generator),
      ...detail,
      ...farSlabs(detail[detail.length - 1][1] + 0.1, 10, generator),
    ];
    const samples = simulateProfile(slabs, { truth: { surfaceM, lengthCm, fluence }, laboratory }, generator);
    const section = handMadeSection({
      densityGCm3: density,
      measurements: measurementsOf("iridium", samples),
    });
    const main = findMarkers(handMadeStudy([section], { replicates: 10, confidence: level })).main;
    const horizon = main.bySection.get(section.name);
    if (horizon === undefined) continue;
    found++;
    if (horizon.lowM <= surfaceM && surfaceM <= horizon.highM) covered++;
  }
  return { found, covered };
}

it.each(designs.map((design, stream) => ({ ...design, stream })))(
  "the found horizon's 95 % interval covers the event: $title",
  ({ stream, ...design }) => {
    const { found, covered } = coverage(design, stream);
    expect(found).toBeGreaterThanOrEqual(design.leastFound * trials);
    expect(covered).toBeGreaterThanOrEqual(binomialBounds(level, found).low);
  },
);

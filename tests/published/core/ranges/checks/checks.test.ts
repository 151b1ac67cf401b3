import { describe, expect, it } from "vitest";
import { kolmogorovUpperTail } from "../../../../../src/core/numeric/kolmogorov.ts";
import { rescaledInterior } from "../../../../../src/core/ranges/checks/centroid.ts";
import { declinePower } from "../../../../../src/core/ranges/checks/detectable-decline.ts";
import { distance } from "../../../../../src/core/ranges/checks/distance.ts";
import { gapTrend } from "../../../../../src/core/ranges/checks/gap-trend.ts";
import { gapsOf } from "../../../../../src/core/ranges/checks/gaps.ts";
import { highestFindP } from "../../../../../src/core/ranges/checks/highest-find.ts";
import { largestGap, largestGapUpperTail } from "../../../../../src/core/ranges/checks/largest-gap.ts";
import { gapRuns } from "../../../../../src/core/ranges/checks/runs.ts";
import { expectClose, readCases, readSections } from "../../../outside-values.ts";

interface Inputs {
  readonly set: string;
  readonly taxon: string;
  readonly levels?: readonly number[];
  readonly gaps: readonly number[];
  readonly share: number;
  readonly count: number;
  readonly n: number;
  readonly D: number;
  readonly horizons: readonly number[];
  readonly mu: number;
}

const sections = readSections(new URL("../../timing/synthetic-sections.csv", import.meta.url));
const levelsOf = ({ set, taxon, levels }: Inputs) => levels ?? sections.get(set)?.get(taxon) ?? [];

const quantities: Readonly<Record<string, (inputs: Inputs) => unknown>> = {
  distance: (inputs) => distance(rescaledInterior(levelsOf(inputs))),
  "gap-trend": (inputs) => gapTrend(gapsOf(levelsOf(inputs))),
  "gap-trend-p": ({ gaps }) => gapTrend(gaps)?.p,
  runs: (inputs) => gapRuns(gapsOf(levelsOf(inputs))),
  "largest-gap": (inputs) => largestGap(gapsOf(levelsOf(inputs))),
  "largest-gap-tail": ({ share, count }) => largestGapUpperTail(share, count),
  "highest-find": (inputs) => highestFindP(levelsOf(inputs)),
  kolmogorov: ({ n, D }) => kolmogorovUpperTail(D, n),
  "decline-power": ({ horizons, mu }) => declinePower(horizons, mu),
};

describe("pre-checks against outside values (sources in checks.json)", () => {
  it.each(readCases<Inputs>(new URL("./checks.json", import.meta.url)))("$quantity: $case", (outside) => {
    const compute = quantities[outside.quantity];
    expect(compute).toBeDefined();
    expectClose(compute(outside.inputs), outside.expected, outside.tolerance);
  });
});

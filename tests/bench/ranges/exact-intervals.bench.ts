import { bench, describe } from "vitest";
import { blockGenerator } from "../../../src/core/numeric/streams.ts";
import { sectionCases } from "../../../src/core/ranges/cases.ts";
import { rangeMethods } from "../../../src/core/ranges/methods.ts";
import type { RangeMethod } from "../../../src/core/ranges/result.ts";
import { markers, section, study, taxon } from "../../unit/core/ranges/small-study.ts";

/** What must follow a dragged level within a frame of 16 ms: every exact interval of 200 taxa, rows and notes. */
const exact: readonly RangeMethod[] = ["uniform", "window", "gap-rank", "two-highest", "top-k", "sampled"];
const TAXA = 200;
const SAMPLES = 120;

const place = section({ topM: SAMPLES });
const g = blockGenerator(1, "example", 0);
const taxa = Array.from({ length: TAXA }, (_, i) => {
  const levels = Array.from({ length: 5 + g.integer(40) }, () => g.integer(90));
  return taxon(
    `Orbula ${i}`,
    [...new Set(levels)].toSorted((a, b) => a - b),
  );
});
const cases = sectionCases(place, study([place]), { taxa, candidates: [], markers: markers() });

describe(`${TAXA} taxa`, () => {
  bench("all exact intervals of the tops", () => {
    for (const { top } of cases) for (const method of exact) rangeMethods[method].end(top);
  });
  for (const method of exact)
    bench(method, () => {
      for (const { top } of cases) rangeMethods[method].end(top);
    });
  bench("declining (quadrature, not exact)", () => {
    for (const { top } of cases.slice(0, 10)) rangeMethods.declining.end(top);
  });
});

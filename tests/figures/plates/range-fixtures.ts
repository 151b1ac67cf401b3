import type { Analysis } from "../../../src/core/analysis-result.ts";
import type { Outcome } from "../../../src/core/basis.ts";
import type { Leaning, RangeEnd, RangeMethod, Taper } from "../../../src/core/ranges/result.ts";
import type { LocalTaxon } from "../../../src/core/study/finds-result.ts";
import { defaultSettings } from "../../../src/core/study/settings.ts";

const METHODS = defaultSettings.ranges.methods;

/** An outcome of each kind, met in turn by the methods. */
const OUTCOMES: readonly Outcome[] = [
  "closed",
  "leaves-section",
  "closed",
  "in-hiatus",
  "closed",
  "open",
  "undefined",
];

function end(taxon: LocalTaxon, side: "top" | "base", method: RangeMethod): RangeEnd {
  const place = METHODS.indexOf(method);
  const outcome = OUTCOMES[place % OUTCOMES.length] ?? "closed";
  const [firstM, lastM] = [taxon.heightsM[0] ?? 0, taxon.heightsM.at(-1) ?? 0];
  const outward = side === "top" ? 1 : -1;
  const findM = side === "top" ? lastM : firstM;
  const has = outcome === "closed" || outcome === "in-hiatus" || (side === "top" && outcome !== "undefined");
  const boundM = findM + outward * (1 + place * 0.3);
  return {
    section: taxon.section,
    taxon: taxon.taxon,
    group: taxon.group,
    identification: "strict",
    end: side,
    method,
    horizons: taxon.heightsM.length,
    exponent: taxon.heightsM.length - 1,
    firstM,
    lastM,
    level: 0.95,
    outcome,
    horizon: "rusty layer",
    note: "",
    ...(has ? { pointM: findM + outward * 0.6 } : {}),
    ...(has ? (side === "top" ? { lowM: lastM, highM: boundM } : { lowM: boundM, highM: firstM }) : {}),
    ...(side === "top" && has ? { reachLevel: 0.9 } : {}),
  };
}

function leaning(taxon: LocalTaxon): Leaning {
  const lastM = taxon.heightsM.at(-1) ?? 0;
  return {
    section: taxon.section,
    taxon: taxon.taxon,
    end: "top",
    lastM,
    bounds: [
      { method: "sampled", boundM: lastM + 1, level: 0.95, outcome: "closed" },
      { method: "declining", boundM: lastM + 2.5, level: 0.95, outcome: "closed" },
      { method: "top-k", level: 0.95, outcome: "open", tail: 2, finds: 2 },
    ],
    nearestM: lastM + 1,
    furthestM: lastM + 2.5,
  };
}

function baseTaper(taxon: LocalTaxon): Taper {
  const firstM = taxon.heightsM[0] ?? 0;
  return {
    section: taxon.section,
    taxon: taxon.taxon,
    method: "sampled",
    heightsM: [firstM, firstM - 0.6, firstM - 1.2],
    chances: [1, 0.3, 0.02],
  };
}

/** The same with ends of every method and outcome, tapers at both ends, and how far each leans. */
export function withEnds(analysis: Analysis): Analysis {
  const { taxa, ranges } = analysis;
  const sides = ["top", "base"] as const;
  return {
    ...analysis,
    taxa: taxa.map((taxon, i) =>
      i === 0 ? { ...taxon, lastInclusiveM: (taxon.heightsM.at(-1) ?? 0) + 2 } : taxon,
    ),
    ranges: {
      ...ranges,
      ends: taxa.flatMap((taxon) =>
        sides.flatMap((side) => METHODS.map((method) => end(taxon, side, method))),
      ),
      baseTapers: taxa.map(baseTaper),
      leanings: taxa.map(leaning),
      cautions: [
        {
          code: "range-recovery-declines",
          section: "cliff",
          numbers: { p: 0.01, finds: 40, method: "declining" },
        },
      ],
    },
  };
}

import type { Caution } from "../basis.ts";
import type { Candidate } from "../study/finds-result.ts";
import {
  commonEndJoint,
  commonEndTest,
  informative,
  isAlignedTooWell,
  rejectsOneLevel,
} from "./common-end.ts";
import { boxTaxa, widestTaxon } from "./duration-answers.ts";
import { effortCautions } from "./effort-caution.ts";
import { DECLINE_GATE, pooledCentroid } from "./recovery-answers.ts";
import type { SetCase } from "./set-case.ts";
import { allCandidates, closedCandidates, untrimmedCandidates, withoutIsolated } from "./sets.ts";
import { surfaceCautions } from "./surface-answers.ts";

/** What weakens the answers about one set of one section. */
export function setCaseCautions(setCase: SetCase): Caution[] {
  return [
    ...declineCautions(setCase),
    ...effortCautions(setCase),
    ...oneLevelCautions(setCase),
    ...boxCautions(setCase),
    ...surfaceCautions(setCase),
  ];
}

function oneLevelCautions({ section, set, confidence }: SetCase): Caution[] {
  const place = { section: section.name, subject: set.set };
  const cautions: Caution[] = [];
  const dropped = set.ranges.length - informative(set.ranges).length;
  if (dropped > 0) cautions.push({ code: "timing-uninformative-taxa", ...place, numbers: { taxa: dropped } });
  const test = commonEndTest(set.ranges);
  if (test === undefined) return cautions;
  const { p, tied } = test;
  if (tied > 1) cautions.push({ code: "timing-ties", ...place, numbers: { taxa: tied } });
  if (isAlignedTooWell(p)) cautions.push({ code: "timing-aligned-too-well", ...place, numbers: { p } });
  if (rejectsOneLevel(p, confidence))
    cautions.push({ code: "timing-one-level-rejected", ...place, numbers: { p } });
  if (commonEndJoint(set.ranges, confidence).kind === "empty")
    cautions.push({ code: "timing-no-common-end", ...place });
  return cautions;
}

function boxCautions(setCase: SetCase): Caution[] {
  const { section, set, durationHorizons } = setCase;
  const place = { section: section.name, subject: set.set };
  const widest = widestTaxon(setCase);
  if (widest === undefined) return [];
  const { taxon, horizons } = widest;
  const cautions: Caution[] = [{ code: "timing-box-rarest", ...place, numbers: { taxon, horizons } }];
  if (!boxTaxa(setCase).isSelected)
    cautions.push({ code: "timing-box-all-taxa", ...place, numbers: { horizons: durationHorizons } });
  return cautions;
}

function declineCautions({ section, set }: SetCase): Caution[] {
  const pooled = pooledCentroid(set.ranges);
  if (pooled === undefined || pooled.p >= DECLINE_GATE) return [];
  const { p, z, finds } = pooled;
  return [
    { code: "timing-recovery-declines", section: section.name, subject: set.set, numbers: { p, z, finds } },
  ];
}

/** Where some candidates reach the top: who, and whether the answer turns on them. */
export function topCautions(cases: readonly SetCase[]): Caution[] {
  const all = cases.find(({ set }) => set.set === allCandidates);
  if (all === undefined) return [];
  const section = all.section.name;
  const reaching = all.set.ranges.filter((range) => range.reachesTop).map((range) => range.taxon);
  if (reaching.length === 0) return [];
  const cautions: Caution[] = [
    {
      code: "timing-reaches-top",
      section,
      numbers: { taxa: reaching.length, names: reaching.join(", ") },
    },
  ];
  return [...cautions, ...turns(cases, closedCandidates, "timing-turns-on-top")];
}

/** Where finds were judged: whose, and whether the answer turns on the judgement. */
export function comparedCautions(cases: readonly SetCase[]): Caution[] {
  const all = cases.find(({ set }) => set.set === allCandidates);
  if (all === undefined) return [];
  const compare = (code: string, set: string, turnsCode: string): Caution[] => {
    const other = cases.find((one) => one.set.set === set);
    const names = other === undefined ? [] : changedTaxa(all, other);
    if (names.length === 0) return [];
    return [
      { code, section: all.section.name, numbers: { taxa: names.length, names: names.join(", ") } },
      ...turns(cases, set, turnsCode),
    ];
  };
  return [
    ...compare("timing-isolated-finds", withoutIsolated, "timing-turns-on-isolated"),
    ...compare("timing-trimmed-finds", untrimmedCandidates, "timing-turns-on-trimming"),
  ];
}

function changedTaxa(all: SetCase, other: SetCase): readonly string[] {
  const lastOf = new Map(other.set.ranges.map((range) => [range.taxon, range.lastM]));
  return all.set.ranges.flatMap(({ taxon, lastM }) =>
    (lastOf.get(taxon) ?? lastM) === lastM ? [] : [taxon],
  );
}

/** Whether one level is rejected with the candidates as they stand but not with the other set, or the reverse. */
function turns(cases: readonly SetCase[], otherSet: string, code: string): Caution[] {
  const [all, other] = [allCandidates, otherSet].map((name) => cases.find(({ set }) => set.set === name));
  if (all === undefined || other === undefined) return [];
  const pAll = commonEndTest(all.set.ranges)?.p;
  const pOther = commonEndTest(other.set.ranges)?.p;
  if (pAll === undefined || pOther === undefined) return [];
  if (rejectsOneLevel(pAll, all.confidence) === rejectsOneLevel(pOther, all.confidence)) return [];
  return [{ code, section: all.section.name, numbers: { all: pAll, other: pOther } }];
}

/** Taxa beside the answer: those that live on above the horizon, and those that no set contains. */
export function besideCautions(section: string, candidates: readonly Candidate[]): Caution[] {
  const of = (code: string, role: Candidate["role"]): Caution[] => {
    const names = candidates.filter((c) => c.role === role).map((c) => c.taxon);
    return names.length === 0
      ? []
      : [{ code, section, numbers: { taxa: names.length, names: names.join(", ") } }];
  };
  return [
    ...of("timing-survivors", "survivor"),
    ...of("timing-late-starts", "late-start"),
    ...of("timing-too-few-horizons", "too-few"),
    ...surviveCautions(section, candidates),
  ];
}

/**
 * Candidates are the taxa not found above the main horizon. Where most taxa are, the few that are not look as if they
 * ended near it wherever they did.
 */
function surviveCautions(section: string, candidates: readonly Candidate[]): Caution[] {
  const count = (role: Candidate["role"]) => candidates.filter((c) => c.role === role).length;
  const [survivors, taxa] = [count("survivor"), count("candidate")];
  return taxa > 0 && survivors > taxa
    ? [{ code: "timing-most-survive", section, numbers: { survivors, taxa } }]
    : [];
}

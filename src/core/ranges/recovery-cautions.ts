import type { Caution } from "../basis.ts";
import { expm1, log1p } from "../numeric/elementary.ts";
import { groupBy } from "../study/grouping.ts";
import type { Settings } from "../study/settings.ts";
import type { RangeCase } from "./range-case.ts";
import { recoveryFit } from "./recovery-fit.ts";

/** Chance that a misfit of any group of a section is told where recovery is right in all of them. */
const MISFIT = 0.05;

/** Where recovery is not to be had from its source, contradicted by finds inside rock of recovery 0, or fits them badly. */
export function recoveryCautions(
  section: string,
  cases: readonly RangeCase[],
  { ranges }: Pick<Settings, "ranges">,
): Caution[] {
  const groups = [...groupBy(cases, ({ taxon }) => taxon.group)];
  const limit = -expm1(log1p(-MISFIT) / groups.length);
  return groups.flatMap(([group, ofGroup]): Caution[] => {
    const [{ weighing }] = ofGroup;
    if (weighing.kind === "unavailable") {
      if (ranges.recovery === "uniform") return [];
      const numbers = { source: ranges.recovery, reason: weighing.reason };
      return [{ code: "range-recovery-unavailable", section, subject: group, numbers }];
    }
    const { source } = weighing;
    const weighed = ofGroup.flatMap((c) => (c.weighing.kind === "known" ? [c.weighing.weighed] : []));
    return [
      ...contradicted(weighed, { section, group, source }),
      ...(ranges.recovery === "uniform" ? [] : misfit(weighed, { section, group, source }, limit)),
    ];
  });
}

interface Where {
  readonly section: string;
  readonly group: string;
  readonly source: string;
}

type Weighed = readonly Pick<RangeCase, "levels" | "contradicted">[];

function contradicted(weighed: Weighed, { section, group, source }: Where): Caution[] {
  const taxa = weighed.filter((c) => c.contradicted > 0);
  if (taxa.length === 0) return [];
  const finds = taxa.reduce((sum, c) => sum + c.contradicted, 0);
  const numbers = { source, finds, taxa: taxa.length };
  return [{ code: "range-recovery-contradicted", section, subject: group, numbers }];
}

function misfit(weighed: Weighed, { section, group, source }: Where, limit: number): Caution[] {
  const fit = recoveryFit(weighed.filter((c) => c.contradicted === 0).map(({ levels }) => levels));
  if (fit === undefined || fit.p >= limit) return [];
  const numbers = { source, finds: fit.finds, p: fit.p };
  return [{ code: "range-recovery-misfit", section, subject: group, numbers }];
}

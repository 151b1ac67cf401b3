import type { Analysis } from "../../core/analysis-result.ts";
import { type RecoveryStance, recoveryStance } from "../../core/ranges/leading.ts";
import type { Leaning, LeaningBound, RangeMethod } from "../../core/ranges/result.ts";
import { type ChartedTaxon, type DrawnEnd, endOf, endRows } from "./charted-taxa.ts";

/** One method's answer on both ends of one taxon. */
export interface ComparedMethod {
  readonly method: RangeMethod;
  readonly stance: RecoveryStance;
  readonly isLeading: boolean;
  /** Recovery declines towards the top, and the method takes it as even: the interval is too short. */
  readonly isTooShort: boolean;
  readonly top?: DrawnEnd;
  readonly base?: DrawnEnd;
}

/** One taxon by every method, and how far its upper end leans on the shape of recovery. */
export interface ComparedTaxon {
  readonly taxon: ChartedTaxon;
  readonly methods: readonly ComparedMethod[];
  readonly leaning?: Leaning;
}

const STANCES: readonly RecoveryStance[] = ["holds-under-decline", "fits-recovery", "even-recovery"];

/** The methods of a taxon, those that hold under a decline first, then in the settings' order. */
export function comparedTaxon(analysis: Analysis, section: string, taxon: ChartedTaxon): ComparedTaxon {
  const rows = endRows(analysis, section);
  const tops = rows.get(`top ${taxon.taxon}`) ?? [];
  const bases = rows.get(`base ${taxon.taxon}`) ?? [];
  const declines = analysis.ranges.cautions.some(
    (caution) => caution.code === "range-recovery-declines" && caution.section === section,
  );
  const leading = tops[0]?.method;
  const methods = [...new Set([...tops, ...bases].map(({ method }) => method))].map(
    (method): ComparedMethod => {
      const [top, base] = [tops, bases].map((list) => list.find((row) => row.method === method));
      const stance = recoveryStance(method);
      return {
        method,
        stance,
        isLeading: method === leading,
        isTooShort: declines && stance === "even-recovery",
        ...(top === undefined ? {} : { top: endOf(top) }),
        ...(base === undefined ? {} : { base: endOf(base) }),
      };
    },
  );
  const leaning = analysis.ranges.leanings.find(
    (one) => one.section === section && one.taxon === taxon.taxon && one.end === "top",
  );
  return {
    taxon,
    methods: methods.toSorted((a, b) => STANCES.indexOf(a.stance) - STANCES.indexOf(b.stance)),
    ...(leaning === undefined ? {} : { leaning }),
  };
}

/** What one bound of the robustness panel assumes: `top-k, 2 finds, tail 1`. */
export function boundName({ method, tail, finds }: LeaningBound): string {
  return tail === undefined ? method : `${method}, ${finds} finds, tail ${tail}`;
}

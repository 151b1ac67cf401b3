import type { Centroid } from "./checks/centroid.ts";
import { declineUpward } from "./checks/decline.ts";
import { note, type RangeCase, wordsOf } from "./range-case.ts";
import type { RangeEnd, RangeMethod } from "./result.ts";

/** Methods that hold where finds thin out towards the end, the first to lead first. */
const declineProof: readonly RangeMethod[] = ["declining", "two-highest", "top-k"];
/** Methods whose bound is then too near. */
const constantRecovery: ReadonlySet<RangeMethod> = new Set<RangeMethod>([
  "uniform",
  "uniform-bayes",
  "window",
  "gap-rank",
  "gap-quantile",
  "sampled",
  "counts",
  "sighting-rate",
]);
/** beta of a density of finds that falls straight to nothing at the end. */
const DECLINING_TAIL = 2;

/** What a method takes recovery to be towards an end. */
export type RecoveryStance = "holds-under-decline" | "fits-recovery" | "even-recovery";

/** Whether a method holds where finds thin out towards the end, fits or weighs how they do, or takes recovery as even. */
export function recoveryStance(method: RangeMethod): RecoveryStance {
  if (declineProof.includes(method)) return "holds-under-decline";
  return constantRecovery.has(method) ? "even-recovery" : "fits-recovery";
}

/** How the ends of one section are estimated on one side: which methods lead, and what is said of the others. */
export interface Leading {
  readonly methods: readonly RangeMethod[];
  /** The pooled pre-check where recovery declines towards these ends. */
  readonly decline?: Centroid;
  /** The same in the coordinate of method `recovery`, where that does not take the decline away. */
  readonly weighedDecline?: Centroid;
}

/**
 * Which methods lead at the tops, or at the bases, of one section. Where the finds of its candidates together thin out
 * towards those ends (pre-check under the gate), methods that hold under a decline lead, with `recovery` where its own
 * coordinate takes the decline away; the settings' order stands otherwise.
 */
export function leadingMethods(candidates: readonly RangeCase[], methods: readonly RangeMethod[]): Leading {
  const decline = declineUpward(candidates.map(({ levels }) => levels));
  if (decline === undefined) return { methods };
  const weighed = candidates.flatMap(({ weighing }) =>
    weighing.kind === "known" ? [weighing.weighed.levels] : [],
  );
  const weighedDecline = declineUpward(weighed);
  const isProof = (method: RangeMethod) =>
    declineProof.includes(method) ||
    (method === "recovery" && weighed.length > 0 && weighedDecline === undefined);
  const first = declineProof.filter((method) => methods.includes(method));
  const others = methods.filter((method) => !declineProof.includes(method));
  return {
    methods: [...first, ...others.filter(isProof), ...others.filter((method) => !isProof(method))],
    decline,
    ...(weighedDecline === undefined ? {} : { weighedDecline }),
  };
}

/** Under a decline the two-highest and top-k bounds take finds to thin out at least straight to nothing. */
export function caseUnder({ decline }: Leading, rangeCase: RangeCase): RangeCase {
  return decline === undefined ? rangeCase : { ...rangeCase, tail: Math.max(rangeCase.tail, DECLINING_TAIL) };
}

/** Marks a bound that the decline makes too near. */
export function marked({ decline, weighedDecline }: Leading, rangeCase: RangeCase, row: RangeEnd): RangeEnd {
  const found =
    row.method === "recovery" ? weighedDecline : constantRecovery.has(row.method) ? decline : undefined;
  if (found === undefined || row.highM === undefined) return row;
  const { upward } = wordsOf(rangeCase);
  const words = `recovery declines ${upward} (p = ${Number(found.p.toPrecision(2))}): the interval is too short`;
  return { ...row, note: note(words, row.note) };
}

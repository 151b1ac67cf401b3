import { exp } from "../numeric/elementary.ts";
import { logSumExp } from "../numeric/sums.ts";
import type { Coordinate } from "../ranges/coordinate.ts";
import { commonEndTest } from "./common-end.ts";
import type { TaxonRange } from "./range-data.ts";
import type { Influence } from "./result.ts";
import { endLikelihood } from "./scenarios/end-likelihood.ts";
import { gradual } from "./scenarios/gradual.ts";
import { singleLevel } from "./scenarios/single-level.ts";
import { twoPulses } from "./scenarios/two-pulses.ts";

/** What the answers of one set are judged by. */
export interface InfluenceInputs {
  readonly section: string;
  readonly set: string;
  readonly coordinate: Coordinate;
  readonly lowM: number;
  readonly highM: number;
  /** Longest gradual disappearance; without it scenarios are not compared, which takes most of the time. */
  readonly longestM?: number;
  /** Called between taxa; throws when the caller wants it to stop. */
  readonly step?: (done: number, total: number) => void;
}

interface Judged {
  readonly medianM?: number;
  /** Of one level, two pulses and gradual, equal priors. */
  readonly probabilities?: readonly number[];
  readonly p?: number;
}

/**
 * Exact leave-one-out: how far the answer moves without each taxon, and without the highest find of each. The level is the
 * posterior median of one common level; the scenario is the best of one level, two pulses and gradual under equal priors,
 * and its probability; p is that of the test of one common end. Without its highest find a taxon ends its range at the next
 * one below. The level and p take O(k) steps a taxon; the comparison of scenarios, done anew each time, O(k^2 nodes^2).
 */
export function influence(ranges: readonly TaxonRange[], inputs: InfluenceInputs): readonly Influence[] {
  const { section, set } = inputs;
  const whole = judge(ranges, inputs);
  const best = bestIndex(whole.probabilities);
  return ranges.flatMap((range, i) => {
    inputs.step?.(i, ranges.length);
    const others = ranges.filter((_, j) => j !== i);
    const lowered = withoutHighest(range, inputs.coordinate);
    const without = [
      { removed: "taxon" as const, left: others },
      ...(lowered === undefined
        ? []
        : [{ removed: "highest-find" as const, left: ranges.map((r, j) => (j === i ? lowered : r)) }]),
    ];
    return without.map(
      ({ removed, left }): Influence => ({
        section,
        set,
        taxon: range.taxon,
        removed,
        ...changes(whole, judge(left, inputs), best),
      }),
    );
  });
}

/** The range with its highest find set aside. Undefined with fewer than two known finds. */
function withoutHighest(range: TaxonRange, coordinate: Coordinate): TaxonRange | undefined {
  const levels = range.levels.slice(0, -1);
  const last = levels[levels.length - 1];
  const lastM = last === undefined ? undefined : coordinate.toHeight(last, "lower");
  if (last === undefined || lastM === undefined) return undefined;
  return {
    ...range,
    levels,
    last,
    lastM,
    horizons: range.horizons - 1,
    exponent: range.exponent - 1,
  };
}

function judge(ranges: readonly TaxonRange[], inputs: InfluenceInputs): Judged {
  if (ranges.length === 0) return {};
  const { coordinate, lowM, highM, longestM } = inputs;
  const taxa = ranges.map((range) => endLikelihood(range, coordinate));
  const window = { lowM, topsM: [highM] };
  const single = singleLevel(taxa, window);
  const p = commonEndTest(ranges)?.p;
  return {
    ...(single.posterior === undefined ? {} : { medianM: single.posterior.quantile(0.5) }),
    ...(p === undefined ? {} : { p }),
    ...(longestM === undefined
      ? {}
      : probabilitiesOf([
          single.logEvidence[0],
          twoPulses(taxa, window).logEvidence[0],
          gradual(taxa, window, [longestM]).logEvidence[0][0],
        ])),
  };
}

function probabilitiesOf(logs: readonly number[]): Pick<Judged, "probabilities"> {
  const total = logSumExp(logs);
  return Number.isFinite(total) ? { probabilities: logs.map((x) => exp(x - total)) } : {};
}

const names = ["single", "pulses-2", "gradual"] as const;

function bestIndex(probabilities: readonly number[] | undefined): number | undefined {
  return probabilities?.indexOf(Math.max(...probabilities));
}

function moved(after: number | undefined, before: number | undefined): number | undefined {
  return after === undefined || before === undefined ? undefined : after - before;
}

type Changes = Pick<Influence, "levelM" | "scenario" | "probability" | "p">;

function changes(whole: Judged, left: Judged, best: number | undefined): Changes {
  const levelM = moved(left.medianM, whole.medianM);
  const chance = ({ probabilities }: Judged) => (best === undefined ? undefined : probabilities?.[best]);
  const probability = moved(chance(left), chance(whole));
  const p = moved(left.p, whole.p);
  return {
    ...(best === undefined ? {} : { scenario: names[best] }),
    ...(levelM === undefined ? {} : { levelM }),
    ...(probability === undefined ? {} : { probability }),
    ...(p === undefined ? {} : { p }),
  };
}

import { log } from "../numeric/elementary.ts";

/** What a bound covers where finds are uniform, and where they thin out in a straight line to nothing at the end. */
export interface TailCoverage {
  readonly uniform: number;
  readonly thinning: number;
}

const NOMINAL = [0.5, 0.8, 0.9, 0.95, 0.99];

/** In thousandths. */
interface CoverageRow {
  readonly finds: number;
  readonly uniform: readonly number[];
  readonly thinning: readonly number[];
}

/**
 * Share of 200 000 simulated records whose one-sided upper bound lies at or above the true end, by the number of finds
 * and the nominal levels above; a level is left out where so few finds give no bound. Simulation in numpy 2.4.6,
 * make-weibull-coverage.py; standard error below 0.0012.
 */
const table: readonly CoverageRow[] = [
  { finds: 3, uniform: [750, 908, 976, 1000], thinning: [616, 813, 932, 1000] },
  { finds: 4, uniform: [690, 878, 952, 989], thinning: [518, 735, 861, 954] },
  { finds: 5, uniform: [659, 861, 938, 978, 1000], thinning: [472, 691, 814, 909, 999] },
  { finds: 6, uniform: [642, 850, 929, 972, 999], thinning: [442, 663, 785, 879, 990] },
  { finds: 7, uniform: [629, 842, 922, 965, 997], thinning: [423, 643, 763, 856, 976] },
  { finds: 8, uniform: [618, 836, 917, 961, 996], thinning: [411, 629, 747, 838, 963] },
  { finds: 9, uniform: [607, 830, 913, 958, 995], thinning: [399, 617, 735, 825, 952] },
  { finds: 10, uniform: [603, 828, 909, 955, 993], thinning: [389, 605, 724, 813, 942] },
  { finds: 12, uniform: [592, 821, 905, 951, 992], thinning: [377, 595, 710, 798, 926] },
  { finds: 15, uniform: [579, 815, 900, 946, 989], thinning: [368, 580, 693, 778, 908] },
  { finds: 20, uniform: [569, 809, 895, 943, 987], thinning: [354, 568, 679, 764, 891] },
  { finds: 30, uniform: [554, 804, 892, 940, 985], thinning: [348, 561, 670, 753, 875] },
  { finds: 50, uniform: [538, 799, 888, 938, 984], thinning: [346, 562, 671, 751, 870] },
  { finds: 100, uniform: [526, 797, 891, 940, 984], thinning: [347, 574, 682, 760, 874] },
];

/**
 * What the upper bound of `tailBound` with all finds really covers at a nominal level, to three decimals: interpolated
 * in 1 / k and in ln(1 - C); from 100 finds up as for 100. Undefined below 3 finds, at levels below 0.5 or above 0.99,
 * and where so few finds give no bound.
 */
export function tailCoverage(finds: number, confidence: number): TailCoverage | undefined {
  const uniform = interpolated(finds, confidence, "uniform");
  const thinning = interpolated(finds, confidence, "thinning");
  return uniform === undefined || thinning === undefined ? undefined : { uniform, thinning };
}

function interpolated(finds: number, confidence: number, law: "uniform" | "thinning"): number | undefined {
  const k = Math.min(finds, table[table.length - 1].finds);
  const below = table.findLast((row) => row.finds <= k);
  const above = table.find((row) => row.finds >= k);
  if (below === undefined || above === undefined) return undefined;
  const [low, high] = [atLevel(below[law], confidence), atLevel(above[law], confidence)];
  if (low === undefined || high === undefined) return undefined;
  const share = above === below ? 0 : (1 / below.finds - 1 / k) / (1 / below.finds - 1 / above.finds);
  return Math.round(low + share * (high - low)) / 1000;
}

function atLevel(covered: readonly number[], confidence: number): number | undefined {
  const above = NOMINAL.findIndex((level) => level >= confidence);
  if (above < 0 || above >= covered.length) return undefined;
  if (NOMINAL[above] === confidence) return covered[above];
  if (above === 0) return undefined;
  const share =
    (logMiss(confidence) - logMiss(NOMINAL[above - 1])) /
    (logMiss(NOMINAL[above]) - logMiss(NOMINAL[above - 1]));
  return covered[above - 1] + share * (covered[above] - covered[above - 1]);
}

function logMiss(level: number): number {
  return log(1 - level);
}

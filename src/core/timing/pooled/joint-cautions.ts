import type { Caution } from "../../basis.ts";
import type { Candidate } from "../../study/finds-result.ts";
import { commonEndTest, rejectsOneLevel } from "../common-end.ts";
import { DECLINE_GATE, pooledCentroid } from "../recovery-answers.ts";
import { OWN } from "../scenarios/evidence.ts";
import type { SetCase } from "../set-case.ts";
import { allCandidates } from "../sets.ts";
import { JOINT, leftOutOf, shareOf } from "./joint-rows.ts";
import type { JointSet } from "./joint-set.ts";
import type { Windows } from "./pooled-problem.ts";
import type { TargetInput } from "./pooled-targets.ts";

/** Half of the probability: more likely than not. */
const EVEN = 0.5;
/** Share of its length by which an interval may reach beyond another and still say the same. */
const SLACK = 0.25;
/** Share of the window at its top, and the posterior mass there that shows it to be cut off. */
const EDGE_SHARE = 0.05;
const EDGE_MASS = 0.05;

/** What weakens the answer about one set in several sections. */
export function jointCautions(joint: JointSet): Caution[] {
  const place = { section: JOINT, subject: joint.set.set };
  return [
    ...differenceCautions(joint),
    ...sampledCautions(joint),
    ...declineCautions(joint),
    ...rejectedCautions(joint),
    ...turnCautions(joint),
    ...edgeCautions(joint),
  ].map((caution) => ({ ...caution, ...place }));
}

/** By the test, the most lenient within the picks' errors; or where a level of its own for each section is the likelier. */
function differenceCautions({ between, level, confidence }: JointSet): Caution[] {
  const free = shareOf(level.free[OWN], level.common[OWN]);
  if (between !== undefined && rejectsOneLevel(between.p, confidence))
    return [{ code: "joint-sections-differ", numbers: { p: between.p } }];
  return free > EVEN ? [{ code: "joint-sections-likely-differ", numbers: { free } }] : [];
}

/** Where the horizons searched say otherwise than finds that could lie anywhere. */
function sampledCautions({ level: { posterior }, sampled, target, confidence }: JointSet): Caution[] {
  if (posterior === undefined || sampled === undefined) return [];
  const tail = 0.5 * (1 - confidence);
  const [low, high] = [tail, 1 - tail].map((p) => posterior.quantile(p));
  const [lowest, highest] = [tail, 1 - tail].map((p) => sampled.quantile(p));
  const slack = SLACK * (high - low);
  if (lowest >= low - slack && highest <= high + slack) return [];
  const { origin, scale } = target;
  return [
    {
      code: "joint-between-samples",
      numbers: { low: lowest - origin, high: highest - origin, unit: scale.unit },
    },
  ];
}

function declineCautions({ set }: JointSet): Caution[] {
  const names = set.cases.flatMap(({ section, set: { ranges } }) => {
    const pooled = pooledCentroid(ranges);
    return pooled !== undefined && pooled.p < DECLINE_GATE ? [section.title] : [];
  });
  return names.length === 0
    ? []
    : [{ code: "joint-recovery-declines", numbers: { sections: names.length, names: names.join(", ") } }];
}

function rejectedCautions({ set, confidence }: JointSet): Caution[] {
  const names = set.cases.flatMap(({ section, set: { ranges } }) => {
    const test = commonEndTest(ranges);
    return test !== undefined && rejectsOneLevel(test.p, confidence) ? [section.title] : [];
  });
  return names.length === 0
    ? []
    : [{ code: "joint-one-level-rejected", numbers: { sections: names.length, names: names.join(", ") } }];
}

/** Sections without which the median would leave the interval. */
function turnCautions(joint: JointSet): Caution[] {
  const { posterior } = joint.level;
  if (posterior === undefined) return [];
  const tail = 0.5 * (1 - joint.confidence);
  const { origin } = joint.target;
  const low = posterior.quantile(tail) - origin;
  const high = posterior.quantile(1 - tail) - origin;
  const titles = new Map(joint.set.cases.map(({ section }) => [section.name, section.title]));
  return leftOutOf(joint)
    .filter(({ median }) => median < low || median > high)
    .map(({ without, median, unit }) => ({
      code: "joint-turns-on-section",
      numbers: { without: titles.get(without) ?? without, median, unit },
    }));
}

function edgeCautions({ level: { posterior }, highest, top }: JointSet): Caution[] {
  if (posterior === undefined) return [];
  const mass = 1 - posterior.cdf(top - EDGE_SHARE * (top - highest));
  return mass > EDGE_MASS ? [{ code: "joint-mass-at-edge", numbers: { mass } }] : [];
}

interface Placing extends TargetInput {
  readonly candidates: readonly Candidate[];
  readonly windows: Windows;
}

/** Which sections are not answered together and why, and which taxa are not asked about. */
export function placingCautions(
  cases: readonly SetCase[],
  placed: readonly SetCase[],
  { markers, settings, candidates, windows }: Placing,
): Caution[] {
  const { main } = markers;
  const place = { section: JOINT };
  if (!main.isShared) return main.bySection.size > 1 ? [{ code: "joint-horizon-not-shared", ...place }] : [];
  const inside = new Set(placed.map(({ section }) => section.name));
  if (main.name === undefined || inside.size === 0) return [];
  const left = new Set(
    cases.filter(({ section }) => !inside.has(section.name)).map(({ section }) => section.title),
  );
  const scale = settings.timing.jointScale;
  const cautions: Caution[] = [];
  if (left.size > 0)
    cautions.push({
      code: "joint-sections-left-out",
      ...place,
      numbers: { sections: left.size, names: [...left].join(", "), horizon: main.name, scale },
    });
  if (inside.size < 2) return cautions;
  const titles = new Map(placed.map(({ section }) => [section.name, section.title]));
  const widened = [...windows].flatMap(([name, { isWidened }]) =>
    isWidened ? [titles.get(name) ?? name] : [],
  );
  if (widened.length > 0)
    cautions.push({
      code: "joint-window-widened",
      ...place,
      numbers: { sections: widened.length, names: widened.join(", ") },
    });
  return [...cautions, ...survivorCautions(candidates.filter(({ section }) => inside.has(section)))];
}

/** Taxa that live on above the horizon in some section: counted, and named where another section has them end. */
function survivorCautions(candidates: readonly Candidate[]): Caution[] {
  const surviving = new Set(candidates.filter(({ role }) => role === "survivor").map(({ taxon }) => taxon));
  const ending = new Set(candidates.filter(({ role }) => role === "candidate").map(({ taxon }) => taxon));
  const both = [...surviving].filter((taxon) => ending.has(taxon));
  return [...told("joint-survivors", [...surviving]), ...told("joint-survive-elsewhere", both)];
}

function told(code: string, names: readonly string[]): Caution[] {
  if (names.length === 0) return [];
  const numbers = { taxa: names.length, names: names.join(", ") };
  return [{ code, section: JOINT, subject: allCandidates, numbers }];
}

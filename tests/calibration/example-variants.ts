import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { studyFiles } from "../../datasets/veyra-shelf-truth/generator/study.ts";
import { readTruth } from "../../datasets/veyra-shelf-truth/generator/truth.ts";
import { changedTruth, type TruthChange } from "../../datasets/veyra-shelf-truth/generator/variants.ts";
import { analyse } from "../../src/core/analysis.ts";
import type { Analysis } from "../../src/core/analysis-result.ts";
import { readStudy } from "../../src/core/tables/read-study.ts";
import type { Scenario } from "../../src/core/timing/result.ts";
import { findings } from "../../src/report/findings/index.ts";
import { plain } from "../../src/report/wordings/words.ts";

const truthFile = new URL("../../datasets/veyra-shelf-truth/truth.json", import.meta.url);
export const writtenTruth = readTruth(readFileSync(fileURLToPath(truthFile), "utf8"));

type Kind = "one-level" | Scenario;

/** What is said of all candidates of one section of the example, made anew under a changed truth. */
export interface Told {
  readonly analysis: Analysis;
  readonly section: string;
  /** Name of the horizon that the section was judged against. */
  readonly main: string;
  /** Weights by kind, one level anywhere and at the horizons together. */
  readonly weights: ReadonlyMap<Kind, number>;
  readonly horizonWeights: ReadonlyMap<string, number>;
  readonly lead: Kind;
  readonly isDistrusted: boolean;
  readonly codes: readonly string[];
  readonly sentence: string;
}

export interface Drawn {
  readonly section: string;
  readonly change: TruthChange;
  readonly seed: number;
  /** The horizon that ends are compared with; taxa that begin after the event never enter where it is a later one. */
  readonly against: "veyra-impact" | "ash-upper";
}

/** Begin of the taxa left out where ends are compared with the upper ash, m from it: the event lies 3.52 m below. */
const BELOW_UPPER_ASH = -3.7;
/** Farther from the event another layer was taken for it: the study then asks about another horizon. */
const SAME_LAYER_M = 0.15;

function settingsOf({ section, against }: Drawn) {
  return {
    seed: 20260,
    replicates: 200,
    boundary: {
      horizon: against,
      same: [{ name: writtenTruth.horizon, horizons: [[section, "iridium-1"]] }],
    },
    ranges: { methods: ["uniform"] },
    timing: against === "ash-upper" ? { startBelow: BELOW_UPPER_ASH } : {},
  };
}

/** Undefined where a chance anomaly lower down was taken for the layer of the event. */
export function tell(drawn: Drawn): Told | undefined {
  const { section, change, seed, against } = drawn;
  const truth = changedTruth(writtenTruth, { ...change, seed, sections: [section] });
  const files = studyFiles(truth).set("settings.json", JSON.stringify(settingsOf(drawn)));
  const encoder = new TextEncoder();
  const study = readStudy(new Map([...files].map(([name, text]) => [name, encoder.encode(text)])));
  const analysis = analyse(study);
  const layer = analysis.markers.horizons.find((found) => found.name === "iridium-1");
  const [place] = truth.sections;
  if (layer === undefined || place === undefined) return undefined;
  if (Math.abs(layer.positionM - place.eventSurfaceM) > SAME_LAYER_M) return undefined;
  return toldBy(analysis, section, against);
}

export function toldBy(analysis: Analysis, section: string, main: string, set = "candidates"): Told {
  const { scenarios, distrusted, cautions } = analysis.timing;
  const isHere = (one: { readonly section?: string; readonly set?: string }) =>
    one.section === section && one.set === set;
  const weights = new Map<Kind, number>();
  const horizonWeights = new Map<string, number>();
  for (const row of scenarios) {
    if (!isHere(row) || row.variant !== undefined || row.probability === undefined) continue;
    const kind = row.scenario === "single" || row.scenario === "at-horizon" ? "one-level" : row.scenario;
    weights.set(kind, (weights.get(kind) ?? 0) + row.probability);
    if (row.horizon !== undefined) horizonWeights.set(row.horizon, row.probability);
  }
  const finding = findings(analysis).find((one) => one.station === "timing" && isHere(one));
  return {
    analysis,
    section,
    main,
    weights,
    horizonWeights,
    lead: [...weights].reduce((best, one) => (one[1] > best[1] ? one : best), ["one-level", 0] as const)[0],
    isDistrusted: distrusted.some(isHere),
    codes: cautions
      .filter((c) => c.section === section && (c.subject === undefined || c.subject === set))
      .map(({ code }) => code),
    sentence: plain(finding?.sentence ?? []),
  };
}

/** Whether the 95 % interval of a level's offset from the main horizon covers a value. */
export function covers(
  { analysis, section, main }: Told,
  scenario: Scenario,
  {
    offsetM,
    pulse,
    set = "candidates",
  }: { readonly offsetM: number; readonly pulse?: number; readonly set?: string },
): boolean | undefined {
  const row = analysis.timing.offsets.find(
    (one) =>
      one.section === section &&
      one.set === set &&
      one.scenario === scenario &&
      one.horizon === main &&
      one.pulse === pulse,
  );
  return row && row.low <= offsetM && offsetM <= row.high;
}

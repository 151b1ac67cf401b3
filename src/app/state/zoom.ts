import type { Analysis } from "../../core/analysis-result.ts";
import type { View } from "../../figures/plates/drawing.ts";
import type { Focus } from "./focus.ts";
import { heightOf, levelAt } from "./level.ts";
import type { Frame } from "./page-state.ts";

interface Extent {
  readonly bottomM: number;
  readonly topM: number;
}

const SMALLEST_SHARE = 1 / 400;

/** The part of the section in the frame, in metres of height; all of it where there is none. */
export function shownExtent({ section }: Focus, frame: Frame | undefined, analysis: Analysis): Extent {
  if (section === undefined) return { bottomM: 0, topM: 1 };
  const whole = { bottomM: section.bottomM, topM: section.topM };
  if (frame === undefined) return whole;
  const bottomM = heightOf(analysis, section.name, frame.low);
  const topM = heightOf(analysis, section.name, frame.high);
  return bottomM === undefined || topM === undefined ? whole : { bottomM, topM };
}

interface Move {
  /** Below 1 comes nearer, above 1 goes away. */
  readonly factor?: number;
  /** The height that stays where it is, in metres. */
  readonly aboutM?: number;
  /** How far up the frame moves, as a share of what is shown. */
  readonly shift?: number;
}

/** The next frame; undefined where it would hold the whole section. */
export function moveFrame(
  { focus, frame, analysis }: { focus: Focus; frame: Frame | undefined; analysis: Analysis },
  { factor = 1, aboutM, shift = 0 }: Move,
): Frame | undefined {
  const { section } = focus;
  if (section === undefined) return undefined;
  const shown = shownExtent(focus, frame, analysis);
  const length = shown.topM - shown.bottomM;
  const whole = section.topM - section.bottomM;
  const next = Math.max(length * factor, whole * SMALLEST_SHARE);
  if (next >= whole) return undefined;
  const about = aboutM ?? (shown.bottomM + shown.topM) / 2;
  const start = about - ((about - shown.bottomM) / length) * next + shift * length;
  const bottomM = Math.min(Math.max(start, section.bottomM), section.topM - next);
  const level = (heightM: number) => levelAt(analysis, section.name, heightM);
  return { low: level(bottomM), high: level(bottomM + next) };
}

/**
 * The frame as a plate takes it, in metres on the scale that is shown.
 * @param was where the frame's ends are read, if the main horizon is being moved.
 */
export function viewOf(
  focus: Focus,
  frame: Frame | undefined,
  analysis: Analysis,
  was: Analysis = analysis,
): View {
  const view: View = { vertical: focus.scale };
  const { section } = focus;
  if (frame === undefined || section === undefined) return view;
  const { bottomM, topM } = shownExtent(focus, frame, was);
  const main = analysis.markers.main.bySection.get(section.name);
  const zero = focus.scale === "own" && focus.station !== "fence" ? 0 : (main?.positionM ?? 0);
  return { ...view, frame: [bottomM - zero, topM - zero] };
}

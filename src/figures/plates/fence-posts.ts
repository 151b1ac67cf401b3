import { toCommon } from "../../core/alignment/flatten.ts";
import type { Analysis } from "../../core/analysis-result.ts";
import type { MarkerHorizon } from "../../core/markers/result.ts";
import type { Section } from "../../core/study/model.ts";
import { type HeightScale, heightScale, type Lens, type Span } from "../height-scale.ts";
import type { View } from "./drawing.ts";
import { extentM, mainHorizonOf, onCommon } from "./section-frame.ts";

/** One section of a fence, placed by height. */
export interface FencePost {
  readonly section: Section;
  readonly y: HeightScale;
  /** One placing of each horizon. */
  readonly horizons: readonly MarkerHorizon[];
}

export interface FencePosts {
  readonly posts: readonly FencePost[];
  /** The scale they share; absent where each stands on its own. */
  readonly commonY?: HeightScale;
  readonly lens?: Lens;
  readonly unaligned: readonly string[];
}

/** Sections in the study's order on their common scale, flattened on the datum; on their own bases where there is none. */
export function fencePosts(analysis: Analysis, view: View, span: Span): FencePosts {
  const { study, alignment } = analysis;
  const aligned = study.sections.flatMap((section) => {
    const own = alignment.sections.find((candidate) => candidate.section === section.name);
    return own === undefined ? [] : [{ section, own }];
  });
  if (aligned.length === 0) return { posts: ownPosts(analysis, span), unaligned: [] };
  const { beyond } = alignment;
  const ends = aligned.flatMap(({ section, own }) =>
    extentM(section).map((heightM) => toCommon(own, heightM, { beyond }).common),
  );
  const [bottomM, topM] =
    view.frame && view.frame[1] > view.frame[0] ? view.frame : [Math.min(...ends), Math.max(...ends)];
  const lens = commonLens(view, [bottomM, topM]);
  const commonY = heightScale({ bottomM, topM, ...span }, lens);
  const posts = aligned.flatMap(({ section, own }) => {
    const y = withinSpan(onCommon(section, own, { beyond, commonY }), span);
    return y === undefined ? [] : [{ section, y, horizons: placedOnce(analysis, section) }];
  });
  const names = new Set(aligned.map(({ section }) => section.name));
  const unaligned = study.sections.filter(({ name }) => !names.has(name)).map(({ title }) => title);
  return { posts, commonY, lens, unaligned };
}

function commonLens({ lens }: View, [bottomM, topM]: readonly [number, number]): Lens | undefined {
  if (lens === undefined || lens.times <= 1 || bottomM >= 0 || topM <= 0) return undefined;
  const [baseM, lensTopM] = [Math.max(bottomM, -lens.halfWidthM), Math.min(topM, lens.halfWidthM)];
  return { baseM, topM: lensTopM, magnification: lens.times };
}

/** The scale cut to the part that is on the plate; undefined where none is. */
function withinSpan(y: HeightScale, { top, bottom }: Span): HeightScale | undefined {
  const knots = y.domain().map((heightM) => ({ heightM, at: y(heightM) }));
  const isOn = ({ at }: { readonly at: number }) => at >= top && at <= bottom;
  if (knots.every(isOn)) return y;
  const ends = [bottom, top].map((at) => ({ heightM: y.invert(at), at }));
  const [low, high] = [knots[0], knots[knots.length - 1]];
  const kept = [...knots, ...ends.filter(({ heightM }) => heightM > low.heightM && heightM < high.heightM)]
    .filter(isOn)
    .toSorted((a, b) => a.heightM - b.heightM);
  if (kept.length < 2 || kept[0].heightM === kept[kept.length - 1].heightM) return undefined;
  return y
    .copy()
    .domain(kept.map((knot) => knot.heightM))
    .range(kept.map((knot) => knot.at));
}

function ownPosts(analysis: Analysis, { top, bottom }: Span): readonly FencePost[] {
  const { sections } = analysis.study;
  const thickest = Math.max(1e-6, ...sections.map((section) => extentM(section)[1] - extentM(section)[0]));
  return sections.map((section) => {
    const [bottomM, topM] = extentM(section);
    const height = ((bottom - top) * (topM - bottomM)) / thickest;
    const y = heightScale({ bottomM, topM, top: bottom - height, bottom });
    return { section, y, horizons: placedOnce(analysis, section) };
  });
}

/** The main horizon as it was settled, and every other name once. */
function placedOnce(analysis: Analysis, { name }: Section): readonly MarkerHorizon[] {
  const main = mainHorizonOf(analysis, name);
  const here = analysis.markers.horizons.filter((horizon) => horizon.section === name);
  const byName = new Map(
    [...here.toReversed(), ...(main ? [main] : [])].map((horizon) => [horizon.horizon, horizon]),
  );
  return [...byName.values()];
}

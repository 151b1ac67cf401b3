import { scaleLinear } from "d3";
import { toCommon } from "../../core/alignment/flatten.ts";
import type { SectionAlignment } from "../../core/alignment/result.ts";
import type { Analysis } from "../../core/analysis-result.ts";
import type { MarkerHorizon } from "../../core/markers/result.ts";
import type { Section } from "../../core/study/model.ts";
import { toMetres } from "../../core/study/units.ts";
import type { HiddenRock } from "../columns/lithology-column.tsx";
import type { AxisReading } from "../height-axis.tsx";
import { type HeightScale, heightScale, type Lens, type Span } from "../height-scale.ts";
import type { VerticalScale, View } from "./drawing.ts";

/** An axis: the scale its readings stand on, and how they read. */
export interface AxisScale {
  readonly scale: HeightScale;
  readonly reading: AxisReading;
}

/** One section set up to be drawn: where its heights stand, and what its axes say. */
export interface SectionFrame {
  readonly section: Section;
  readonly vertical: VerticalScale;
  /** From metres of height in the section to points. */
  readonly y: HeightScale;
  readonly axis: AxisScale;
  /** The second, quieter axis: the section's own, or metres from the horizon where the first is its own. */
  readonly second?: AxisScale;
  readonly main?: MarkerHorizon;
  readonly alignment?: SectionAlignment;
  readonly lens?: Lens;
  readonly hidden: readonly HiddenRock[];
}

export function sectionNamed(analysis: Analysis, name: string): Section {
  const section = analysis.study.sections.find((candidate) => candidate.name === name);
  if (section === undefined)
    throw new RangeError(`plates: expected a section of the study, got ${name.slice(0, 80)}`);
  return section;
}

/** The main horizon of a section, where it has one. */
export function mainHorizonOf({ markers }: Analysis, section: string): MarkerHorizon | undefined {
  return markers.main.bySection.get(section);
}

export function sectionFrame(
  analysis: Analysis,
  name: string,
  options: { view: View; span: Span },
): SectionFrame {
  const { view, span } = options;
  const section = sectionNamed(analysis, name);
  const main = mainHorizonOf(analysis, name);
  const alignment = analysis.alignment.sections.find((candidate) => candidate.section === name);
  const vertical = verticalOf(view.vertical ?? "from-horizon", main, alignment);
  const base = { section, vertical, main, hidden: hiddenRock(section) };
  if (vertical === "common" && alignment !== undefined)
    return {
      ...base,
      alignment,
      ...commonFrame(section, alignment, { beyond: analysis.alignment.beyond, view, span, main }),
    };
  const zeroM = vertical === "from-horizon" ? (main?.positionM ?? 0) : 0;
  const extent = frameExtent(
    extentM(section),
    view.frame?.map((value) => value + zeroM),
  );
  const centre = (view.was && mainHorizonOf(view.was, name)) ?? main;
  const lens = lensIn(extent, centre?.positionM, view);
  const y = heightScale({ bottomM: extent[0], topM: extent[1], ...span }, lens);
  const own = { scale: y, reading: ownReading(section) };
  const relative = main && { scale: y, reading: horizonReading(main.positionM) };
  const [axis, second] = vertical === "from-horizon" && relative ? [relative, own] : [own, relative];
  return { ...base, alignment, lens, y, axis, second };
}

function verticalOf(
  wanted: VerticalScale,
  main: MarkerHorizon | undefined,
  alignment: SectionAlignment | undefined,
): VerticalScale {
  if (wanted === "common" && alignment !== undefined) return "common";
  return wanted === "own" || main === undefined ? "own" : "from-horizon";
}

const SHORTEST_M = 1e-6;

/** Both ends of a section; a section of no thickness is given half a metre each way. */
export function extentM({ bottomM, topM }: Section): readonly [number, number] {
  if (!Number.isFinite(bottomM) || !Number.isFinite(topM)) return [0, 1];
  return topM - bottomM > SHORTEST_M ? [bottomM, topM] : [bottomM - 0.5, bottomM + 0.5];
}

function frameExtent(
  whole: readonly [number, number],
  frame: readonly number[] | undefined,
): readonly [number, number] {
  const [low, high] = frame ?? whole;
  return high - low > SHORTEST_M ? [low, high] : whole;
}

function lensIn(
  [bottomM, topM]: readonly [number, number],
  centre: number | undefined,
  view: View,
): Lens | undefined {
  if (view.lens === undefined || centre === undefined) return undefined;
  const { halfWidthM, times } = view.lens;
  const [baseM, lensTopM] = [Math.max(bottomM, centre - halfWidthM), Math.min(topM, centre + halfWidthM)];
  if (!(lensTopM - baseM > SHORTEST_M) || !(times > 1)) return undefined;
  return { baseM, topM: lensTopM, magnification: times };
}

export function ownReading({ unit, axis }: Section): AxisReading {
  return {
    unit: axis === "depth" ? `${unit} depth` : unit,
    metresPerUnit: toMetres(1, unit),
    zeroM: 0,
    direction: axis,
  };
}

export function horizonReading(zeroM: number): AxisReading {
  return { unit: "m", metresPerUnit: 1, zeroM, direction: "height", signed: true };
}

interface CommonOptions {
  readonly beyond: "rigid" | "gain";
  readonly view: View;
  readonly span: Span;
  readonly main: MarkerHorizon | undefined;
}

function commonFrame(section: Section, alignment: SectionAlignment, options: CommonOptions) {
  const { beyond, view, span, main } = options;
  const common = (heightM: number) => toCommon(alignment, heightM, { beyond }).common;
  const [low, high] = extentM(section);
  const extent = frameExtent([common(low), common(high)], view.frame);
  const lens = lensIn(extent, main && common(main.positionM), view);
  const commonY = heightScale({ bottomM: extent[0], topM: extent[1], ...span }, lens);
  const y = onCommon(section, alignment, { beyond, commonY });
  return {
    lens: lens && { ...lens, baseM: y.invert(commonY(lens.baseM)), topM: y.invert(commonY(lens.topM)) },
    y,
    axis: { scale: commonY, reading: horizonReading(0) },
    second: { scale: y, reading: ownReading(section) },
  };
}

/** Heights of a section to points through the common scale: exact, since both maps are linear between their knots. */
export function onCommon(
  section: Section,
  alignment: SectionAlignment,
  { beyond, commonY }: { readonly beyond: "rigid" | "gain"; readonly commonY: HeightScale },
): HeightScale {
  const common = (heightM: number) => toCommon(alignment, heightM, { beyond }).common;
  const [low, high] = extentM(section);
  const inside = alignment.heightsM
    .map((heightM, i) => ({ heightM, common: alignment.targets[i] }))
    .filter(({ heightM }) => heightM > low && heightM < high);
  const known = [{ heightM: low, common: common(low) }, ...inside, { heightM: high, common: common(high) }];
  const heightAt = scaleLinear(
    known.map((knot) => knot.common),
    known.map((knot) => knot.heightM),
  );
  const breaks = commonY
    .domain()
    .map((value) => ({ heightM: heightAt(value), common: value }))
    .filter(({ heightM }) => heightM > low && heightM < high);
  const knots = [...known, ...breaks].toSorted((a, b) => a.heightM - b.heightM || a.common - b.common);
  return scaleLinear(
    knots.map((knot) => knot.heightM),
    knots.map((knot) => commonY(knot.common)),
  );
}

export function hiddenRock({ intervals }: Section): readonly HiddenRock[] {
  return intervals.flatMap(({ kind, baseM, topM }) =>
    kind === "covered" || kind === "core-loss" || kind === "not-searched" ? [{ kind, baseM, topM }] : [],
  );
}

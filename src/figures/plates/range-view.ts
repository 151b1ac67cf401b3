import type { RangeTapers } from "../../core/ranges/asked-ends.ts";
import type { RangeMethod } from "../../core/ranges/result.ts";
import type { SectionView } from "./drawing.ts";

export type RangeOrder = "group" | "last" | "name";

/** What a person may change about the range chart without changing its data. */
export interface RangeView extends SectionView {
  /** Whose ends and tapers are drawn; default the method that leads at each end. */
  readonly method?: RangeMethod;
  /** Tapers by that method. */
  readonly tapers?: readonly RangeTapers[];
  /** Default by group. */
  readonly order?: RangeOrder;
  /** Groups that are drawn as one strip of last finds. */
  readonly folded?: ReadonlySet<string>;
  /** The taxon whose finds are marks of their own. */
  readonly focus?: string;
  /** Finds that a person set aside, which the analysis holds no more. */
  readonly aside?: readonly AsideFind[];
  /** Draw beside each bar from which height to which its bound moves with the shape of recovery. */
  readonly isLeaningShown?: boolean;
}

export interface AsideFind {
  readonly taxon: string;
  readonly heightM: number;
  /** `file:row`. */
  readonly row: string;
}

export interface PagedView extends RangeView {
  /** Widest page, in points; default the width of an A3 page lying down, less its margins. */
  readonly pageWidth?: number;
}

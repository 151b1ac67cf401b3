import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { HeightScale } from "../height-scale.ts";

/** Which reading the shared vertical axis carries. */
export type VerticalScale = "own" | "from-horizon" | "common";

/** What a person may change about any plate without changing its data. */
export interface View {
  /** Default `from-horizon`: 0 at the main horizon; where a section has none, its own axis. */
  readonly vertical?: VerticalScale;
  /** Part of the section shown, metres on that scale (of height for `own`), lower end first. Default: all of it. */
  readonly frame?: readonly [number, number];
  /** Magnify a band about the main horizon: half-width in metres and how many times. */
  readonly lens?: { readonly halfWidthM: number; readonly times: number };
  /** What was before a choice that is only tried: drawn behind as a thin ghost, and a lens stays about its horizon. */
  readonly was?: Analysis;
  /** `@font-face` rules for a file that must carry its own faces. */
  readonly fontFaces?: string;
}

export interface SectionView extends View {
  readonly section: string;
  /** Points between the upper and the lower end of the section; default a tall page. */
  readonly bodyHeight?: number;
}

/** Where one section stands on a plate: between `left` and `right` its heights map through `scale` to y, in points. */
export interface Panel {
  readonly section: string;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  /** From metres of height in the section to y, and back. */
  readonly scale: HeightScale;
}

/** A plate ready to publish: the same element in the page, as a file, and in the report. Sizes in points. */
export interface Drawing {
  readonly id: string;
  readonly title: string;
  /** The finding in one sentence. */
  readonly description: string;
  readonly width: number;
  readonly height: number;
  readonly element: ReactElement;
  readonly panels: readonly Panel[];
}

import type { ReactElement, ReactNode } from "react";
import type { PatternId } from "./lithology/pattern-tiles.ts";
import { PatternDefinitions } from "./lithology/patterns.tsx";
import { round } from "./numbers.ts";
import { COLOURS } from "./theme.ts";

export const POINTS_PER_MM = 72 / 25.4;

interface PlateProps {
  /** Prefix of every id on the plate, so that several plates can share a page. */
  readonly id: string;
  readonly title: string;
  /** The finding, in a sentence: what somebody who cannot see the plate should know. */
  readonly description: string;
  /** Physical size in points. */
  readonly width: number;
  readonly height: number;
  readonly patterns?: Iterable<PatternId>;
  /** `@font-face` rules for a file that must carry its own faces. */
  readonly fontFaces?: string;
  readonly children: ReactNode;
}

/** The root of a figure: an SVG of physical size whose user unit is the point. */
export function Plate(props: PlateProps): ReactElement {
  const { id, title, description, patterns = [], fontFaces, children } = props;
  const [width, height] = [round(props.width), round(props.height)];
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      id={id}
      role="img"
      aria-labelledby={`${id}-title ${id}-description`}
      width={`${round(width / POINTS_PER_MM)}mm`}
      height={`${round(height / POINTS_PER_MM)}mm`}
      viewBox={`0 0 ${width} ${height}`}
    >
      <title id={`${id}-title`}>{title}</title>
      <desc id={`${id}-description`}>{description}</desc>
      {fontFaces && <style>{fontFaces}</style>}
      <PatternDefinitions plateId={id} patterns={patterns} />
      <rect width={width} height={height} fill={COLOURS.paper} />
      {children}
    </svg>
  );
}

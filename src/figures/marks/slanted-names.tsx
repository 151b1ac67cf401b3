import type { ReactElement } from "react";
import { SLANT_DEGREES, type SlantedName } from "../layout/slanted-names.ts";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { capHeight, type TextStyle } from "../text.ts";
import { COLOURS } from "../theme.ts";

interface SlantedNamesProps {
  readonly names: readonly SlantedName[];
  /** Lower edge of the marks the names stand under. */
  readonly y: number;
  readonly style: TextStyle;
}

const DROP = 7;
const MOVED = 0.4;

/** Names hung under their marks, with a thin lead where a name had to stand aside. */
export function SlantedNames({ names, y, style }: SlantedNamesProps): ReactElement {
  const leads = names
    .filter((name) => Math.abs(name.x - name.markX) > MOVED)
    .map((name) => `M${round(name.markX)} ${round(y + 1.5)}L${round(name.x)} ${round(y + DROP - 1)}`);
  return (
    <g>
      {leads.length > 0 && <path d={leads.join("")} fill="none" stroke={COLOURS.soft} strokeWidth={0.3} />}
      {names.map((name) => (
        <PlateText
          key={`${name.text} ${name.markX}`}
          x={name.x - capHeight(style) / 2}
          y={y + DROP}
          style={style}
          turn={SLANT_DEGREES}
        >
          {name.text}
        </PlateText>
      ))}
    </g>
  );
}

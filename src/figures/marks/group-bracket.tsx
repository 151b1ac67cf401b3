import type { ReactElement } from "react";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth } from "../text.ts";
import { type GroupSign, TEXT } from "../theme.ts";

interface GroupBracketProps {
  readonly x: number;
  readonly width: number;
  /** Where the bracket stands: above the bars of the group. */
  readonly y: number;
  readonly sign: GroupSign;
  readonly name: string;
}

const LETTER_GAP = 3;
const SHORTEST_NAME = 4;

/** Names a block of bars: its letter, and its name where there is room, over a line as wide as the block. */
export function GroupBracket({ x, width, y, sign, name }: GroupBracketProps): ReactElement {
  const letterWidth = textWidth(sign.letter, TEXT.labelStrong) + LETTER_GAP;
  const shown = fitText(name, width - letterWidth, TEXT.unit);
  return (
    <g>
      <path d={`M${round(x)} ${round(y)}h${round(width)}`} stroke={sign.colour} strokeWidth={1.1} />
      <PlateText x={x} y={y - 3} style={TEXT.labelStrong} colour={sign.colour}>
        {sign.letter}
      </PlateText>
      {shown.length >= SHORTEST_NAME && (
        <PlateText x={x + letterWidth} y={y - 3} style={TEXT.unit} colour={sign.colour}>
          {shown}
        </PlateText>
      )}
    </g>
  );
}

import { round } from "../numbers.ts";
import { COLOURS } from "../theme.ts";
import type { Tie } from "./fence-lines.ts";

const THINNEST_BAND = 1;

/** Lines from section to section with the interval of both ends as a band. */
export function FenceTies({ ties }: { readonly ties: readonly Tie[] }) {
  return (
    <g>
      {ties.map((tie) => (
        <TieLine key={`${tie.horizon} ${tie.from.x}`} tie={tie} />
      ))}
    </g>
  );
}

function at(x: number, y: number): string {
  return `${round(x)} ${round(y)}`;
}

function TieLine({ tie }: { readonly tie: Tie }) {
  const { from, to, rockX, isDatum, isUsed, horizon } = tie;
  const colour = isDatum ? COLOURS.rust : COLOURS.ink;
  const hasBand = from.bottom - from.top > THINNEST_BAND || to.bottom - to.top > THINNEST_BAND;
  const band = `M${at(from.x, from.top)}L${at(to.x, to.top)}L${at(to.x, to.bottom)}L${at(from.x, from.bottom)}z`;
  return (
    <g data-horizon={horizon}>
      {hasBand && <path d={band} fill={colour} opacity={isDatum ? 0.13 : 0.07} />}
      <path
        d={`M${at(from.x, from.y)}L${at(to.x, to.y)}${rockX === undefined ? "" : `H${round(rockX)}`}`}
        fill="none"
        stroke={colour}
        strokeWidth={isDatum ? 0.9 : 0.6}
        strokeDasharray={isUsed ? undefined : "4 2.5"}
      />
    </g>
  );
}

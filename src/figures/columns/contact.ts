import { range } from "d3";
import { round } from "../numbers.ts";

export type ContactKind =
  | "sharp"
  | "gradational"
  | "erosive"
  | "hardground"
  | "burrowed"
  | "karst"
  | "faulted";

interface ContactLine {
  readonly x: number;
  readonly y: number;
  readonly width: number;
}

/** The line between two beds, in the manner of field logs. */
export function contactPath(kind: ContactKind, { x, y, width }: ContactLine): string {
  const straight = `M${round(x)} ${round(y)}h${round(width)}`;
  switch (kind) {
    case "sharp":
    case "gradational":
      return straight;
    case "erosive":
      return wave({ x, y, width }, 1.2);
    case "karst":
      return zigzag({ x, y, width }, 2.2);
    case "hardground":
      return straight + hung({ x, y, width }, "v-1.8");
    case "burrowed":
      return straight + hung({ x, y, width }, "v1.8a.6 .6 0 0 0 1.2 0v-1.8");
    case "faulted":
      return `${straight}M${round(x + width * 0.2)} ${round(y - 1.7)}h8l-2 -1.4M${round(x + width * 0.8)} ${round(y + 1.7)}h-8l2 1.4`;
    default:
      return kind satisfies never;
  }
}

export interface ContactStroke {
  readonly strokeWidth: number;
  readonly strokeDasharray?: string;
}

export function contactStroke(kind: ContactKind): ContactStroke {
  if (kind === "gradational") return { strokeWidth: 0.45, strokeDasharray: "1.6 1.4" };
  return { strokeWidth: kind === "sharp" || kind === "burrowed" ? 0.45 : 0.8 };
}

function wave({ x, y, width }: ContactLine, amplitude: number): string {
  const count = 2 * Math.max(1, Math.round(width / 8));
  const step = width / count;
  const arcs = range(count).map((i) => {
    const lift = i % 2 === 0 ? -2 * amplitude : 2 * amplitude;
    return `q${round(step / 2)} ${lift} ${round(step)} 0`;
  });
  return `M${round(x)} ${round(y)}${arcs.join("")}`;
}

function zigzag({ x, y, width }: ContactLine, depth: number): string {
  const count = Math.max(2, Math.round(width / 5));
  const step = round(width / count / 2);
  return `M${round(x)} ${round(y)}${`l${step} ${depth}l${step} ${-depth}`.repeat(count)}`;
}

function hung({ x, y, width }: ContactLine, sign: string): string {
  const count = Math.max(2, Math.floor(width / 4.5));
  const step = width / count;
  return range(count)
    .map((i) => `M${round(x + (i + 0.5) * step)} ${round(y)}${sign}`)
    .join("");
}

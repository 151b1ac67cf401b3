import { round } from "../numbers.ts";
import type { MarkShape } from "../theme.ts";

/** Path of one mark about (x, y); `radius` is half its height. Marks of a column join into one path. */
export function markPath(shape: MarkShape, x: number, y: number, radius = 1.5): string {
  const r = round(radius);
  const at = (dx: number, dy: number) => `${round(x + dx * radius)} ${round(y + dy * radius)}`;
  switch (shape) {
    case "circle":
      return `M${at(-1, 0)}a${r} ${r} 0 1 0 ${round(2 * r)} 0a${r} ${r} 0 1 0 ${round(-2 * r)} 0z`;
    case "square":
      return `M${at(-0.9, -0.9)}L${at(0.9, -0.9)}L${at(0.9, 0.9)}L${at(-0.9, 0.9)}z`;
    case "diamond":
      return `M${at(0, -1.25)}L${at(1.25, 0)}L${at(0, 1.25)}L${at(-1.25, 0)}z`;
    case "triangle":
      return `M${at(0, -1.1)}L${at(1.15, 0.9)}L${at(-1.15, 0.9)}z`;
    case "inverted-triangle":
      return `M${at(0, 1.1)}L${at(1.15, -0.9)}L${at(-1.15, -0.9)}z`;
    case "plus":
      return `M${at(-0.35, -1.2)}H${round(x + 0.35 * radius)}V${round(y - 0.35 * radius)}H${round(x + 1.2 * radius)}V${round(y + 0.35 * radius)}H${round(x + 0.35 * radius)}V${round(y + 1.2 * radius)}H${round(x - 0.35 * radius)}V${round(y + 0.35 * radius)}H${round(x - 1.2 * radius)}V${round(y - 0.35 * radius)}H${round(x - 0.35 * radius)}z`;
    case "cross":
      return `M${at(-1, -1)}L${at(1, 1)}M${at(-1, 1)}L${at(1, -1)}M${at(-1, -1)}z`;
    case "bar":
      return `M${at(-1.3, -0.4)}L${at(1.3, -0.4)}L${at(1.3, 0.4)}L${at(-1.3, 0.4)}z`;
    default:
      return shape satisfies never;
  }
}

/** A rectangle as part of a path. */
export function boxPath(x: number, y: number, width: number, height: number): string {
  return `M${round(x)} ${round(y)}h${round(width)}v${round(height)}h${round(-width)}z`;
}

/** An arrow of `length` points from (x, y) to the left (negative) or right, for a value known only to one side. */
export function arrowPath(x: number, y: number, length: number): string {
  const head = Math.sign(length) * -1.6;
  const tip = round(x + length);
  return `M${round(x)} ${round(y)}H${tip}M${round(x + length + head)} ${round(y - 1.4)}L${tip} ${round(y)}L${round(x + length + head)} ${round(y + 1.4)}`;
}

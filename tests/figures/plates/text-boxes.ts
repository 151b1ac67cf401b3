import type { FaceId } from "../../../src/figures/faces.ts";
import { textWidth } from "../../../src/figures/text.ts";

export type Point = readonly [x: number, y: number];

/** A line of text on a plate: its words, and the corners of the box they fill. */
export interface TextBox {
  readonly text: string;
  readonly corners: readonly Point[];
}

const ASCENT = 0.74;
const DESCENT = 0.2;
const SLACK = 0.25;

/** Every line of text of an SVG, placed through the translations around it. */
export function textBoxes(svg: string): readonly TextBox[] {
  const boxes: TextBox[] = [];
  const shifts: Point[] = [[0, 0]];
  for (const [, close, name, attributes, isEmpty, content] of svg.matchAll(
    /<(\/?)(g|text)\b([^>]*?)(\/?)>([^<]*)/g,
  )) {
    if (name === "g" && close === "/") shifts.pop();
    else if (name === "g" && isEmpty === "") shifts.push(shifted(shifts.at(-1) ?? [0, 0], attributes ?? ""));
    else if (name === "text" && close === "")
      boxes.push(textBox(attributes ?? "", decoded(content ?? ""), shifts.at(-1) ?? [0, 0]));
  }
  return boxes.filter(({ text }) => text !== "");
}

function shifted([x, y]: Point, attributes: string): Point {
  const [dx, dy] = translation(attributes);
  return [x + dx, y + dy];
}

function translation(attributes: string): Point {
  const match = /transform="translate\(([-\d.]+) ([-\d.]+)\)/.exec(attributes);
  return match ? [Number(match[1]), Number(match[2])] : [0, 0];
}

function attribute(attributes: string, name: string): string {
  return new RegExp(`(?:^| )${name}="([^"]*)"`).exec(attributes)?.[1] ?? "";
}

function textBox(attributes: string, text: string, shift: Point): TextBox {
  const size = Number(attribute(attributes, "font-size"));
  const width = textWidth(text, { face: faceOf(attributes), size });
  const anchor = attribute(attributes, "text-anchor");
  const left = anchor === "end" ? -width : anchor === "middle" ? -width / 2 : 0;
  const turn = (Number(/rotate\(([-\d.]+)\)/.exec(attributes)?.[1] ?? 0) * Math.PI) / 180;
  const [dx, dy] = translation(attributes);
  const [x, y] = [
    shift[0] + dx + Number(attribute(attributes, "x") || 0),
    shift[1] + dy + Number(attribute(attributes, "y") || 0),
  ];
  const box: readonly Point[] = [
    [left + SLACK, -ASCENT * size + SLACK],
    [left + width - SLACK, -ASCENT * size + SLACK],
    [left + width - SLACK, DESCENT * size - SLACK],
    [left + SLACK, DESCENT * size - SLACK],
  ];
  const corners = box.map(
    ([u, v]): Point => [
      x + u * Math.cos(turn) - v * Math.sin(turn),
      y + u * Math.sin(turn) + v * Math.cos(turn),
    ],
  );
  return { text, corners };
}

function faceOf(attributes: string): FaceId {
  if (attribute(attributes, "font-style") === "italic") return "serifItalic";
  return attribute(attributes, "font-weight") === "600" ? "sansSemibold" : "sans";
}

function decoded(text: string): string {
  return text
    .replaceAll("&lt;", "<")
    .replaceAll("&gt;", ">")
    .replaceAll("&quot;", '"')
    .replaceAll("&#x27;", "'")
    .replaceAll("&amp;", "&");
}

/** Pairs of texts that lie on each other. */
export function overlaps(boxes: readonly TextBox[]): readonly string[] {
  return boxes.flatMap((a, i) =>
    boxes.slice(i + 1).flatMap((b) => (touches(a.corners, b.corners) ? [`${a.text} | ${b.text}`] : [])),
  );
}

/** Separating axes: two rectangles touch unless some side of either parts them. */
function touches(a: readonly Point[], b: readonly Point[]): boolean {
  return [...normals(a), ...normals(b)].every((normal) => {
    const [u, v] = [shadow(a, normal), shadow(b, normal)];
    return u[0] < v[1] && v[0] < u[1];
  });
}

function normals([p, q, r]: readonly Point[]): readonly Point[] {
  if (p === undefined || q === undefined || r === undefined) return [];
  return [
    [q[1] - p[1], p[0] - q[0]],
    [r[1] - q[1], q[0] - r[0]],
  ];
}

function shadow(corners: readonly Point[], [nx, ny]: Point): readonly [number, number] {
  const along = corners.map(([x, y]) => x * nx + y * ny);
  return [Math.min(...along), Math.max(...along)];
}

/** Texts that reach over the edge of a plate. */
export function outside(boxes: readonly TextBox[], width: number, height: number): readonly string[] {
  const isInside = ([x, y]: Point) => x >= 0 && y >= 0 && x <= width && y <= height;
  return boxes.filter(({ corners }) => !corners.every(isInside)).map(({ text }) => text);
}

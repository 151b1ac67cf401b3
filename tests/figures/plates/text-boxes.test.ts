import { expect, test } from "vitest";
import { outside, overlaps, textBoxes } from "./text-boxes.ts";

const line = (attributes: string, text: string) =>
  `<text ${attributes} font-family="Lastbed Sans" font-size="8" fill="#000">${text}</text>`;

function slanted(x: number): string {
  return line(`transform="translate(${x} 10) rotate(56)"`, "a long slanted name");
}

test("texts that lie on each other are found, straight or turned or moved by their group", () => {
  const svg = `${line('x="10" y="20"', "first")}<g transform="translate(5 2)">${line('x="10" y="20"', "second")}</g>`;
  expect(overlaps(textBoxes(svg))).toEqual(["first | second"]);
  expect(overlaps(textBoxes(line('x="10" y="20"', "first") + line('x="10" y="40"', "second")))).toEqual([]);
  const turned = line('transform="translate(20 10) rotate(90)"', "turned");
  expect(overlaps(textBoxes(line('x="10" y="20"', "first") + turned))).toEqual(["first | turned"]);
});

test("slanted lines side by side are apart though their upright boxes overlap", () => {
  expect(overlaps(textBoxes(slanted(10) + slanted(22)))).toEqual([]);
  expect(overlaps(textBoxes(slanted(10) + slanted(13)))).toHaveLength(1);
});

test("a text over the edge is found, also where it ends at its anchor", () => {
  expect(
    outside(textBoxes(line('x="5" y="20" text-anchor="end"', "ends left of the frame")), 100, 100),
  ).toHaveLength(1);
  expect(outside(textBoxes(line('x="5" y="20"', "a &lt;b&gt;")), 100, 100)).toEqual([]);
});

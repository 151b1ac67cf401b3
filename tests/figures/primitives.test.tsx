import { describe, expect, test } from "vitest";
import { renderPlate } from "../../src/figures/render-plate.ts";
import { columnCases } from "./cases/columns.tsx";
import { markCases } from "./cases/marks.tsx";
import { sheetCases } from "./cases/sheet.tsx";
import { goldenText, inLines } from "./golden.ts";

const cases = Object.entries({ ...columnCases, ...markCases, ...sheetCases });

describe.each(cases)("%s", (name, plate) => {
  const svg = renderPlate(plate);

  test("is the committed figure", () => {
    expect(inLines(svg)).toBe(goldenText(name, inLines(svg)));
  });

  test("has numbers of three decimals at most, and no number that is none", () => {
    expect(svg.match(/\d\.\d{4,}/g) ?? []).toEqual([]);
    expect(svg.match(/NaN|Infinity|undefined|null/g) ?? []).toEqual([]);
  });

  test("has ids that are its own and used once, and every reference finds its id", () => {
    const ids = [...svg.matchAll(/ id="([^"]+)"/g)].map((match) => match[1] ?? "");
    const references = [...svg.matchAll(/url\(#([^)]+)\)/g)].map((match) => match[1] ?? "");
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids.filter((id) => id !== name && !id.startsWith(`${name}-`))).toEqual([]);
    expect(references.filter((id) => !ids.includes(id))).toEqual([]);
  });

  test("has no text under 7 points", () => {
    const sizes = [...svg.matchAll(/font-size="([^"]+)"/g)].map((match) => Number(match[1]));
    expect(sizes.filter((size) => !(size >= 7))).toEqual([]);
  });

  test("says in words what it is, at its physical size", () => {
    expect(svg).toMatch(/<svg xmlns="http:\/\/www.w3.org\/2000\/svg"[^>]* role="img"/);
    expect(svg).toMatch(/ width="[\d.]+mm" height="[\d.]+mm" viewBox="0 0 [\d.]+ [\d.]+"/);
    expect(svg).toMatch(/<title [^>]*>[^<]+<\/title><desc [^>]*>[^<]+<\/desc>/);
  });
});

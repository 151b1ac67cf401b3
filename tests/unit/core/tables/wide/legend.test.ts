import { describe, expect, it } from "vitest";
import { isNote, legendOf } from "../../../../../src/core/tables/wide/legend.ts";

describe("a legend in notes", () => {
  it.each([
    ["R = rare, C = common", { R: "found", C: "found" }],
    ["A: absent; P: present", { A: "not-found", P: "found" }],
    ["+ = 1-3 specimens", { "+": "found" }],
    ["N = not searched, W = reworked, D = doubtful", { N: "not-searched", W: "reworked", D: "doubtful" }],
    ["S = selten, H = häufig, F = fehlt", { S: "found", H: "found", F: "not-found" }],
    ["V = very rare (1)", { V: "found" }],
  ])("%s", (note, meanings) => {
    expect(Object.fromEntries(legendOf([note]))).toEqual(meanings);
  });

  it("leaves a code open whose words say nothing known", () => {
    expect(legendOf(["Q = quibble"]).size).toBe(0);
  });

  it("takes what is said first", () => {
    expect(legendOf(["A = abundant", "A = absent"]).get("A")).toBe("found");
  });

  it.each([
    [["R = rare", "C = common"], true],
    [["", "", ""], false],
    [["T1", "1.5", "R"], false],
    [["Collected along the beck in spring, washed through a sieve of one millimetre"], true],
    [["Tarn Cut"], false],
  ])("tells rows of words from rows of the table: %j", (cells, is) => {
    expect(isNote(cells)).toBe(is);
  });
});

import { describe, expect, it } from "vitest";
import { settleMainHorizon } from "../../../../src/core/markers/main-horizon.ts";
import type { MarkerHorizon } from "../../../../src/core/markers/result.ts";

const horizon = (section: string, name: string, part: Partial<MarkerHorizon> = {}): MarkerHorizon => ({
  section,
  name,
  horizon: name,
  kind: "impact",
  refersTo: "level",
  source: "given",
  evidence: "",
  positionM: 10,
  lowM: 9.9,
  highM: 10.1,
  level: 0.95,
  shape: "normal",
  sigmaM: 0.05,
  outcome: "closed",
  note: "",
  ...part,
});
const found = (section: string, name: string, fluence: number, positionM = 10) =>
  horizon(section, name, {
    source: "found",
    positionM,
    fluence: { value: fluence, low: fluence - 1, high: fluence + 1 },
  });
const plain = { same: [], weights: {}, picks: [] };
const same = [
  {
    name: "veyra-impact",
    horizons: [
      ["Orskel Ledge", "iridium-1"],
      ["Tamber Quarry", "iridium-2"],
    ] as [string, string][],
  },
];
const codes = (cautions: readonly { code: string }[]) => cautions.map((c) => c.code);

describe("the main horizon", () => {
  it("is the one given impact name, wherever it is placed", () => {
    const given = [
      horizon("Orskel Ledge", "veyra-impact"),
      horizon("Tamber Quarry", "ash-1", { kind: "ash" }),
    ];
    const { main } = settleMainHorizon(given, plain);
    expect(main).toMatchObject({ name: "veyra-impact", settledBy: "given-impact", isShared: true });
    expect([...main.bySection.keys()]).toEqual(["Orskel Ledge"]);
  });

  it("is ambiguous with two given impact names, which are listed", () => {
    const { main, cautions } = settleMainHorizon(
      [horizon("Orskel Ledge", "first"), horizon("Tamber Quarry", "second")],
      plain,
    );
    expect(main.settledBy).toBe("ambiguous");
    expect(main.bySection.size).toBe(0);
    expect(cautions[0]).toMatchObject({
      code: "main-horizon-ambiguous",
      numbers: { name1: "first", name2: "second" },
    });
  });

  it("is the declared name, even beside two given impacts", () => {
    const two = [horizon("Orskel Ledge", "first"), horizon("Tamber Quarry", "second")];
    const { main } = settleMainHorizon(two, { ...plain, horizon: "second" });
    expect(main).toMatchObject({ name: "second", settledBy: "setting" });
    expect([...main.bySection.keys()]).toEqual(["Tamber Quarry"]);
  });

  it("names a declared horizon that is nowhere", () => {
    const { cautions } = settleMainHorizon([horizon("Orskel Ledge", "first")], {
      ...plain,
      horizon: "third",
    });
    expect(cautions).toContainEqual({ code: "boundary-horizon-unknown", subject: "third" });
  });

  it("is, with none given, the found iridium of largest fluence in each section, not shared", () => {
    const all = [
      found("Orskel Ledge", "iridium-1", 5),
      found("Orskel Ledge", "iridium-2", 40),
      found("Tamber Quarry", "iridium-1", 30),
    ];
    const { main, cautions } = settleMainHorizon(all, plain);
    expect(main).toMatchObject({ settledBy: "found-iridium", isShared: false });
    expect(main.bySection.get("Orskel Ledge")?.name).toBe("iridium-2");
    expect(codes(cautions)).toEqual(["main-horizon-by-section"]);
  });

  it("is shared once the found horizons are declared one", () => {
    const all = [found("Orskel Ledge", "iridium-1", 40), found("Tamber Quarry", "iridium-2", 30)];
    const { main, horizons } = settleMainHorizon(all, { ...plain, same });
    expect(main).toMatchObject({ name: "veyra-impact", isShared: true });
    expect(horizons.map((h) => h.horizon)).toEqual(["veyra-impact", "veyra-impact"]);
  });

  it("is the given one where a section has both; a difference beyond two sigma is said", () => {
    const all = [
      horizon("Orskel Ledge", "veyra-impact"),
      found("Orskel Ledge", "iridium-1", 40, 10.3),
      found("Tamber Quarry", "iridium-2", 30),
    ];
    const { main, cautions } = settleMainHorizon(all, { ...plain, same });
    expect(main.bySection.get("Orskel Ledge")?.source).toBe("given");
    expect(main.bySection.get("Tamber Quarry")?.source).toBe("found");
    expect(codes(cautions)).toEqual(["given-found-differ"]);
    const near = all.map((h) => (h.positionM === 10.3 ? { ...h, positionM: 10.1 } : h));
    expect(settleMainHorizon(near, { ...plain, same }).cautions).toEqual([]);
  });

  it("tells of a declared member that was not found", () => {
    const { cautions } = settleMainHorizon([found("Orskel Ledge", "iridium-1", 40)], { ...plain, same });
    expect(cautions[0]).toMatchObject({
      code: "same-horizon-missing",
      section: "Tamber Quarry",
      subject: "iridium-2",
    });
  });
});

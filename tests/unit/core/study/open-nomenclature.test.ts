import { describe, expect, it } from "vitest";
import { parseName } from "../../../../src/core/study/open-nomenclature.ts";

describe("open nomenclature", () => {
  it.each([
    ["Velorites orskensis", "Velorites orskensis", undefined],
    ["  Velorites   orskensis ", "Velorites orskensis", undefined],
    ["Velorites cf. orskensis", "Velorites orskensis", "cf."],
    ["Velorites cf orskensis", "Velorites orskensis", "cf."],
    ["Velorites c.f. orskensis", "Velorites orskensis", "cf."],
    ["cf. Velorites orskensis", "Velorites orskensis", "cf."],
    ["Velorites aff. orskensis", "Velorites orskensis", "aff."],
    ["Velorites orskensis?", "Velorites orskensis", "?"],
    ["Velorites ?orskensis", "Velorites orskensis", "?"],
    ["Velorites ? orskensis", "Velorites orskensis", "?"],
    ["Velorites orskensis ?", "Velorites orskensis", "?"],
    ["Velorites? orskensis", "Velorites orskensis", "? genus"],
    ["?Velorites orskensis", "Velorites orskensis", "? genus"],
    ["Velorites ex gr. orskensis", "Velorites orskensis", "ex gr."],
    ["Velorites gr. orskensis", "Velorites orskensis", "ex gr."],
    ["Velorites sp.", "Velorites", "sp."],
    ["Velorites sp", "Velorites", "sp."],
    ["Velorites spp.", "Velorites", "spp."],
    ["Velorites sp. A", "Velorites sp. A", undefined],
    ["Velorites sp. 1", "Velorites sp. 1", undefined],
    ["Velorites sp. nov.", "Velorites", "sp. nov."],
    ["Velorites n. sp.", "Velorites", "sp. nov."],
    ["Velorites orskensis sp. nov.", "Velorites orskensis", "sp. nov."],
    ["Velorites indet.", "Velorites", "indet."],
    ["Velorites orskensis s.l.", "Velorites orskensis", "s.l."],
    ["Velorites orskensis s. s.", "Velorites orskensis", "s.s."],
    ["Velorites orskensis sensu lato", "Velorites orskensis", "s.l."],
    ['"Velorites" orskensis', '"Velorites" orskensis', undefined],
    ["Species A", "Species A", undefined],
    ["?", "?", undefined],
    ["cf.", "cf.", undefined],
  ])("parses %s", (text, name, qualifier) => {
    const parsed = parseName(text);
    expect([parsed.name, parsed.qualifier]).toEqual([name, qualifier]);
  });

  it("reads the qualifier column where the name carries no sign, with or without the epithet", () => {
    expect(parseName("Velorites orskensis", "cf.")).toMatchObject({
      name: "Velorites orskensis",
      qualifier: "cf.",
    });
    expect(parseName("Velorites", "aff. orskensis")).toMatchObject({
      name: "Velorites orskensis",
      qualifier: "aff.",
    });
    expect(parseName("Velorites orskensis", "?")).toMatchObject({
      name: "Velorites orskensis",
      qualifier: "?",
    });
    expect(parseName("Velorites", "sp.")).toMatchObject({ name: "Velorites", qualifier: "sp." });
    expect(parseName("Velorites aff. orskensis", "cf.")).toMatchObject({ qualifier: "aff." });
  });

  it("tells the rank", () => {
    expect(parseName("Velorites orskensis minor").rank).toBe("subspecies");
    expect(parseName("Velorites cf. orskensis").rank).toBe("species");
    expect(parseName("Veloritidae indet.").rank).toBe("above-species");
  });
});

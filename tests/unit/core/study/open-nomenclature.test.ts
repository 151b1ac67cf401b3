import { describe, expect, it } from "vitest";
import { parseName } from "../../../../src/core/study/open-nomenclature.ts";

describe("open nomenclature", () => {
  it.each([
    ["Velorites orskelensis", "Velorites orskelensis", undefined],
    ["  Velorites   orskelensis ", "Velorites orskelensis", undefined],
    ["Velorites cf. orskelensis", "Velorites orskelensis", "cf."],
    ["Velorites cf orskelensis", "Velorites orskelensis", "cf."],
    ["Velorites c.f. orskelensis", "Velorites orskelensis", "cf."],
    ["cf. Velorites orskelensis", "Velorites orskelensis", "cf."],
    ["Velorites aff. orskelensis", "Velorites orskelensis", "aff."],
    ["Velorites orskelensis?", "Velorites orskelensis", "?"],
    ["Velorites ?orskelensis", "Velorites orskelensis", "?"],
    ["Velorites ? orskelensis", "Velorites orskelensis", "?"],
    ["Velorites orskelensis ?", "Velorites orskelensis", "?"],
    ["Velorites? orskelensis", "Velorites orskelensis", "? genus"],
    ["?Velorites orskelensis", "Velorites orskelensis", "? genus"],
    ["Velorites ex gr. orskelensis", "Velorites orskelensis", "ex gr."],
    ["Velorites gr. orskelensis", "Velorites orskelensis", "ex gr."],
    ["Velorites sp.", "Velorites", "sp."],
    ["Velorites sp", "Velorites", "sp."],
    ["Velorites spp.", "Velorites", "spp."],
    ["Velorites sp. A", "Velorites sp. A", undefined],
    ["Velorites sp. 1", "Velorites sp. 1", undefined],
    ["Velorites sp. nov.", "Velorites", "sp. nov."],
    ["Velorites n. sp.", "Velorites", "sp. nov."],
    ["Velorites orskelensis sp. nov.", "Velorites orskelensis", "sp. nov."],
    ["Velorites indet.", "Velorites", "indet."],
    ["Velorites orskelensis s.l.", "Velorites orskelensis", "s.l."],
    ["Velorites orskelensis s. s.", "Velorites orskelensis", "s.s."],
    ["Velorites orskelensis sensu lato", "Velorites orskelensis", "s.l."],
    ['"Velorites" orskelensis', '"Velorites" orskelensis', undefined],
    ["Species A", "Species A", undefined],
    ["?", "?", undefined],
    ["cf.", "cf.", undefined],
  ])("parses %s", (text, name, qualifier) => {
    const parsed = parseName(text);
    expect([parsed.name, parsed.qualifier]).toEqual([name, qualifier]);
  });

  it("reads the qualifier column where the name carries no sign, with or without the epithet", () => {
    expect(parseName("Velorites orskelensis", "cf.")).toMatchObject({
      name: "Velorites orskelensis",
      qualifier: "cf.",
    });
    expect(parseName("Velorites", "aff. orskelensis")).toMatchObject({
      name: "Velorites orskelensis",
      qualifier: "aff.",
    });
    expect(parseName("Velorites orskelensis", "?")).toMatchObject({
      name: "Velorites orskelensis",
      qualifier: "?",
    });
    expect(parseName("Velorites", "sp.")).toMatchObject({ name: "Velorites", qualifier: "sp." });
    expect(parseName("Velorites aff. orskelensis", "cf.")).toMatchObject({ qualifier: "aff." });
  });

  it("tells the rank", () => {
    expect(parseName("Velorites orskelensis minor").rank).toBe("subspecies");
    expect(parseName("Velorites cf. orskelensis").rank).toBe("species");
    expect(parseName("Veloritidae indet.").rank).toBe("above-species");
  });
});

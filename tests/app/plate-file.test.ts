import { readdir, readFile } from "node:fs/promises";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Analysis } from "../../src/core/analysis-result.ts";
import { fontFaceCss } from "../../src/figures/faces.ts";
import { fenceDiagram, markerPlate, rangeChart, renderPlate, timingPlate } from "../../src/figures/index.ts";
import { inlineRunner } from "../../src/run/inline.ts";
import { findBrowser } from "./find-browser.mjs";
import { EXAMPLE, finding, type OpenedPage, openPage } from "./opened-page.ts";

async function analysedExample(): Promise<Analysis> {
  const names = (await readdir(EXAMPLE.folder)).filter((file) => /\.(csv|json)$/.test(file)).toSorted();
  const files = await Promise.all(
    names.map(async (file) => [file, new Uint8Array(await readFile(join(EXAMPLE.folder, file)))] as const),
  );
  return inlineRunner.analyse({ name: EXAMPLE.name, files: new Map(files) });
}

async function carriedFaces(): Promise<string> {
  return fontFaceCss({
    sans: await base64Of("lastbed-sans-regular.ttf"),
    sansSemibold: await base64Of("lastbed-sans-semibold.ttf"),
    serifItalic: await base64Of("lastbed-serif-italic.ttf"),
  });
}

async function base64Of(file: string): Promise<string> {
  return (await readFile(new URL(`../../src/figures/fonts/${file}`, import.meta.url))).toString("base64");
}

describe.skipIf(findBrowser() === undefined)("the file a plate is saved as", () => {
  let opened: OpenedPage;
  let analysis: Analysis;
  beforeAll(async () => {
    // Wide enough for the whole range chart on one page.
    const viewport = { width: 1760, height: 900 };
    [opened, analysis] = await Promise.all([openPage({ viewport }), analysedExample()]);
    await finding(opened.page);
  }, 120_000);
  afterAll(() => opened?.close());

  it("is byte for byte what Node draws from the same study", async () => {
    const { page } = opened;
    const section = analysis.study.sections[0]?.name ?? "";
    const set = analysis.timing.sets.find((candidate) => candidate.section === section)?.set ?? "";
    const view = { vertical: "from-horizon", fontFaces: await carriedFaces() } as const;
    const drawings = {
      markers: markerPlate(analysis, { section, ...view }),
      fence: fenceDiagram(analysis, view),
      ranges: rangeChart(analysis, { section, ...view }),
      timing: timingPlate(analysis, { section, set, ...view }),
    };
    for (const [station, drawing] of Object.entries(drawings)) {
      await page.evaluate((station) => {
        location.hash = `#${station}`;
      }, station);
      await page.locator(`figure svg#${drawing.id}`).waitFor();
      const [download] = await Promise.all([
        page.waitForEvent("download"),
        page.getByRole("button", { name: "SVG" }).click(),
      ]);
      expect(download.suggestedFilename()).toBe(`${drawing.id}.svg`);
      const saved = await readFile(await download.path(), "utf8");
      expect(firstDifference(saved, renderPlate(drawing.element)), station).toBeUndefined();
    }
  });
});

/** Where two texts part, with what stands there: a file of a megabyte is no message. */
function firstDifference(page: string, node: string): { page: string; node: string } | undefined {
  if (page === node) return undefined;
  let at = 0;
  while (page[at] === node[at]) at++;
  const around = (text: string) => text.slice(Math.max(0, at - 120), at + 120);
  return { page: around(page), node: around(node) };
}

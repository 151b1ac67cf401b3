import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { finding, type OpenedPage, openPage } from "./opened-page.ts";

const STATIONS = ["tables", "markers", "fence", "ranges", "timing"];
const RULES = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

async function goTo(page: Page, station: string): Promise<void> {
  await page.evaluate((station) => {
    location.hash = `#${station}`;
  }, station);
  await page
    .locator(`nav[aria-label=Stations] a[aria-current]`, { hasText: new RegExp(station, "i") })
    .waitFor();
  await page.locator(station === "tables" ? "table[aria-rowcount]" : "figure svg[role=img]").waitFor();
}

/** The scan leaves the inside of the plate alone: it is one image, with a title and a description. */
async function violations(page: Page, rules?: readonly string[]): Promise<string[]> {
  const scan = new AxeBuilder({ page }).exclude("figure svg[role=img] > g");
  const { violations: found } = await (rules ? scan.withRules([...rules]) : scan.withTags(RULES)).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id} ${JSON.stringify(target)}: ${failureSummary}`),
  );
}

const hasBrowser = findBrowser() !== undefined;
let opened: OpenedPage;

beforeAll(async () => {
  if (!hasBrowser) return;
  opened = await openPage();
  await finding(opened.page);
}, 90_000);
afterAll(() => opened?.close());

describe.skipIf(!hasBrowser)("every station", () => {
  for (const theme of ["light", "dark"] as const) {
    for (const station of STATIONS) {
      it(`${station} has no accessibility violation in the ${theme} theme`, async () => {
        const { page } = opened;
        await page.setViewportSize({ width: 1440, height: 900 });
        await page.emulateMedia({ colorScheme: theme });
        await goTo(page, station);
        await page.waitForFunction(
          (scheme) => getComputedStyle(document.documentElement).colorScheme === scheme,
          theme,
        );
        // A theme changes colours and nothing else.
        expect(await violations(page, theme === "dark" ? ["color-contrast"] : undefined)).toEqual([]);
      });
    }
  }

  it("keeps the plate paper white in both themes", async () => {
    const { page } = opened;
    await goTo(page, "ranges");
    const paper = () =>
      page
        .locator("figure svg[role=img] > rect")
        .first()
        .evaluate((rect) => getComputedStyle(rect).fill);
    await page.emulateMedia({ colorScheme: "light" });
    const light = await paper();
    await page.emulateMedia({ colorScheme: "dark" });
    expect(await paper()).toBe(light);
  });

  it("has no violation in the Go to list", async () => {
    const { page } = opened;
    await page.keyboard.press("Control+k");
    await page.getByRole("dialog", { name: "Go to" }).waitFor();
    expect(await violations(page)).toEqual([]);
    await page.keyboard.press("Escape");
  });
});

describe.skipIf(!hasBrowser)("the layout", () => {
  it("sets the margin beside the plate, not over it, and the page itself does not scroll", async () => {
    const { page } = opened;
    for (const width of [1440, 1100]) {
      await page.setViewportSize({ width, height: 900 });
      for (const station of STATIONS) {
        await goTo(page, station);
        const left = await page.locator("main > section").boundingBox();
        const margin = await page.locator("aside").boundingBox();
        if (left === null || margin === null) throw new Error("plate or margin is not in view");
        expect(margin.x, `${station} at ${width}`).toBeGreaterThanOrEqual(left.x + left.width - 0.5);
        expect(margin.width).toBeGreaterThanOrEqual(280);
        expect(margin.width).toBeLessThanOrEqual(420);
        expect(await overflow(page), `${station} at ${width}`).toBe(0);
        expect(await heightBeyond(page), `${station} at ${width}`).toBe(0);
      }
    }
  });

  it("clips no text in the header", async () => {
    const { page } = opened;
    for (const width of [1440, 1000, 390]) {
      await page.setViewportSize({ width, height: 900 });
      expect(await clipped(page, "header h1, header nav a, header button"), `${width}`).toEqual([]);
    }
  });

  it("gives every control 24 px", async () => {
    const { page } = opened;
    await page.setViewportSize({ width: 1440, height: 900 });
    for (const station of STATIONS) {
      await goTo(page, station);
      const small = await page.locator("a, button, select, summary, [role=slider]").evaluateAll((elements) =>
        elements
          .filter((element) => element.checkVisibility())
          .map((element) => ({ text: element.textContent, box: element.getBoundingClientRect() }))
          .filter(({ box }) => box.height < 23.9 || box.width < 23.9)
          .map(({ text, box }) => `${text} ${box.width} x ${box.height}`),
      );
      expect(small, station).toEqual([]);
    }
  });

  it("fits a phone: nothing overflows, the margin lies beneath the plate", async () => {
    const { page } = opened;
    await page.setViewportSize({ width: 390, height: 844 });
    for (const station of STATIONS) {
      await goTo(page, station);
      expect(await overflow(page), station).toBe(0);
      const left = await page.locator("main > section").boundingBox();
      const margin = await page.locator("aside").boundingBox();
      if (left === null || margin === null) throw new Error("plate or margin is not in view");
      expect(margin.y, station).toBeGreaterThanOrEqual(left.y + left.height - 0.5);
    }
  });
});

const overflow = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);

/** On a wide page the plate and the margin scroll, not the page. */
const heightBeyond = (page: Page) =>
  page.evaluate(() => document.documentElement.scrollHeight - document.documentElement.clientHeight);

const clipped = (page: Page, selector: string) =>
  page
    .locator(selector)
    .evaluateAll((elements) =>
      elements
        .filter(
          (element) =>
            element.scrollWidth > element.clientWidth + 1 || element.scrollHeight > element.clientHeight + 1,
        )
        .map((element) => element.textContent ?? ""),
    );

import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { dropFiles, finding, type OpenedPage, openPage } from "./opened-page.ts";
import { smallStudy } from "./small-study.ts";

const horizon = (page: Page) => page.getByRole("slider", { name: "Place lorn-impact" });
const level = (page: Page) => page.getByRole("slider", { name: "One level asked about" });
const bar = (page: Page) => page.getByRole("region", { name: "Being tried" });
const heightOf = async (page: Page) => Number(await horizon(page).getAttribute("aria-valuenow"));
const isWorkedOut = (page: Page) =>
  bar(page).getByText("All of it is worked out.").waitFor({ timeout: 30_000 });
const openTable = async (page: Page, table: string) => {
  await page.evaluate((hash) => {
    location.hash = hash;
  }, `#tables?table=${table}`);
  await page.getByRole("grid", { name: new RegExp(`^${table}`) }).waitFor();
};
const openTiming = async (page: Page) => {
  await page.evaluate(() => {
    location.hash = "#timing";
  });
  await horizon(page).waitFor();
};

describe.skipIf(findBrowser() === undefined)("choices under the hand", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#timing" });
    await finding(opened.page);
    await dropFiles(opened.page, smallStudy);
    await opened.page.locator("header h1", { hasText: "Dropped tables" }).waitFor();
    await horizon(opened.page).waitFor();
  }, 90_000);
  afterAll(() => opened?.close());

  it("a horizon moves by key; numbers tell what they were, and Escape lets go", async () => {
    const { page } = opened;
    const before = await finding(page);
    await horizon(page).focus();
    for (let presses = 0; presses < 3; presses++) await page.keyboard.press("Shift+ArrowUp");
    expect(await heightOf(page)).toBeGreaterThan(10);
    await isWorkedOut(page);
    expect(await page.locator("aside dd", { hasText: /^was .*m$/ }).count()).toBeGreaterThan(0);
    await page.keyboard.press("Escape");
    await expect.poll(() => bar(page).count()).toBe(0);
    expect(await finding(page)).toBe(before);
    expect(await heightOf(page)).toBe(10);
  });

  it("a horizon moves with the pointer as far as the pointer does", async () => {
    const { page } = opened;
    const box = await horizon(page).boundingBox();
    if (box === null) throw new Error("no handle");
    expect(Math.min(box.width, box.height)).toBeGreaterThanOrEqual(24);
    const [x, y] = [box.x + 12, box.y + 12];
    await page.mouse.move(x, y);
    await page.mouse.down();
    await page.mouse.move(x, y - 15);
    await page.mouse.move(x, y - 30);
    await page.mouse.up();
    await expect.poll(async () => (await horizon(page).boundingBox())?.y).toBeCloseTo(box.y - 30, 0);
    expect(await heightOf(page)).toBeGreaterThan(10);
    await page.keyboard.press("Control+z");
    await expect.poll(() => heightOf(page)).toBe(10);
  });

  it("kept with a reason it is the study's, a row of choices, and undone at once", async () => {
    const { page } = opened;
    const field = page.getByLabel("lorn-impact, m", { exact: true });
    await field.fill("10.25");
    await bar(page).getByRole("button", { name: "Keep" }).click();
    expect(await bar(page).count(), "a reason is asked for").toBe(1);
    await bar(page).getByLabel("Reason").fill("the clay seam is here");
    await bar(page).getByRole("button", { name: "Keep" }).click();
    await expect.poll(() => bar(page).count()).toBe(0);
    await expect.poll(() => heightOf(page)).toBeCloseTo(10.25, 9);
    await openTable(page, "choices.csv");
    const row = page.getByRole("grid").locator("tr", { hasText: "the clay seam is here" });
    await row.waitFor();
    const cells = await row.locator("td").allTextContents();
    expect(cells).toContain("boundary.picks");
    expect(cells).toContain("yes");
    await openTiming(page);
    await expect.poll(() => heightOf(page)).toBeCloseTo(10.25, 9);
    await page.keyboard.press("Control+z");
    await expect.poll(() => heightOf(page), { timeout: 30_000 }).toBe(10);
  });

  it("a level is asked about by its field and keys, with its p", async () => {
    const { page } = opened;
    await page.getByRole("button", { name: "Ask about one level" }).click();
    await page.getByLabel("One level, m", { exact: true }).fill("9.4");
    await expect.poll(() => level(page).getAttribute("aria-valuetext")).toMatch(/^9\.40/);
    const words = page.locator("figure output").last();
    await expect.poll(() => words.textContent()).toMatch(/−0\.60.m from lorn-impact: all at this level, p/);
    await level(page).focus();
    await page.keyboard.press("Shift+ArrowDown");
    await page.keyboard.press("Shift+ArrowDown");
    await page.keyboard.press("Shift+ArrowDown");
    await expect.poll(() => words.textContent()).toMatch(/last finds lie above/);
    await page.keyboard.press("Escape");
    await expect.poll(() => level(page).count()).toBe(0);
  });

  it("a chip opens its setting; one that cannot be is refused in words", async () => {
    const { page } = opened;
    await page.getByRole("button", { name: /^n ≥ 3/ }).click();
    const dialog = page.getByRole("dialog", { name: "Try taxa.minimumHorizons" });
    await dialog.getByLabel("Number").fill("-2");
    await page.keyboard.press("Enter");
    await dialog.getByText(/This cannot be/).waitFor();
    await dialog.getByLabel("Number").fill("18");
    await page.keyboard.press("Enter");
    await page.keyboard.press("Escape");
    await isWorkedOut(page);
    await page.getByRole("button", { name: /^n ≥ 18.*chosen/ }).waitFor();
    await bar(page).getByRole("button", { name: "Let go" }).click();
    await page.getByRole("button", { name: /^n ≥ 3$/ }).waitFor();
  });

  it("the sentence tells what it was; no accessibility violation while something is tried", async () => {
    const { page } = opened;
    const before = await finding(page);
    await page.getByLabel("Confidence of intervals", { exact: true }).fill("0.8");
    await expect.poll(() => page.getByTestId("was").textContent()).toBe(`Was: ${before}`);
    expect(await finding(page)).not.toBe(before);
    await page.getByRole("button", { name: "Ask about one level" }).click();
    await isWorkedOut(page);
    const { violations } = await new AxeBuilder({ page })
      .exclude("figure svg[role=img] > g")
      .withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"])
      .analyze();
    expect(
      violations.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id} ${JSON.stringify(target)}`)),
    ).toEqual([]);
    expect(opened.complaints).toEqual([]);
  });
});

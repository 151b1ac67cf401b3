import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { finding, type OpenedPage, openPage } from "./opened-page.ts";

const RULES = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
const WORK = { timeout: 60_000 };

const plate = (page: Page) => page.locator("figure svg[role=img]");
const titleOf = (page: Page) => plate(page).locator("title").first().textContent();

async function violations(page: Page): Promise<string[]> {
  const scan = new AxeBuilder({ page }).exclude("figure svg[role=img] > g").withTags(RULES);
  const { violations: found } = await scan.analyze();
  return found.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id} ${JSON.stringify(target)}`));
}

describe.skipIf(findBrowser() === undefined)("the range chart by keyboard", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#ranges?section=orskel-ledge" });
    await finding(opened.page);
  }, 90_000);
  afterAll(() => opened?.close());

  it("says how many intervals reach the main horizon, and how many end below it", async () => {
    expect(await finding(opened.page)).toMatch(
      /the intervals of \d+ of \d+ reach the main horizon.*\d+ ends? below it/,
    );
  });

  it("takes another method, and keeps it over a reload", async () => {
    const { page } = opened;
    const method = page.getByLabel("Method", { exact: true });
    await method.focus();
    await page.keyboard.type("uniform");
    await page.waitForURL(/method=uniform/);
    await expect.poll(() => plate(page).textContent(), WORK).toContain("ends by uniform");
    await page.reload();
    await finding(page);
    expect(await method.inputValue()).toBe("uniform");
    await expect.poll(() => plate(page).textContent(), WORK).toContain("ends by uniform");
  });

  it("turns pages instead of setting names smaller", async () => {
    const { page } = opened;
    await expect.poll(() => titleOf(page), WORK).toMatch(/page 1 of \d/);
    await page.keyboard.press("]");
    await expect.poll(() => titleOf(page), WORK).toMatch(/page 2 of \d/);
    const smallest = await plate(page)
      .locator("text")
      .evaluateAll((texts) => Math.min(...texts.map((text) => text.getBoundingClientRect().height)));
    expect(smallest).toBeGreaterThan(7);
    await page.keyboard.press("[");
    await expect.poll(() => titleOf(page), WORK).toMatch(/page 1 of \d/);
  });

  it("folds every group into a strip and unfolds them, at one key", async () => {
    const { page } = opened;
    const strips = () => plate(page).locator("[data-group]").count();
    await page.keyboard.press("f");
    await expect.poll(strips, WORK).toBe(4);
    const first = page.getByRole("button", { name: /planktic microfossils/ });
    await first.focus();
    await page.keyboard.press("Enter");
    await expect.poll(strips, WORK).toBe(3);
    await page.keyboard.press("f");
    await expect.poll(strips, WORK).toBe(0);
  });

  it("compares methods, those that hold under decline by shape and words", async () => {
    const { page } = opened;
    await page.keyboard.press("c");
    await page.waitForURL(/compare=methods/);
    await expect.poll(() => titleOf(page), WORK).toContain("ends by every method");
    expect(await plate(page).locator('[data-method="declining"]').count()).toBe(1);
    expect(await plate(page).textContent()).toContain("method holds where finds thin out");
    expect(await violations(page)).toEqual([]);
    await page.keyboard.press("c");
    await expect.poll(() => titleOf(page), WORK).toContain("range chart");
  });

  it("takes a taxon in focus, and tells why each number is as it is down to its rows", async () => {
    const { page } = opened;
    await page.locator("ul[aria-labelledby=marks-title] button").first().focus();
    await page.keyboard.press("t");
    await page.waitForURL(/taxon=/);
    const told = page.getByTestId("taxon");
    await told.waitFor(WORK);
    expect(await told.textContent()).toMatch(/was last found at .* shapes of recovery the bound moves over/);
    const why = page.locator("aside details", { hasText: "sampled" }).first();
    await why.locator("summary").focus();
    await page.keyboard.press("Enter");
    expect(await why.textContent()).toMatch(/Method.*It assumes.*Inputs.*Finds used \(\d+\)/);
    expect(await why.getByRole("button", { name: /occurrences\.csv, row \d+/ }).count()).toBeGreaterThan(2);
    expect(await violations(page)).toEqual([]);
  });

  it("sets a find aside with one key, keeps it drawn, and takes it back", async () => {
    const { page } = opened;
    const list = page.getByRole("list", { name: "Finds, from above downward" });
    const label = await list
      .getByRole("button", { name: /^Set aside/ })
      .first()
      .getAttribute("aria-label");
    const row = /occurrences\.csv row (\d+)/.exec(label ?? "")?.[1] ?? "";
    const before = await page.getByTestId("taxon").textContent();
    await list.getByRole("button").first().focus();
    await page.keyboard.press("x");
    const back = list.getByRole("button", { name: new RegExp(`^Take back .* row ${row}$`) });
    await back.waitFor(WORK);
    expect(await plate(page).locator(`[data-row="occurrences.csv:${row}"]`).count()).toBe(1);
    await expect.poll(() => page.getByTestId("taxon").textContent(), WORK).not.toBe(before);
    expect(await page.getByRole("heading", { name: "Set aside" }).count()).toBe(1);
    await back.focus();
    await page.keyboard.press("x");
    await expect.poll(() => page.getByTestId("taxon").textContent(), WORK).toBe(before);
  });

  it("complains of nothing", () => {
    expect(opened.complaints).toEqual([]);
  });
});

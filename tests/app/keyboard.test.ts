import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { finding, type OpenedPage, openPage } from "./opened-page.ts";

/** Presses Tab until the focus is on something of this name, as a person does. */
async function tabTo(page: Page, name: RegExp, most = 60): Promise<void> {
  for (let presses = 0; presses < most; presses++) {
    await page.keyboard.press("Tab");
    const text = await page.evaluate(() => {
      const element = document.activeElement;
      const label = element instanceof HTMLSelectElement ? element.labels[0]?.textContent : undefined;
      return label ?? element?.getAttribute("aria-label") ?? element?.textContent ?? "";
    });
    if (name.test(text)) return;
  }
  throw new Error(`tabTo: expected ${name} within ${most} presses of Tab`);
}

const focusIsVisible = (page: Page) =>
  page.evaluate(() => {
    const element = document.activeElement;
    if (element === null) return false;
    const { outlineStyle, outlineWidth } = getComputedStyle(element);
    return outlineStyle !== "none" && Number.parseFloat(outlineWidth) >= 2;
  });

describe.skipIf(findBrowser() === undefined)("the page by keyboard alone", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#ranges" });
    await finding(opened.page);
  }, 90_000);
  afterAll(() => opened?.close());

  it("walks the stations with arrows and enters one", async () => {
    const { page } = opened;
    await tabTo(page, /Tables, /);
    expect(await focusIsVisible(page)).toBe(true);
    for (let i = 0; i < 4; i++) await page.keyboard.press("ArrowRight");
    await page.keyboard.press("Enter");
    await page.waitForURL(/#timing/);
  });

  it("changes the section in the focus line", async () => {
    const { page } = opened;
    const before = await finding(page);
    await tabTo(page, /^Section$/);
    await page.keyboard.press("ArrowDown");
    await page.waitForURL(/section=/);
    await expect.poll(() => finding(page)).not.toBe(before);
  });

  it("moves the reading line from the plate", async () => {
    const { page } = opened;
    await tabTo(page, /arrow keys move the reading line/);
    expect(await focusIsVisible(page)).toBe(true);
    await page.keyboard.press("ArrowUp");
    const slider = page.getByRole("slider", { name: "Reading line" });
    const at = async () => Number(await slider.getAttribute("aria-valuenow"));
    const start = await at();
    await page.keyboard.press("ArrowUp");
    const small = (await at()) - start;
    await page.keyboard.press("Shift+ArrowUp");
    const large = (await at()) - start - small;
    expect(small).toBeGreaterThan(0);
    expect(large).toBeGreaterThan(5 * small);
  });

  it("reaches a taxon and opens its rows", async () => {
    const { page } = opened;
    await tabTo(page, /open its rows$/);
    await page.keyboard.press("End");
    await page.keyboard.press("Home");
    const name = await page.evaluate(() => document.activeElement?.firstChild?.textContent ?? "");
    await page.keyboard.press("Enter");
    await page.waitForURL(/#tables/);
    await page
      .getByRole("region", { name: /^Table / })
      .getByText(name)
      .first()
      .waitFor();
  });

  it("goes anywhere from one list", async () => {
    const { page } = opened;
    await page.keyboard.press("Control+k");
    await page.getByRole("dialog", { name: "Go to" }).waitFor();
    await page.keyboard.type("fence");
    await page.keyboard.press("ArrowDown");
    await page.keyboard.press("Enter");
    await page.waitForURL(/#fence/);
    await page.getByRole("dialog", { name: "Go to" }).waitFor({ state: "detached" });
  });

  it("closes and opens the margin with one key", async () => {
    const { page } = opened;
    await page.keyboard.press("m");
    await page.getByTestId("finding").waitFor({ state: "detached" });
    await page.keyboard.press("m");
    await page.getByTestId("finding").waitFor();
  });
});

import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { type OpenedPage, openPage } from "./opened-page.ts";

const wide = [
  "Section\tSample\tDepth\tVelorites alta\tVelorites parva\tQuenstra lenis",
  "Tarn Cut\tT1\t40\tx\tx\t0",
  "Tarn Cut\tT2\t30\tx\t0\tx",
  "Tarn Cut\tT3\t20\tx\t0\tx",
].join("\n");

const paste = (page: Page, text: string) =>
  page.evaluate((text) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData("text/plain", text);
    document.body.dispatchEvent(
      new ClipboardEvent("paste", { clipboardData, bubbles: true, cancelable: true }),
    );
  }, text);
const questions = (page: Page) => page.getByRole("list", { name: "Questions" });
const sentence = (page: Page) => page.getByTestId("finding");

describe.skipIf(findBrowser() === undefined)("a pasted wide sheet, by keyboard", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage({ hash: "#tables" });
    await paste(opened.page, wide);
  }, 90_000);
  afterAll(() => opened?.close());

  it("is taken as a new study, which asks for the unit of its depths", async () => {
    const { page } = opened;
    await page.getByRole("dialog", { name: "Paste a table" }).waitFor();
    await page.keyboard.press("Tab");
    await page.keyboard.press("Enter");
    await questions(page).waitFor({ timeout: 60_000 });
    expect(await questions(page).textContent()).toContain("Depth in pasted.tsv: in which unit?");
    expect(await sentence(page).textContent()).toContain("0 sections");
  }, 90_000);

  it("has no barrier for anyone", async () => {
    const { violations } = await new AxeBuilder({ page: opened.page }).include("main > section").analyze();
    expect(violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`)).toEqual([]);
  });

  it("is the right study once the unit is answered", async () => {
    const { page } = opened;
    await questions(page).getByLabel("Unit of Depth").focus();
    await page.keyboard.press("f");
    await expect.poll(() => sentence(page).textContent(), { timeout: 60_000 }).toContain("1 section");
    expect(await sentence(page).textContent()).toMatch(/3 samples and 6 finds of 3 taxa/);
    const summary = page.getByText("What each column was taken to be");
    expect(await page.locator("details[open] summary", { has: summary }).count()).toBe(0);
    await page.keyboard.press("Enter");
    expect(await page.getByLabel("Unit of Depth").inputValue()).toBe("ft");
  }, 90_000);

  it("complained of nothing", () => expect(opened.complaints).toEqual([]));
});

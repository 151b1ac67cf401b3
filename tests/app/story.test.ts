import { readFile } from "node:fs/promises";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { findBrowser } from "./find-browser.mjs";
import { dropFiles, EXAMPLE, finding, type OpenedPage, openPage } from "./opened-page.ts";
import { faultyStudy, hostileName, smallStudy } from "./small-study.ts";

describe.skipIf(findBrowser() === undefined)("a person lives through the page", () => {
  let opened: OpenedPage;
  beforeAll(async () => {
    opened = await openPage();
  }, 90_000);
  afterAll(() => opened?.close());

  it("opens with the example worked through", async () => {
    const { page } = opened;
    expect(await finding(page)).toMatch(/candidates|taxa|set/);
    expect(await page.locator("header h1").textContent()).toBe("Veyra Shelf");
    expect(await page.title()).toContain("Veyra Shelf");
    expect(await page.locator("figure svg[role=img]").count()).toBe(1);
    expect(await page.locator("footer").textContent()).toContain("nothing leaves this machine");
  });

  it("walks the stations, each with its sentence, its plate and its own address", async () => {
    const { page } = opened;
    for (const station of ["Markers", "Fence", "Ranges", "Timing"]) {
      await page.getByRole("navigation", { name: "Stations" }).getByText(station, { exact: true }).click();
      await page.waitForURL(new RegExp(`#${station.toLowerCase()}`));
      expect((await finding(page)).length).toBeGreaterThan(20);
      expect(await page.locator("figure svg[role=img]").count()).toBe(1);
    }
    await page.goBack();
    await page.waitForURL(/#ranges/);
    await page.goForward();
    await page.waitForURL(/#timing/);
  });

  it("says in words how far each station is", async () => {
    const links = await opened.page
      .getByRole("navigation", { name: "Stations" })
      .getByRole("link")
      .allTextContents();
    expect(links).toHaveLength(5);
    for (const link of links) expect(link).toMatch(/, (done|needs a look|not yet)$/);
  });

  it("moves one reading line across the plates, and tells what lies under it", async () => {
    const { page } = opened;
    const plate = page.locator("figure svg[role=img]");
    const box = await plate.boundingBox();
    if (box === null) throw new Error("the plate is not in view");
    await page.mouse.move(box.x + box.width / 3, box.y + box.height * 0.35);
    const slider = page.getByRole("slider", { name: "Reading line" });
    const height = Number(await slider.getAttribute("aria-valuenow"));
    await slider.focus();
    await page.keyboard.press("ArrowUp");
    expect(Number(await slider.getAttribute("aria-valuenow"))).toBeGreaterThan(height);
    const told = await page.getByRole("region", { name: "Under the reading line" }).textContent();
    expect(told).toMatch(/from the main horizon/);
    expect(told).toMatch(/sample/);
    const before = await slider.getAttribute("aria-valuetext");
    await page.keyboard.press("4");
    await page.waitForURL(/#ranges/);
    expect(await page.getByRole("slider", { name: "Reading line" }).getAttribute("aria-valuetext")).toBe(
      before,
    );
    await page.keyboard.press("5");
    await page.waitForURL(/#timing/);
  });

  it("changes the section, and every plate and sentence with it", async () => {
    const { page } = opened;
    const before = await finding(page);
    const plateBefore = await page.locator("figure svg[role=img]").getAttribute("id");
    await page.getByLabel("Section", { exact: true }).selectOption({ index: 1 });
    await page.waitForURL(/section=/);
    await expect.poll(() => finding(page)).not.toBe(before);
    const plateNow = () => page.locator("figure svg[role=img]").getAttribute("id");
    await expect.poll(plateNow, { timeout: 10_000 }).not.toBe(plateBefore);
    await page.getByLabel("Scale").selectOption("own");
    await page.waitForURL(/scale=own/);
    await page.keyboard.press("3");
    await page.waitForURL(/#fence.*scale=own/);
    await page.getByLabel("Scale").selectOption("from-horizon");
    await page.keyboard.press("5");
  });

  it("comes nearer and brings the whole section back", async () => {
    const { page } = opened;
    const plate = page.locator("figure svg[role=img]");
    await page.keyboard.press("5");
    await page.waitForURL(/#timing/);
    await plate.waitFor();
    const whole = await plate.innerHTML();
    await page.getByRole("button", { name: "Come nearer" }).click();
    await expect.poll(() => plate.innerHTML()).not.toBe(whole);
    await page.keyboard.press("0");
    await expect.poll(() => plate.innerHTML()).toBe(whole);
  });

  it("keeps the old result when work is cancelled", async () => {
    const { page } = opened;
    const before = await finding(page);
    await page.getByRole("button", { name: "Open…" }).click();
    await page.getByRole("menuitem", { name: "The study beside this page" }).click();
    await page.getByRole("button", { name: "Cancel" }).click();
    await page.getByText(/^Cancelled/).waitFor();
    expect(await page.getByText(/^Cancelled/).textContent()).toContain("Veyra Shelf is still shown");
    expect(await finding(page)).toBe(before);
  });

  it("says so when what is dropped is no study", async () => {
    const { page } = opened;
    const before = await finding(page);
    await dropFiles(page, { "letter.txt": "Dear all" });
    await page.getByRole("alert").getByText("is not a study").waitFor();
    expect(await finding(page)).toBe(before);
    await page.getByRole("button", { name: "Close", exact: true }).click();
  });

  it("loads a dropped study and shows hostile names as text", async () => {
    const { page } = opened;
    await dropFiles(page, smallStudy);
    await page.locator("header h1", { hasText: "Dropped tables" }).waitFor({ timeout: 60_000 });
    expect(await page.getByLabel("Section", { exact: true }).textContent()).toBe("Lorn Bank");
    await page.keyboard.press("1");
    await page.getByRole("navigation", { name: "Tables" }).getByText("occurrences").click();
    await page.getByLabel("Find").fill("img");
    await page
      .getByRole("region", { name: "Table occurrences.csv" })
      .getByText(hostileName)
      .first()
      .waitFor();
    expect(await page.getByText("4 of", { exact: false }).first().textContent()).toMatch(/^4 of \d+ rows$/);
    expect(await page.locator("img").count()).toBe(0);
    await page.keyboard.press("Escape");
    await page.getByRole("navigation", { name: "Stations" }).getByText("Ranges", { exact: true }).click();
    await page.getByRole("button", { name: /^__proto__ ?, open its rows$/ }).waitFor();
    expect(await page.locator("img").count()).toBe(0);
  });

  it("says at Fence what one section lacks, and where it would come from", async () => {
    const { page } = opened;
    await page.keyboard.press("3");
    await page.getByRole("heading", { name: "A fence needs two sections or more." }).waitFor();
    expect(await page.locator("main").textContent()).toContain("sections.csv");
    const fence = page.getByRole("navigation", { name: "Stations" }).getByRole("link", { name: /Fence/ });
    expect(await fence.textContent()).toMatch(/not yet$/);
  });

  it("marks a problem at its cell and lists it with how to mend it", async () => {
    const { page } = opened;
    await dropFiles(page, faultyStudy);
    await page.keyboard.press("1");
    const problem = page.locator("aside button", { hasText: "four and a half" });
    await problem.waitFor({ timeout: 60_000 });
    expect(await problem.textContent()).toMatch(/samples\.csv · row 10 · position/);
    await problem.click();
    const row = page.locator("tr[aria-current]");
    await row.getByText("four and a half").waitFor();
    expect(await row.locator("td", { hasText: "four and a half" }).textContent()).toContain(
      "error: expected",
    );
  });

  it("hands the plate over as one file that names no other", async () => {
    const { page } = opened;
    await page.keyboard.press("4");
    const [download] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("button", { name: "SVG" }).click(),
    ]);
    const svg = await readFile(await download.path(), "utf8");
    expect(svg).toMatch(/^<\?xml version="1.0" encoding="UTF-8"\?>\n<svg /);
    expect(svg.replaceAll('xmlns="http://www.w3.org/2000/svg"', "")).not.toMatch(/https?:\/\//);
  });

  it("loads a folder chosen from the disk", async () => {
    const { page } = opened;
    await page.getByTestId("study-folder").setInputFiles(EXAMPLE.folder);
    await page.locator("header h1", { hasText: "Veyra Shelf" }).waitFor({ timeout: 60_000 });
    const sections = page.getByLabel("Section", { exact: true }).locator("option");
    await expect.poll(() => sections.count(), { timeout: 60_000 }).toBe(4);
  }, 90_000);

  it("asked nobody but this machine, and complained of nothing", () => {
    expect([...opened.hosts]).toEqual(["127.0.0.1"]);
    expect(opened.complaints).toEqual([]);
  });
});

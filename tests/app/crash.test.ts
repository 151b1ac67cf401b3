import { mkdir, mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { type ProfiledBrowser, startProfile } from "./browser.ts";
import { findBrowser } from "./find-browser.mjs";
import { BUILT } from "./opened-page.ts";
import { type PageServer, servePage } from "./page-server.ts";
import { smallStudy } from "./small-study.ts";

/** Writes in the first row's second column. */
async function rename(page: Page, text: string): Promise<void> {
  await page.getByRole("grid").focus();
  for (const key of ["Control+Home", "ArrowRight"]) await page.keyboard.press(key);
  await page.keyboard.type(text);
  await page.keyboard.press("Enter");
}

const isKept = (page: Page) => page.getByText(/^Edits up to .* are kept in this browser only/).waitFor();

/** What lies in the page's database, as it stands. */
const kept = (page: Page) =>
  page.evaluate(
    () =>
      new Promise<{ files: string[][]; histories: string[] }>((resolve, reject) => {
        const opening = indexedDB.open("lastbed");
        opening.addEventListener("error", () => reject(opening.error));
        opening.onsuccess = () => {
          const reading = opening.result.transaction(["files", "histories"]);
          const files = reading.objectStore("files").getAll();
          const histories = reading.objectStore("histories").getAll();
          reading.oncomplete = () => {
            opening.result.close();
            resolve({
              files: files.result.map(({ key, files }) => [key, ...files.keys()]),
              histories: histories.result.map(({ key }) => key),
            });
          };
        };
      }),
  );

describe.skipIf(findBrowser() === undefined)("a browser that is killed while it writes", () => {
  let folder = "";
  let server: PageServer;
  let running: ProfiledBrowser | undefined;
  const profile = () => join(folder, "profile");

  beforeEach(async () => {
    folder = await mkdtemp(join(tmpdir(), "lastbed-crash-"));
    await mkdir(join(folder, "study"));
    for (const [name, text] of Object.entries(smallStudy)) await writeFile(join(folder, "study", name), text);
    server = await servePage(BUILT, { name: "Lorn Bank", folder: join(folder, "study") });
  });
  afterEach(async () => {
    await running?.kill();
    await server.close();
    await rm(folder, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 });
  });

  const start = async (): Promise<Page> => {
    running = await startProfile(profile());
    const page = await running.context.newPage();
    await page.goto(`${server.address}#tables?table=samples.csv`);
    await page.getByRole("grid").getByText("LB-2", { exact: true }).waitFor({ timeout: 60_000 });
    return page;
  };

  it("keeps the study whole, with the edits that were kept before", async () => {
    let page = await start();
    await rename(page, "LB-kept");
    await isKept(page);
    for (const pauseMs of [0, 20]) {
      await rename(page, `LB-lost-${pauseMs}`);
      await page.waitForTimeout(pauseMs);
      await running?.kill();
      page = await start();
      const { files, histories } = await kept(page);
      expect(files.map(([, ...names]) => names.toSorted())).toEqual([Object.keys(smallStudy).toSorted()]);
      expect(files.map(([key]) => key)).toEqual(histories);
      expect(
        await page
          .getByRole("grid")
          .getByText(/^LB-(?:kept|lost-\d+)$/)
          .count(),
      ).toBe(1);
    }
  }, 240_000);

  it("keeps a study that it was writing for the first time either whole or not at all", async () => {
    for (const pauseMs of [0, 20]) {
      const page = await start();
      await rename(page, "LB-new");
      await page.waitForTimeout(pauseMs);
      await running?.kill();
      const again = await start();
      const { files, histories } = await kept(again);
      expect(files.map(([key]) => key)).toEqual(histories);
      for (const [, ...names] of files) expect(names.toSorted()).toEqual(Object.keys(smallStudy).toSorted());
      expect(
        await again
          .getByRole("grid")
          .getByText(/^LB-(?:1|new)$/)
          .count(),
      ).toBe(1);
      await running?.kill();
      await rm(profile(), { recursive: true, force: true, maxRetries: 5, retryDelay: 200 });
    }
  }, 240_000);
});

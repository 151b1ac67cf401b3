/* Makes the pictures of the page for the README from what `npm run build` built. */
import { spawn } from "node:child_process";
import { mkdir, writeFile } from "node:fs/promises";
import { dirname } from "node:path";
import { fileURLToPath } from "node:url";
import { chromium } from "playwright-core";
import { browserHint, findBrowser } from "./find-browser.mjs";
import { indexedPng } from "./indexed-png.mjs";

const at = (path) => fileURLToPath(new URL(`../../${path}`, import.meta.url));

const pictures = [
  { file: at("src/app/pictures/timing-station.png"), place: "#timing?section=orskel-ledge&set=open-shelf" },
];

/** The page's address, once it is served. */
async function addressOf(server) {
  let said = "";
  for await (const part of server.stdout) {
    said += part;
    const address = /http:\/\/127\.0\.0\.1:\d+\//.exec(said)?.[0];
    if (address !== undefined) return address;
  }
  throw new Error(`make-pictures: expected the page's address, got ${said}`);
}

async function take(address) {
  const executablePath = findBrowser();
  if (executablePath === undefined) throw new Error(browserHint);
  const browser = await chromium.launch({ executablePath, args: ["--no-sandbox", "--disable-gpu"] });
  try {
    const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, colorScheme: "light" });
    for (const { file, place } of pictures) {
      await page.goto(`${address}${place}`);
      await page.getByTestId("finding").waitFor({ timeout: 60_000 });
      await page.evaluate(() => document.fonts.ready);
      await mkdir(dirname(file), { recursive: true });
      await writeFile(file, indexedPng(await pixelsOf(page, await page.screenshot())));
    }
  } finally {
    await browser.close();
  }
}

/** The screenshot as the browser itself decodes it. */
async function pixelsOf(page, png) {
  const { width, height, text } = await page.evaluate(async (base64) => {
    const given = Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0));
    const picture = await createImageBitmap(new Blob([given]));
    const { width, height } = picture;
    const context = new OffscreenCanvas(width, height).getContext("2d");
    context.drawImage(picture, 0, 0);
    const bytes = context.getImageData(0, 0, width, height).data;
    let text = "";
    for (let i = 0; i < bytes.length; i += 8192) text += String.fromCharCode(...bytes.subarray(i, i + 8192));
    return { width, height, text: btoa(text) };
  }, png.toString("base64"));
  return { width, height, pixels: Buffer.from(text, "base64") };
}

const server = spawn(
  process.execPath,
  [at("dist/node/lastbed.js"), "open", at("datasets/veyra-shelf"), "--port", "4630"],
  { stdio: ["ignore", "pipe", "inherit"] },
);
try {
  await take(await addressOf(server));
} finally {
  server.kill();
}

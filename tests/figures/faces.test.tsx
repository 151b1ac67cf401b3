import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { FACE_IDS, FACES, fontFaceCss } from "../../src/figures/faces.ts";
import { Plate } from "../../src/figures/plate.tsx";
import { renderPlate } from "../../src/figures/render-plate.ts";

const bytesOf = (file: string) => readFileSync(new URL(`../../src/figures/fonts/${file}`, import.meta.url));

describe.each(FACE_IDS)("the face %s", (id) => {
  const bytes = bytesOf(FACES[id].file);

  test("is a committed TrueType file under 150 kB", () => {
    expect(bytes.readUInt32BE(0)).toBe(0x00010000);
    expect(bytes.length).toBeLessThan(150_000);
  });

  test("carries the family name that plates ask for", () => {
    const utf16 = Buffer.from(FACES[id].family, "utf16le").swap16();
    expect(bytes.includes(utf16)).toBe(true);
  });
});

test("a standalone file carries its faces in it, unescaped", () => {
  const css = fontFaceCss({ sans: "AAA+/=", sansSemibold: "BBB=", serifItalic: "CCC=" });
  const plate = (
    <Plate id="p" title="Title" description="Finding." width={10} height={10} fontFaces={css}>
      {null}
    </Plate>
  );
  expect(renderPlate(plate)).toContain(`<style>${css}</style>`);
  expect(css).toContain(
    "font-family:Lastbed Serif;font-weight:400;font-style:italic;src:url(data:font/ttf;base64,CCC=)",
  );
  expect(css.match(/@font-face/g)).toHaveLength(3);
});

test("a name that looks like markup is drawn as text", () => {
  const plate = (
    <Plate id="p" title="<img onerror=x>" description="&" width={10} height={10}>
      {null}
    </Plate>
  );
  expect(renderPlate(plate)).toContain("&lt;img onerror=x&gt;");
  expect(renderPlate(plate)).not.toContain("<img");
});

import { cp, readdir, readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import react from "@vitejs/plugin-react";
import type { Plugin } from "vite";
import { defineConfig } from "vitest/config";
import { kernelBytes } from "./src/kernels/compile.mjs";

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));

const EXAMPLE = "datasets/veyra-shelf";

const names = async () => (await readdir(at(EXAMPLE))).filter((name) => /\.(?:csv|json)$/.test(name));

const index = async () => JSON.stringify({ name: "Veyra Shelf", files: await names() });

/** The example study beside the page, listed in `study/index.json`; the command line lays the opened study over it. */
function exampleStudy(): Plugin {
  return {
    name: "example-study",
    configureServer(server) {
      server.middlewares.use("/study", (request, response, next) => {
        const name = decodeURIComponent((request.url ?? "").slice(1));
        const content = name === "index.json" ? index() : readFile(at(`${EXAMPLE}/${name}`));
        content.then((body) => response.end(body), next);
      });
    },
    async generateBundle() {
      this.emitFile({ type: "asset", fileName: "study/index.json", source: await index() });
      for (const name of await names())
        this.emitFile({
          type: "asset",
          fileName: `study/${name}`,
          source: await readFile(at(`${EXAMPLE}/${name}`)),
        });
    },
  };
}

/** The faces of the plates where the command line looks for them. */
function platesFaces(): Plugin {
  return {
    name: "plates-faces",
    closeBundle: () => cp(at("src/figures/fonts"), at("dist/figures/fonts"), { recursive: true }),
  };
}

const page = {
  root: at("src/app"),
  base: "./",
  plugins: [react(), exampleStudy(), kernelBytes()],
  worker: { format: "es" as const, plugins: () => [kernelBytes()] },
  build: { outDir: at("dist/page"), emptyOutDir: true, assetsInlineLimit: 0, chunkSizeWarningLimit: 2000 },
};

const node = {
  plugins: [react(), platesFaces(), kernelBytes()],
  ssr: { noExternal: true as const, target: "node" as const },
  build: {
    ssr: true,
    outDir: at("dist/node"),
    emptyOutDir: true,
    target: "node20",
    rollupOptions: {
      input: {
        lastbed: at("src/cli/lastbed.ts"),
        start: at("src/cli/start.ts"),
        thread: at("src/run/thread.ts"),
        library: at("src/report/index.ts"),
        figures: at("src/figures/index.ts"),
      },
      output: { entryFileNames: "[name].js", chunkFileNames: "[name]-[hash].js" },
    },
  },
};

const test = {
  plugins: [react(), kernelBytes()],
  test: {
    root: at("."),
    include: ["tests/**/*.test.{ts,tsx}"],
    testTimeout: process.env.CALIBRATION === "full" ? 3_600_000 : 120_000,
    hookTimeout: 120_000,
  },
};

export default defineConfig(({ mode }) => (mode === "page" ? page : mode === "node" ? node : test));

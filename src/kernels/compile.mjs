import { readFile } from "node:fs/promises";
import { fileURLToPath } from "node:url";
import { main } from "assemblyscript/asc";

const here = fileURLToPath(new URL(".", import.meta.url));

/** Memory below this belongs to the tables that the caller writes (core/numeric/kernels.ts). */
const MEMORY_BASE = 16384;

const options =
  `--outFile kernels.wasm -O3 --runtime stub --noAssert --enable simd --use abort= ` +
  `--memoryBase ${MEMORY_BASE}`;

/** The kernels as one WebAssembly module that imports nothing. */
async function compileKernels() {
  let module;
  let said = "";
  const { error } = await main(["index.ts", "--baseDir", here, ...options.split(" ")], {
    readFile: (name) => readFile(`${here}${name}`, "utf8").catch(() => null),
    writeFile: (_, contents) => {
      module = contents;
    },
    stderr: {
      write: (text) => {
        said += text;
      },
    },
  });
  if (error !== null || module === undefined) throw new Error(`kernels: ${error?.message ?? ""} ${said}`);
  return module;
}

const NAME = "virtual:kernels";

/** Vite plugin: `import { kernels } from "virtual:kernels"` gives the bytes of the compiled module. */
export function kernelBytes() {
  let compiled;
  return {
    name: "kernel-bytes",
    resolveId: (id) => (id === NAME ? `\0${NAME}` : undefined),
    async load(id) {
      if (id !== `\0${NAME}`) return undefined;
      compiled ??= compileKernels();
      return `export const kernels = new Uint8Array([${[...(await compiled)].join(",")}]);`;
    },
  };
}

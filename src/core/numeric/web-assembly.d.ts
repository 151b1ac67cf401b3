declare module "virtual:kernels" {
  /** The compiled kernels (src/kernels), made by the build. */
  export const kernels: Uint8Array;
}

declare namespace WebAssembly {
  const Module: new (bytes: Uint8Array) => object;
  /** `Exports`: what the module is known to export. */
  class Instance<Exports> {
    constructor(module: object, imports: object);
    readonly exports: Exports;
  }
  class Memory {
    constructor(descriptor: { readonly initial: number });
    readonly buffer: ArrayBuffer;
    grow(pages: number): number;
  }
}

/** What an archive may unpack to. */
export interface ArchiveLimits {
  readonly files: number;
  /** Bytes of all files together. */
  readonly bytes: number;
  /** Unpacked over packed size; looked at where a file unpacks to more than `freeBytes`. */
  readonly ratio: number;
  readonly freeBytes: number;
}

/** Far above any study (tables pack 5 to 50 times), far below what a small archive can be made to unpack to (1032 times). */
export const archiveLimits: ArchiveLimits = { files: 1000, bytes: 2 ** 29, ratio: 250, freeBytes: 2 ** 24 };

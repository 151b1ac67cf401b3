import { Inflate } from "fflate";
import { type ArchiveLimits, archiveLimits } from "./archive-limits.ts";
import { crc32 } from "./crc32.ts";

/** Why an archive, or one of its files, is not unpacked. */
export class ArchiveFault extends Error {
  readonly code: "archive-broken" | "archive-encrypted" | "archive-too-large";
  /** The file in the archive; blank where the whole is meant. */
  readonly entry: string;

  constructor(code: ArchiveFault["code"], what: string, entry = "") {
    super(what);
    this.code = code;
    this.entry = entry;
  }
}

interface Entry {
  readonly name: string;
  readonly method: number;
  readonly crc: number;
  readonly size: number;
  readonly packed: Uint8Array;
}

const broken = (what: string, entry?: string) => new ArchiveFault("archive-broken", what, entry);

/** True for bytes that begin as a zip archive does. */
export const isZip = (bytes: Uint8Array): boolean =>
  bytes[0] === 0x50 && bytes[1] === 0x4b && (bytes[2] === 3 || bytes[2] === 5) && bytes[3] === bytes[2] + 1;

/**
 * The files of a zip archive by path, folders and a system's hidden files left out. Throws an `ArchiveFault` where it is
 * broken, encrypted, or would unpack to more than the limits allow; never holds more than those.
 */
export function readZip(bytes: Uint8Array, limits: ArchiveLimits = archiveLimits): Map<string, Uint8Array> {
  const files = new Map<string, Uint8Array>();
  let left = limits.bytes;
  for (const entry of entriesOf(bytes, limits)) {
    const content = unpack(entry, { ...limits, bytes: left });
    left -= content.byteLength;
    if (files.has(entry.name)) throw broken("two files of one name", entry.name);
    files.set(entry.name, content);
  }
  return files;
}

const isHidden = (name: string): boolean =>
  name.endsWith("/") || /(?:^|\/)(?:__MACOSX\/|\.|Thumbs\.db$|desktop\.ini$)/i.test(name);

/** Reads the central directory (APPNOTE 6.3, sections 4.3.12 and 4.3.16). */
function* entriesOf(bytes: Uint8Array, limits: ArchiveLimits): Generator<Entry> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const end = endRecord(view);
  const count = view.getUint16(end + 10, true);
  if (count > limits.files) throw new ArchiveFault("archive-too-large", `${count} files`);
  let at = view.getUint32(end + 16, true);
  for (let index = 0; index < count; index++) {
    if (at + 46 > bytes.length || view.getUint32(at, true) !== 0x02014b50)
      throw broken("a list of files that breaks off");
    const lengths = [28, 30, 32].map((offset) => view.getUint16(at + offset, true));
    const flags = view.getUint16(at + 8, true);
    const name = nameOf(bytes.subarray(at + 46, at + 46 + lengths[0]));
    if (!isHidden(name)) {
      if (flags & 1) throw new ArchiveFault("archive-encrypted", "a password", name);
      yield entryAt(bytes, view, { at, name });
    }
    at += 46 + lengths[0] + lengths[1] + lengths[2];
  }
}

function endRecord(view: DataView): number {
  const first = Math.max(0, view.byteLength - 22 - 0xffff);
  for (let at = view.byteLength - 22; at >= first; at--)
    if (view.getUint32(at, true) === 0x06054b50) return at;
  throw broken("an archive that breaks off");
}

function entryAt(
  bytes: Uint8Array,
  view: DataView,
  { at, name }: { readonly at: number; readonly name: string },
): Entry {
  const packedSize = view.getUint32(at + 20, true);
  const local = view.getUint32(at + 42, true);
  if (local + 30 > bytes.length || view.getUint32(local, true) !== 0x04034b50)
    throw broken("a file that is not where the list says", name);
  const from = local + 30 + view.getUint16(local + 26, true) + view.getUint16(local + 28, true);
  if (from + packedSize > bytes.length) throw broken("a file that breaks off", name);
  return {
    name,
    method: view.getUint16(at + 10, true),
    crc: view.getUint32(at + 16, true),
    size: view.getUint32(at + 24, true),
    packed: bytes.subarray(from, from + packedSize),
  };
}

function nameOf(bytes: Uint8Array): string {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes).replaceAll("\\", "/");
  } catch {
    return Array.from(bytes, (byte) => String.fromCharCode(byte)).join("");
  }
}

function unpack(entry: Entry, limits: ArchiveLimits): Uint8Array {
  const { name, method, packed, size, crc } = entry;
  if (method !== 0 && method !== 8) throw broken("a packing method other than deflate", name);
  const content = method === 0 ? packed : inflate(entry, limits);
  if (content.byteLength > limits.bytes) throw tooLarge(name);
  if (content.byteLength !== size || crc32(content) !== crc) throw broken("a file that was damaged", name);
  return content;
}

const tooLarge = (name: string) =>
  new ArchiveFault("archive-too-large", "a file that unpacks to too much", name);

/** Packed bytes handed over at a time: at most 17 MB come out of one piece. */
const PIECE = 16384;

function inflate({ name, packed }: Entry, limits: ArchiveLimits): Uint8Array {
  const parts: Uint8Array[] = [];
  let size = 0;
  const most = Math.min(limits.bytes, Math.max(limits.freeBytes, limits.ratio * packed.byteLength));
  const stream = new Inflate((part) => {
    parts.push(part);
    size += part.byteLength;
  });
  try {
    for (let at = 0; at < packed.byteLength; at += PIECE) {
      stream.push(packed.subarray(at, at + PIECE), at + PIECE >= packed.byteLength);
      if (size > most) break;
    }
  } catch {
    throw broken("a file that was damaged", name);
  }
  if (size > most) throw tooLarge(name);
  const content = new Uint8Array(size);
  let at = 0;
  for (const part of parts) {
    content.set(part, at);
    at += part.byteLength;
  }
  return content;
}

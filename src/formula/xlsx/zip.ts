import { deflateRawSync, inflateRawSync } from "node:zlib";
import { unreadable } from "../failure.js";
import { crc32 } from "./crc.js";

/** One part of a zip file as its directory tells. */
interface Entry {
  readonly name: string;
  readonly flags: number;
  readonly method: number;
  readonly crc: number;
  readonly packedSize: number;
  readonly size: number;
  readonly localOffset: number;
  /** the whole of its entry in the directory */
  readonly record: Uint8Array;
}

const DIRECTORY_END = 0x06054b50;
const DIRECTORY_ENTRY = 0x02014b50;
const LOCAL_HEADER = 0x04034b50;
const FIRST_DAY = (1 << 5) | 1;
const MOST_PARTS = 20_000;
const MOST_BYTES_READ = 400 * 2 ** 20;
const DAMAGED = "The workbook is damaged or cut short: ";

/**
 * A zip file whose parts are read one by one and can be replaced. What is not replaced is copied as it stands, packed bytes
 * and all, so nothing in it can change.
 */
export class ZipFile {
  private readonly bytes: Uint8Array;
  private readonly entries: readonly Entry[];
  private readonly directoryOffset: number;
  private readonly tail: Uint8Array;
  private bytesRead = 0;

  /**
   * @param file  its bytes
   * @throws {FormulaLineError} for anything that is not a sound zip file of ordinary size
   */
  constructor(file: Uint8Array) {
    // slice() of a Buffer would share its bytes instead of copying them
    const bytes = new Uint8Array(file.buffer, file.byteOffset, file.byteLength);
    this.bytes = bytes;
    const view = viewOf(bytes);
    const end = directoryEnd(bytes, view);
    const count = view.getUint16(end + 10, true);
    this.directoryOffset = view.getUint32(end + 16, true);
    const size = view.getUint32(end + 12, true);
    if (count === 0xffff || this.directoryOffset === 0xffffffff) throw unreadable("The workbook is larger than 4 GB or has more than 65,534 parts, which the formula line does not read.");
    if (count > MOST_PARTS) throw unreadable(`The workbook has ${count} parts; at most ${MOST_PARTS} are read.`);
    if (this.directoryOffset + size > end) throw unreadable(`${DAMAGED}its directory lies outside the file.`);
    this.entries = directory(bytes, view, this.directoryOffset, end, count);
    this.tail = bytes.subarray(end);
  }

  /** Names of the parts in the order of the directory. */
  get names(): readonly string[] {
    return this.entries.map(({ name }) => name);
  }

  /**
   * Unpacks a part.
   *
   * @param name  compared without regard to case, as the format has it
   * @returns     undefined where there is none
   * @throws {FormulaLineError} for a part that is damaged, locked with a password or too large
   */
  read(name: string): Uint8Array | undefined {
    const entry = this.find(name);
    if (entry === undefined) return undefined;
    if ((entry.flags & 1) === 1) throw unreadable("The workbook's parts are locked with a password; save it without one.");
    this.bytesRead += entry.size;
    if (entry.size > MOST_BYTES_READ || this.bytesRead > MOST_BYTES_READ) throw unreadable(`The workbook unpacks to more than ${MOST_BYTES_READ / 2 ** 20} MB, which the formula line does not read.`);
    const start = this.dataStart(entry);
    const packed = this.bytes.subarray(start, start + entry.packedSize);
    if (packed.length < entry.packedSize) throw unreadable(`${DAMAGED}the part ${entry.name} is not complete.`);
    const unpacked = unpack(entry, packed);
    if (unpacked.length !== entry.size || crc32(unpacked) !== entry.crc) throw unreadable(`${DAMAGED}the part ${entry.name} does not match its check sum.`);
    return unpacked;
  }

  /**
   * The file with some parts replaced, and new ones behind all others.
   *
   * @param parts  name and content
   * @returns      a new file; every other part byte for byte as it was
   */
  withParts(parts: ReadonlyMap<string, Uint8Array>): Uint8Array {
    const replaced = new Map([...parts].map(([name, content]) => [this.find(name), content] as const));
    const added = [...parts].filter(([name]) => this.find(name) === undefined);
    const inFile = [...this.entries].sort((a, b) => a.localOffset - b.localOffset);
    const before = this.bytes.subarray(0, inFile[0]?.localOffset ?? 0);
    const pieces: Uint8Array[] = [before];
    const records = new Map<Entry, Uint8Array>();
    let offset = before.length;
    inFile.forEach((entry, k) => {
      const next = inFile[k + 1]?.localOffset ?? this.directoryOffset;
      if (next <= entry.localOffset) throw unreadable(`${DAMAGED}its parts lie over each other.`);
      const content = replaced.get(entry);
      const made = content === undefined ? { local: this.bytes.subarray(entry.localOffset, next), record: entry.record.slice() } : packed(entry, content, this.bytes);
      viewOf(made.record).setUint32(42, offset, true);
      records.set(entry, made.record);
      pieces.push(made.local);
      offset += made.local.length;
    });
    const addedRecords = added.map(([name, content]) => {
      const made = newPart(name, content, offset);
      pieces.push(made.local);
      offset += made.local.length;
      return made.record;
    });
    const directoryStart = offset;
    for (const record of [...this.entries.map((entry) => records.get(entry) as Uint8Array), ...addedRecords]) {
      pieces.push(record);
      offset += record.length;
    }
    const tail = this.tail.slice();
    const count = this.entries.length + added.length;
    viewOf(tail).setUint16(8, count, true);
    viewOf(tail).setUint16(10, count, true);
    viewOf(tail).setUint32(12, offset - directoryStart, true);
    viewOf(tail).setUint32(16, directoryStart, true);
    return joined([...pieces, tail]);
  }

  private find(name: string): Entry | undefined {
    const wanted = name.toLowerCase();
    return this.entries.find((entry) => entry.name === name) ?? this.entries.find((entry) => entry.name.toLowerCase() === wanted);
  }

  private dataStart({ localOffset, name }: Entry): number {
    const view = viewOf(this.bytes);
    if (localOffset + 30 > this.bytes.length || view.getUint32(localOffset, true) !== LOCAL_HEADER) throw unreadable(`${DAMAGED}the part ${name} is not where the directory says.`);
    return localOffset + 30 + view.getUint16(localOffset + 26, true) + view.getUint16(localOffset + 28, true);
  }
}

function directoryEnd(bytes: Uint8Array, view: DataView): number {
  const earliest = Math.max(0, bytes.length - 22 - 0xffff);
  for (let at = bytes.length - 22; at >= earliest; at--) if (view.getUint32(at, true) === DIRECTORY_END && at + 22 + view.getUint16(at + 20, true) === bytes.length) return at;
  throw unreadable(`${DAMAGED}the directory at its end is missing.`);
}

function directory(bytes: Uint8Array, view: DataView, start: number, end: number, count: number): Entry[] {
  const found: Entry[] = [];
  let at = start;
  for (let k = 0; k < count; k++) {
    if (at + 46 > end || view.getUint32(at, true) !== DIRECTORY_ENTRY) throw unreadable(`${DAMAGED}its directory cannot be read.`);
    const nameLength = view.getUint16(at + 28, true);
    const length = 46 + nameLength + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
    found.push({
      name: new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + nameLength)),
      flags: view.getUint16(at + 8, true),
      method: view.getUint16(at + 10, true),
      crc: view.getUint32(at + 16, true),
      packedSize: view.getUint32(at + 20, true),
      size: view.getUint32(at + 24, true),
      localOffset: view.getUint32(at + 42, true),
      record: bytes.subarray(at, at + length),
    });
    at += length;
  }
  return found;
}

function unpack(entry: Entry, packed: Uint8Array): Uint8Array {
  if (entry.method === 0) return packed;
  if (entry.method !== 8) throw unreadable(`The part ${entry.name} of the workbook is packed in a way that the format does not allow.`);
  try {
    return inflateRawSync(packed, { maxOutputLength: entry.size + 1 });
  } catch {
    throw unreadable(`${DAMAGED}the part ${entry.name} cannot be unpacked, or is larger than it says.`);
  }
}

/** A replaced part with its own header and its entry in the directory. */
function packed(entry: Entry, content: Uint8Array, original: Uint8Array): { local: Uint8Array; record: Uint8Array } {
  const data = deflateRawSync(content);
  const record = entry.record.slice();
  const inRecord = viewOf(record);
  // sizes stand in the header itself, not behind the data
  const flags = entry.flags & ~8;
  inRecord.setUint16(8, flags, true);
  inRecord.setUint16(10, 8, true);
  inRecord.setUint32(16, crc32(content), true);
  inRecord.setUint32(20, data.length, true);
  inRecord.setUint32(24, content.length, true);
  const nameLength = viewOf(original).getUint16(entry.localOffset + 26, true);
  const local = new Uint8Array(30 + nameLength + data.length);
  local.set(original.subarray(entry.localOffset, entry.localOffset + 30 + nameLength));
  const inLocal = viewOf(local);
  inLocal.setUint16(6, flags, true);
  inLocal.setUint16(8, 8, true);
  inLocal.setUint32(14, crc32(content), true);
  inLocal.setUint32(18, data.length, true);
  inLocal.setUint32(22, content.length, true);
  inLocal.setUint16(28, 0, true);
  local.set(data, 30 + nameLength);
  return { local, record };
}

/** A part that was not there, with the date that the format begins with, so that equal parts make equal files. */
function newPart(name: string, content: Uint8Array, offset: number): { local: Uint8Array; record: Uint8Array } {
  const data = deflateRawSync(content);
  const label = new TextEncoder().encode(name);
  const record = new Uint8Array(46 + label.length);
  const inRecord = viewOf(record);
  inRecord.setUint32(0, DIRECTORY_ENTRY, true);
  inRecord.setUint16(4, 20, true);
  inRecord.setUint16(6, 20, true);
  inRecord.setUint16(10, 8, true);
  inRecord.setUint16(14, FIRST_DAY, true);
  inRecord.setUint32(16, crc32(content), true);
  inRecord.setUint32(20, data.length, true);
  inRecord.setUint32(24, content.length, true);
  inRecord.setUint16(28, label.length, true);
  inRecord.setUint32(42, offset, true);
  record.set(label, 46);
  const local = new Uint8Array(30 + label.length + data.length);
  viewOf(local).setUint32(0, LOCAL_HEADER, true);
  // from the version needed to the length of the name both headers say the same
  local.set(record.subarray(6, 30), 4);
  local.set(label, 30);
  local.set(data, 30 + label.length);
  return { local, record };
}

function viewOf(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

function joined(pieces: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.length, 0));
  let at = 0;
  for (const piece of pieces) {
    whole.set(piece, at);
    at += piece.length;
  }
  return whole;
}

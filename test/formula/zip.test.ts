import { readFileSync } from "node:fs";
import JSZip from "jszip";
import { describe, expect, it } from "vitest";
import { FormulaLineError } from "../../src/formula/failure.js";
import { ZipFile } from "../../src/formula/xlsx/zip.js";
import { packed } from "./packed.js";

const file = readFileSync(new URL("fixtures/bid.xlsx", import.meta.url));
const text = (bytes: Uint8Array | undefined): string => Buffer.from(bytes!).toString("utf8");

describe("a zip file", () => {
  // The independent reader is jszip, on which exceljs stands.
  it("unpacks every part as an independent reader does", async () => {
    const zip = new ZipFile(file);
    const other = await JSZip.loadAsync(file);
    expect([...zip.names].sort()).toEqual(Object.keys(other.files).sort());
    for (const name of zip.names) expect(text(zip.read(name))).toBe(await other.file(name)!.async("string"));
  });

  it("replaces one part and copies the packed bytes of all others", async () => {
    const zip = new ZipFile(file);
    const made = Buffer.from(zip.withParts(new Map([["xl/sharedStrings.xml", Buffer.from("<sst/>")]])));
    const again = new ZipFile(made);
    expect(again.names).toEqual(zip.names);
    const other = await JSZip.loadAsync(made);
    for (const name of zip.names) expect(await other.file(name)!.async("string")).toBe(name === "xl/sharedStrings.xml" ? "<sst/>" : text(zip.read(name)));
    // the packed bytes of a part that was not touched stand in the new file as they stood in the old one
    const start = file.indexOf("xl/styles.xml") + "xl/styles.xml".length;
    const piece = file.subarray(start, start + 1000);
    expect(made.includes(piece)).toBe(true);
  });

  it("is the same file, byte for byte, where nothing is replaced", () => {
    expect(Buffer.from(new ZipFile(file).withParts(new Map())).equals(file)).toBe(true);
  });

  it("keeps what stands before its first part", () => {
    // offsets count from the beginning of the file, so they are written anew here
    const inner = packed({ a: "1" });
    const shifted = Buffer.concat([Buffer.from("head"), inner]);
    const directory = inner.readUInt32LE(inner.length - 6) + 4;
    shifted.writeUInt32LE(directory, shifted.length - 6);
    shifted.writeUInt32LE(4, directory + 42);
    const made = Buffer.from(new ZipFile(shifted).withParts(new Map([["a", Buffer.from("2")]])));
    expect(made.subarray(0, 4).toString()).toBe("head");
    expect(text(new ZipFile(made).read("a"))).toBe("2");
  });
});

describe("a zip file that is not sound", () => {
  const refusal = (work: () => unknown): string => {
    try {
      work();
    } catch (reason) {
      if (reason instanceof FormulaLineError) return reason.message;
      throw reason;
    }
    throw new Error("nothing was refused");
  };

  it("is refused wherever it is cut off", () => {
    for (const length of [0, 1, 21, 22, 100, 4000, file.length - 30, file.length - 1]) {
      expect(refusal(() => {
        const zip = new ZipFile(file.subarray(0, length));
        for (const name of zip.names) zip.read(name);
      })).toMatch(/damaged or cut short/);
    }
  });

  it("is refused for a part that is larger than it says", () => {
    const zip = new ZipFile(packed({ bomb: Buffer.alloc(5_000_000) }, { bomb: { claimedSize: 1000 } }));
    expect(refusal(() => zip.read("bomb"))).toContain("larger than it says");
  });

  it("is refused for parts that say they are huge, without unpacking them", () => {
    const zip = new ZipFile(packed({ bomb: "small" }, { bomb: { claimedSize: 0x7fffffff } }));
    expect(refusal(() => zip.read("bomb"))).toContain("unpacks to more than 400 MB");
  });

  it("is refused for a sum of parts that is huge", () => {
    const names = ["a", "b", "c", "d", "e"];
    const zip = new ZipFile(packed(Object.fromEntries(names.map((name) => [name, "small"])), Object.fromEntries(names.map((name) => [name, { claimedSize: 100 * 2 ** 20 }]))));
    const messages = zip.names.map((name) => refusal(() => zip.read(name)));
    expect(messages.slice(0, 4).every((message) => message.includes("check sum"))).toBe(true);
    expect(messages[4]).toContain("unpacks to more than 400 MB");
  });

  it("is refused for a wrong check sum, a password and an unknown packing", () => {
    expect(refusal(() => new ZipFile(packed({ a: "1" }, { a: { crc: 1 } })).read("a"))).toContain("does not match its check sum");
    expect(refusal(() => new ZipFile(packed({ a: "1" }, { a: { flags: 1 } })).read("a"))).toContain("locked with a password");
    expect(refusal(() => new ZipFile(packed({ a: "1" }, { a: { method: 12 } })).read("a"))).toContain("packed in a way that the format does not allow");
  });

  it("is refused where its parts lie over each other", () => {
    const two = packed({ a: "1", b: "2" });
    const directory = two.readUInt32LE(two.length - 6);
    two.writeUInt32LE(0, directory + 47 + 42);
    expect(refusal(() => new ZipFile(two).withParts(new Map()))).toContain("lie over each other");
  });
});

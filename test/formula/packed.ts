import { deflateRawSync } from "node:zlib";

/** The check sum of a zip part, worked out bit by bit and on its own, so that the reader is not tested against itself. */
function checkSum(bytes: Uint8Array): number {
  let sum = 0xffffffff;
  for (const byte of bytes) {
    sum ^= byte;
    for (let bit = 0; bit < 8; bit++) sum = sum & 1 ? (sum >>> 1) ^ 0xedb88320 : sum >>> 1;
  }
  return ~sum >>> 0;
}

/** How a test wants a part to be wrong. */
export interface Faults {
  readonly flags?: number;
  readonly claimedSize?: number;
  readonly crc?: number;
  readonly method?: number;
}

/**
 * Packs parts into a zip file, in their order.
 *
 * @param parts   name and content
 * @param faults  by name of the part
 */
export function packed(parts: Readonly<Record<string, string | Uint8Array>>, faults: Readonly<Record<string, Faults>> = {}): Buffer {
  const locals: Buffer[] = [];
  const records: Buffer[] = [];
  let offset = 0;
  for (const [name, content] of Object.entries(parts)) {
    const bytes = Buffer.from(content as string);
    const { flags = 0, claimedSize = bytes.length, crc = checkSum(bytes), method = 8 } = faults[name] ?? {};
    const data = method === 8 ? deflateRawSync(bytes) : bytes;
    const label = Buffer.from(name);
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(flags, 2);
    common.writeUInt16LE(method, 4);
    common.writeUInt32LE(crc, 10);
    common.writeUInt32LE(data.length, 14);
    common.writeUInt32LE(claimedSize, 18);
    common.writeUInt16LE(label.length, 22);
    const local = Buffer.concat([Buffer.from("PK\x03\x04"), common, label, data]);
    const rest = Buffer.alloc(14);
    rest.writeUInt32LE(offset, 10);
    records.push(Buffer.concat([Buffer.from("PK\x01\x02"), Buffer.from([20, 0]), common, rest, label]));
    locals.push(local);
    offset += local.length;
  }
  const directory = Buffer.concat(records);
  const end = Buffer.alloc(22);
  end.write("PK\x05\x06", "latin1");
  end.writeUInt16LE(records.length, 8);
  end.writeUInt16LE(records.length, 10);
  end.writeUInt32LE(directory.length, 12);
  end.writeUInt32LE(offset, 16);
  return Buffer.concat([...locals, directory, end]);
}

/** What a test workbook holds besides its sheets. */
export interface Extras {
  /** inside the workbook element, after the sheets */
  readonly names?: string;
  readonly properties?: string;
  readonly strings?: string;
  readonly metadata?: string;
  /** XML of the tables of the first sheet */
  readonly tables?: readonly string[];
  readonly parts?: Readonly<Record<string, string>>;
}

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";
const PACKAGE = "http://schemas.openxmlformats.org/package/2006";

/**
 * The parts of a workbook in the xlsx format, written by hand after ECMA-376.
 *
 * @param sheets  name and what stands within sheetData, or a whole worksheet part
 */
export function workbookParts(sheets: Readonly<Record<string, string>>, extras: Extras = {}): Record<string, string> {
  const names = Object.keys(sheets);
  const relation = (id: string, kind: string, target: string): string => `<Relationship Id="${id}" Type="${OFFICE}/${kind}" Target="${target}"/>`;
  const tables = extras.tables ?? [];
  return {
    "[Content_Types].xml": `${HEAD}<Types xmlns="${PACKAGE}/content-types"><Default Extension="xml" ContentType="application/xml"/></Types>`,
    "_rels/.rels": `${HEAD}<Relationships xmlns="${PACKAGE}/relationships">${relation("rId1", "officeDocument", "xl/workbook.xml")}</Relationships>`,
    "xl/workbook.xml": `${HEAD}<workbook xmlns="${MAIN}" xmlns:r="${OFFICE}">${extras.properties ?? ""}<sheets>${names.map((name, k) => `<sheet name="${name}" sheetId="${k + 1}" r:id="rId${k + 1}"/>`).join("")}</sheets>${extras.names === undefined ? "" : `<definedNames>${extras.names}</definedNames>`}</workbook>`,
    "xl/_rels/workbook.xml.rels": `${HEAD}<Relationships xmlns="${PACKAGE}/relationships">${names.map((_, k) => relation(`rId${k + 1}`, "worksheet", `worksheets/sheet${k + 1}.xml`)).join("")}${extras.strings === undefined ? "" : relation("s", "sharedStrings", "/xl/sharedStrings.xml")}${extras.metadata === undefined ? "" : relation("m", "sheetMetadata", "metadata.xml")}</Relationships>`,
    ...Object.fromEntries(names.map((name, k) => [`xl/worksheets/sheet${k + 1}.xml`, sheets[name]!.startsWith("<?xml") ? sheets[name]! : `${HEAD}<worksheet xmlns="${MAIN}" xmlns:r="${OFFICE}"><dimension ref="A1"/><sheetData>${sheets[name]!}</sheetData></worksheet>`])),
    ...(extras.strings === undefined ? {} : { "xl/sharedStrings.xml": `${HEAD}<sst xmlns="${MAIN}">${extras.strings}</sst>` }),
    ...(extras.metadata === undefined ? {} : { "xl/metadata.xml": `${HEAD}${extras.metadata}` }),
    ...(tables.length === 0 ? {} : { "xl/worksheets/_rels/sheet1.xml.rels": `${HEAD}<Relationships xmlns="${PACKAGE}/relationships">${tables.map((_, k) => relation(`t${k}`, "table", `../tables/table${k + 1}.xml`)).join("")}</Relationships>` }),
    ...Object.fromEntries(tables.map((xml, k) => [`xl/tables/table${k + 1}.xml`, HEAD + xml])),
    ...extras.parts,
  };
}

/** The metadata part with which a cell of cm="1" says that its array formula spills, as Microsoft's format notes give it. */
export const SPILLS = `<metadata xmlns="${MAIN}" xmlns:xda="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray"><metadataTypes count="1"><metadataType name="XLDAPR" minSupportedVersion="120000" copy="1" pasteAll="1" pasteValues="1" merge="1" splitFirst="1" rowColShift="1" clearFormats="1" clearComments="1" assign="1" coerce="1" cellMeta="1"/></metadataTypes><futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><xda:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata><cellMetadata count="1"><bk><rc t="1" v="0"/></bk></cellMetadata></metadata>`;

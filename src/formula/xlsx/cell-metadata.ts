const MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";

/** The number that a cell's attribute "cm" has where its array formula spills. */
export const SPILLING = 1;

/**
 * The part that gives that number its meaning: one kind of metadata, of which one block says that the array is dynamic.
 *
 * @source [MS-XLSX]: Excel (.xlsx) Extensions to the Office Open XML SpreadsheetML File Format, dynamic array properties
 */
export const CELL_METADATA = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<metadata xmlns="${MAIN}" xmlns:xda="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray"><metadataTypes count="1"><metadataType name="XLDAPR" minSupportedVersion="120000" copy="1" pasteAll="1" pasteValues="1" merge="1" splitFirst="1" rowColShift="1" clearFormats="1" clearComments="1" assign="1" coerce="1" cellMeta="1"/></metadataTypes><futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><xda:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata><cellMetadata count="${SPILLING}"><bk><rc t="1" v="0"/></bk></cellMetadata></metadata>`;

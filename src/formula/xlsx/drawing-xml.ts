import type { PlannedChart } from "../../host/workbook.js";
import { readReference } from "../addresses.js";
import { escaped } from "./xml.js";

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const DRAWING = "http://schemas.openxmlformats.org/drawingml/2006";
const OFFICE = "http://schemas.openxmlformats.org/officeDocument/2006/relationships";

/**
 * The part that says where a sheet's charts lie.
 *
 * @param relationOf  id of the relation to the part of a chart, by its number
 */
export function drawingXml(charts: readonly PlannedChart[], relationOf: (chart: number) => string): string {
  const anchors = charts.map(({ place, title, words }, k) => {
    const area = readReference(place.replaceAll("$", ""));
    if (area === undefined) throw new Error(`${place} is no place for a chart`);
    const corner = (name: string, column: number, row: number): string => `<xdr:${name}><xdr:col>${column}</xdr:col><xdr:colOff>0</xdr:colOff><xdr:row>${row}</xdr:row><xdr:rowOff>0</xdr:rowOff></xdr:${name}>`;
    return `<xdr:twoCellAnchor>${corner("from", area.left, area.top)}${corner("to", area.right + 1, area.bottom + 1)}<xdr:graphicFrame macro=""><xdr:nvGraphicFramePr><xdr:cNvPr id="${k + 2}" name="${escaped(title)}" descr="${escaped(words)}"/><xdr:cNvGraphicFramePr/></xdr:nvGraphicFramePr><xdr:xfrm><a:off x="0" y="0"/><a:ext cx="0" cy="0"/></xdr:xfrm><a:graphic><a:graphicData uri="${DRAWING}/chart"><c:chart xmlns:c="${DRAWING}/chart" r:id="${relationOf(k)}"/></a:graphicData></a:graphic></xdr:graphicFrame><xdr:clientData/></xdr:twoCellAnchor>`;
  });
  return `${HEAD}<xdr:wsDr xmlns:xdr="${DRAWING}/spreadsheetDrawing" xmlns:a="${DRAWING}/main" xmlns:r="${OFFICE}">${anchors.join("")}</xdr:wsDr>`;
}

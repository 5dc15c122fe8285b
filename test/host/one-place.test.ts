import { expect, it } from "vitest";
import { isOnePlace } from "../../src/host/one-place.js";

// Names as a workbook writes them; what joins areas is a comma outside brackets and quotation marks.
it.each([
  ["=Data!$A$1:$B$4", true],
  ["=Data!$A:$B", true],
  ["='a, b'!$A$1", true],
  ["='it''s, (odd'!$A$1:$B$2", true],
  ["=OFFSET(Data!$A$1,0,0,COUNTA(Data!$A:$A),4)", true],
  ['=INDIRECT("Data!A1,Data!B2")', true],
  ["=Data!$A$1:$A$2,Data!$D$5", false],
  ["='a'!$A$1,'b'!$A$1", false],
  ["=OFFSET(Data!$A$1,1,0),Data!$D$5", false],
  ["=#REF!", false],
  ["=Data!#REF!", false],
])("%s is one place: %s", (formula, isOne) => expect(isOnePlace(formula)).toBe(isOne));

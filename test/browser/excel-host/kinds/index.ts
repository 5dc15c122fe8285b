import type { Kind, Opened } from "../kind.js";
import type { KindName, Targets } from "../targets.js";
import { addInServiceKind, appRuntimeKind } from "./add-in-service-kind.js";
import { chartKind, chartsKind, seriesCollectionKind, seriesKind } from "./chart-kinds.js";
import { chartPartKinds } from "./chart-part-kinds.js";
import { customFunctionsKinds } from "./custom-functions-kinds.js";
import { dataValidationKind } from "./data-validation-kind.js";
import { nameKind, namesKind } from "./name-kinds.js";
import { formatProtectionKind, rangeBorderKind, rangeBordersKind, rangeFillKind, rangeFontKind, rangeFormatKind } from "./range-format-kinds.js";
import { rangeKind } from "./range-kind.js";
import { freezePanesKind, pageLayoutKind, worksheetProtectionKind } from "./sheet-part-kinds.js";
import { tableKind, tablesKind } from "./table-kinds.js";
import { applicationKind, rangeAreasKind, rangeCollectionKind, workbookKind, workbookProtectionKind } from "./workbook-kinds.js";
import { worksheetKind, worksheetsKind } from "./worksheet-kinds.js";

const KINDS: { readonly [K in KindName]: Kind<Targets[K]> } = {
  ...chartPartKinds,
  ...customFunctionsKinds,
  AddinInternalService: addInServiceKind,
  AppRuntimeService: appRuntimeKind,
  Application: applicationKind,
  Chart: chartKind,
  ChartCollection: chartsKind,
  ChartSeries: seriesKind,
  ChartSeriesCollection: seriesCollectionKind,
  DataValidation: dataValidationKind,
  FormatProtection: formatProtectionKind,
  NamedItem: nameKind,
  NamedItemCollection: namesKind,
  PageLayout: pageLayoutKind,
  Range: rangeKind,
  RangeAreas: rangeAreasKind,
  RangeBorder: rangeBorderKind,
  RangeBorderCollection: rangeBordersKind,
  RangeCollection: rangeCollectionKind,
  RangeFill: rangeFillKind,
  RangeFont: rangeFontKind,
  RangeFormat: rangeFormatKind,
  Table: tableKind,
  TableCollection: tablesKind,
  Workbook: workbookKind,
  WorkbookProtection: workbookProtectionKind,
  Worksheet: worksheetKind,
  WorksheetCollection: worksheetsKind,
  WorksheetFreezePanes: freezePanesKind,
  WorksheetProtection: worksheetProtectionKind,
};

/** What an object can do. The one place where the type of its target is let go: opened() put the two together. */
export function kindOf({ kind }: Opened): Kind<unknown> {
  return KINDS[kind] as Kind<unknown>;
}

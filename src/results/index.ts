/** The one door of the results: tables with their labels and units, for cells, terminal and pane. */
export { checkTable } from "./check-table.js";
export { costTable } from "./cost-table.js";
export { costTableText } from "./cost-table-text.js";
export { groundKindTable } from "./ground-kind-table.js";
export { layoutTable } from "./layout-table.js";
export { lengthTable } from "./length-table.js";
export { methodTable } from "./method-table.js";
export { fewGrounds, simulationLengthTable, simulationTable, stampTable, type SimulationStamp } from "./simulation-table.js";
export { grouped } from "./plain-text.js";
export { simulationText } from "./simulation-text.js";
export { tableCells } from "./result-table.js";
export { PRODUCT_VERSION } from "./version.js";

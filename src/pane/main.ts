import { PRODUCT_VERSION } from "../results/version.js";
import type { FunctionMetadata } from "./model/help-entries.js";
import { mountPane } from "./mount-pane.js";

async function functionList(): Promise<{ functions: FunctionMetadata[] } | undefined> {
  try {
    const answer = await fetch("functions.json");
    return answer.ok ? ((await answer.json()) as { functions: FunctionMetadata[] }) : undefined;
  } catch {
    return undefined;
  }
}

async function start(): Promise<void> {
  const place = document.getElementById("pane");
  if (place === null) throw new Error("The page has no element named pane.");
  const functions = await functionList();
  // Until the workbook of Excel has its own form the page shows what needs no workbook: the help.
  mountPane(place, undefined, { ...(functions === undefined ? {} : { functions }), functionsVersion: PRODUCT_VERSION });
}

void start();

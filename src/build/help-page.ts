import type { FunctionMetadata, FunctionsJson } from "./metadata.js";

/**
 * The page that every function's help address leads to: one anchor a function.
 *
 * @param json  the functions as Excel reads them
 * @returns     a page that needs nothing but itself
 */
export function helpPage(json: FunctionsJson): string {
  const contents = json.functions.map(({ id }) => `<a href="#${escaped(id)}">${escaped(id)}</a>`).join(" ");
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width">
<title>Probeworth functions</title>
<style>
:root { color-scheme: light dark; font: 15px/1.5 system-ui, sans-serif; }
body { max-width: 46rem; margin: 0 auto; padding: 1rem; }
nav a { margin-inline-end: 0.6rem; }
code { font-size: 0.95em; overflow-wrap: anywhere; }
dt { font-weight: 600; }
dd { margin: 0 0 0.4rem 1.2rem; }
</style>
</head>
<body>
<h1>Probeworth functions</h1>
<p>Screening figures for planning and pricing an investigation, not a foundation design. The site block comes first in every
function that prices; after the last argument, pairs of label and value replace inputs of the block.</p>
<nav aria-label="Functions">${contents}</nav>
${json.functions.map(section).join("\n")}
</body>
</html>
`;
}

function section({ id, description, parameters }: FunctionMetadata): string {
  const names = parameters.map(({ name, optional, repeating }) => (repeating ? `${name}, ...` : optional ? `[${name}]` : name));
  const list = parameters.map(({ name, description: words }) => `<dt>${escaped(name)}</dt><dd>${escaped(words ?? "")}</dd>`).join("");
  return `<section id="${escaped(id)}"><h2>${escaped(id)}</h2><p>${escaped(description ?? "")}</p>
<p><code>=PROBE.${escaped(id)}(${escaped(names.join(", "))})</code></p><dl>${list}</dl></section>`;
}

function escaped(text: string): string {
  return text.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;").replace(/"/g, "&quot;");
}

import { TEXT_POLICY } from "./content-policy.js";

/**
 * A page of text that needs nothing but its style sheet, pages.css.
 *
 * @param title  in words
 * @param body   HTML, every text in it already escaped
 */
export function textPage(title: string, body: string): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${TEXT_POLICY}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escaped(title)}</title>
<link rel="icon" href="data:,">
<link rel="stylesheet" href="pages.css">
</head>
<body>
<main>
<h1>${escaped(title)}</h1>
${body}
</main>
</body>
</html>
`;
}

/** Text as it stands between tags or inside a quoted attribute. */
export function escaped(text: string): string {
  return text.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;").replace(/"/g, "&quot;");
}

/** A paragraph for each text. */
export function paragraphs(texts: readonly string[]): string {
  return texts.map((text) => `<p>${escaped(text)}</p>`).join("\n");
}

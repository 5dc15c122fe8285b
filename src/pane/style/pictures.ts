/** Drawings, their keys and signs. */
export const PICTURES = `
.probeworth .picture { min-height: 40px; }
.probeworth figure { margin: 0; }
.probeworth .pane-plot { display: block; font: 11px/1.2 var(--pane-font); max-width: none; overflow: visible; }
.probeworth .pane-plot text { font-variant-numeric: tabular-nums; }
.probeworth .axis-title { margin: 10px 0 2px; font-size: 12px; color: var(--pane-soft); }
.probeworth .axis-title strong { color: var(--pane-ink); font-weight: 600; }
.probeworth .key { display: flex; flex-wrap: wrap; gap: 2px 12px; margin: 4px 0 0; padding: 0; list-style: none; font-size: 12px; color: var(--pane-soft); }
.probeworth .key li { display: flex; align-items: center; gap: 5px; }
.probeworth .key-symbol { flex: none; }
.probeworth .sign-pile { fill: var(--pane-pile); }
.probeworth .sign-hole { fill: none; stroke: var(--pane-hole); stroke-width: 1.6; }
.probeworth .sign-dashed { fill: none; stroke: var(--pane-soft); stroke-dasharray: 4 2.5; }
.probeworth .sign-band { fill: var(--pane-band); }
.probeworth .sign-line { fill: none; stroke: var(--pane-ink); stroke-width: 1.4; }
.probeworth .sign-point { fill: var(--pane-surface); stroke: var(--pane-ink); stroke-width: 1.4; }
.probeworth .sign-cheapest { fill: var(--pane-accent); }
.probeworth .sign-set { fill: var(--pane-set); stroke: var(--pane-edge); stroke-width: .5; }
.probeworth .sign-box { fill: var(--pane-set); stroke: var(--pane-ink); stroke-width: 1; }
.probeworth .sign-middle { fill: none; stroke: var(--pane-ink); stroke-width: 2.5; }
.probeworth .sign-diamond { fill: var(--pane-ink); }
.probeworth .sign-shaft { fill: #ffffff; stroke: #101314; stroke-width: 1.25; }
.probeworth .sign-hole-line { fill: none; stroke: var(--pane-hole); stroke-width: 1.75; }
.probeworth .sign-hole-beside { stroke-dasharray: 3 3; }
.probeworth .swatch { stroke: var(--pane-edge); stroke-width: .75; }
.probeworth .patterns { position: absolute; width: 0; height: 0; }
.probeworth .hatch-paper { fill: var(--pane-surface); }
.probeworth .hatch-ink { fill: none; stroke: var(--pane-ink); stroke-width: 1.4; }
.probeworth .hatch-full { fill: var(--pane-ink); }
.probeworth .tool-mark-top { fill: #cdb98d; }
.probeworth .tool-mark-middle { fill: #a07a4d; }
.probeworth .tool-mark-low { fill: #64563f; }
.probeworth .tool-mark-holes { fill: none; stroke: #fffefb; stroke-width: 2; stroke-linecap: round; }
@media (forced-colors: active) {
  .probeworth .tool-mark-top, .probeworth .tool-mark-middle, .probeworth .tool-mark-low { fill: CanvasText; }
  .probeworth .tool-mark-holes { stroke: Canvas; }
  .probeworth .sign-set { stroke: CanvasText; stroke-width: 1; }
}
`;

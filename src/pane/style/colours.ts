/**
 * The pane's colours by purpose. Text reaches 4.5:1 on both papers, signs and borders of controls 3:1; the four parts
 * of a cost differ in lightness as well as in hue. In a contrast theme everything is the system's, parts are hatched.
 */
export const COLOURS = `
.probeworth {
  color-scheme: light;
  --pane-paper: #f6f4ee;
  --pane-surface: #fffefb;
  --pane-sunken: #efece3;
  --pane-ink: #23282b;
  --pane-soft: #5b6165;
  --pane-line: #e2ddd1;
  --pane-edge: #8b8578;
  --pane-accent: #0b5c66;
  --pane-accent-wash: #e2eeec;
  --pane-ok: #2c6b3c;
  --pane-refused: #a3271f;
  --pane-refused-wash: #fbeae5;
  --pane-focus: #0b5c66;
  --pane-pile: #4a4f52;
  --pane-hole: #0b6f7c;
  --pane-band: #d3d6d4;
  --pane-set: #e4efe9;
  --pane-part-edge: #fffefb;
  --pane-part-foundation: #c9c0ac;
  --pane-part-failure: #b5472f;
  --pane-part-delay: #e2a33b;
  --pane-part-investigation: #0b6f7c;
}
.probeworth[data-theme="dark"] {
  color-scheme: dark;
  --pane-paper: #191b1d;
  --pane-surface: #222527;
  --pane-sunken: #141618;
  --pane-ink: #ecebe6;
  --pane-soft: #b2b2ab;
  --pane-line: #373b3e;
  --pane-edge: #8d918f;
  --pane-accent: #79c7cf;
  --pane-accent-wash: #1f3437;
  --pane-ok: #8ccb97;
  --pane-refused: #ff9f92;
  --pane-refused-wash: #3a2421;
  --pane-focus: #a5dee4;
  --pane-pile: #c9c8c2;
  --pane-hole: #79c7cf;
  --pane-band: #43484b;
  --pane-set: #24373a;
  --pane-part-edge: #222527;
  --pane-part-foundation: #7d7767;
  --pane-part-failure: #df765b;
  --pane-part-delay: #f0c36b;
  --pane-part-investigation: #4fb2bd;
}
@media (forced-colors: active) {
  .probeworth,
  .probeworth[data-theme="dark"] {
    --pane-paper: Canvas;
    --pane-surface: Canvas;
    --pane-sunken: Canvas;
    --pane-ink: CanvasText;
    --pane-soft: CanvasText;
    --pane-line: color-mix(in srgb, CanvasText 35%, Canvas);
    --pane-edge: CanvasText;
    --pane-accent: Highlight;
    --pane-accent-wash: Canvas;
    --pane-ok: CanvasText;
    --pane-refused: CanvasText;
    --pane-refused-wash: Canvas;
    --pane-focus: Highlight;
    --pane-pile: CanvasText;
    --pane-hole: Highlight;
    --pane-band: color-mix(in srgb, CanvasText 35%, Canvas);
    --pane-set: color-mix(in srgb, CanvasText 14%, Canvas);
    --pane-part-edge: CanvasText;
    --pane-part-foundation: url(#probeworth-hatch-foundation);
    --pane-part-failure: url(#probeworth-hatch-failure);
    --pane-part-delay: url(#probeworth-hatch-delay);
    --pane-part-investigation: url(#probeworth-hatch-investigation);
  }
}
`;

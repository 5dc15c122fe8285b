// The controls that the pane uses, one by one: the whole set would be four times as large.
import "@fluentui/web-components/button.js";
import "@fluentui/web-components/progress-bar.js";
import "./slider.js";
import "@fluentui/web-components/tab.js";
import "@fluentui/web-components/tablist.js";

/** The part of the slider's own interface that the pane uses. */
export interface FluentSlider extends HTMLElement {
  value: string;
  max: string;
  valueTextFormatter: (value: string) => string;
}

/** The part of the tab list's own interface that the pane uses. */
export interface FluentTablist extends HTMLElement {
  activeid: string;
}

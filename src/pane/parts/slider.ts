import { Slider } from "@fluentui/web-components/slider/class.js";
import { styles } from "@fluentui/web-components/slider/styles.js";
import { html, ref } from "@microsoft/fast-element";

// The library's own template writes its position into style attributes, which a strict content policy refuses: the thumb
// would stand still. As a property the same position is allowed.
void Slider.define({
  name: "fluent-slider",
  styles,
  template: html<Slider>`
    <template @pointerdown="${(slider, { event }) => slider.handlePointerDown(event as PointerEvent)}" @keydown="${(slider, { event }) => slider.handleKeydown(event as KeyboardEvent)}">
      <div ${ref("track")} part="track-container" class="track" :style="${positionOf}"></div>
      <div ${ref("thumb")} part="thumb-container" class="thumb-container" :style="${positionOf}" @pointerdown="${(slider, { event }) => slider.handleThumbPointerDown(event as PointerEvent)}">
        <slot name="thumb"><div class="thumb"></div></slot>
      </div>
    </template>
  `,
});

function positionOf(slider: Slider): string {
  return slider.position;
}

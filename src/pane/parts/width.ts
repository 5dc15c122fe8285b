/**
 * Calls back when an element becomes visible or changes its width, once a frame at most.
 *
 * @param watched  the element
 * @param changed  what to do
 */
export function watchWidth(watched: HTMLElement, changed: () => void): void {
  let last = -1;
  new ResizeObserver(() => {
    const width = watched.clientWidth;
    if (width === last) return;
    last = width;
    // Drawing inside the observer's own turn would make it report a loop.
    requestAnimationFrame(changed);
  }).observe(watched);
}

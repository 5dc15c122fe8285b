const NARROWEST = 320;
const WIDEST = 640;
const STEP = 20;

/**
 * Lets the person hide the pane, and set its width by dragging its edge or with the arrow keys.
 *
 * @param pane    the docked element
 * @param edge    the separator on its left
 * @param button  hides and shows the pane
 */
export function paneDock(pane: HTMLElement, edge: HTMLElement, button: HTMLButtonElement): void {
  let width = pane.getBoundingClientRect().width;
  const widen = (to: number) => {
    width = Math.min(WIDEST, Math.max(NARROWEST, to));
    document.documentElement.style.setProperty("--pane-width", `${width}px`);
    edge.setAttribute("aria-valuenow", String(Math.round(width)));
  };
  edge.setAttribute("aria-valuemin", String(NARROWEST));
  edge.setAttribute("aria-valuemax", String(WIDEST));
  edge.setAttribute("aria-valuenow", String(Math.round(width)));
  edge.addEventListener("pointerdown", (start) => {
    edge.setPointerCapture(start.pointerId);
    const from = width;
    const drag = (move: PointerEvent) => widen(from + start.clientX - move.clientX);
    edge.addEventListener("pointermove", drag);
    edge.addEventListener("lostpointercapture", () => edge.removeEventListener("pointermove", drag), { once: true });
  });
  edge.addEventListener("keydown", (key) => {
    if (key.key === "ArrowLeft") widen(width + STEP);
    else if (key.key === "ArrowRight") widen(width - STEP);
    else return;
    key.preventDefault();
  });
  button.addEventListener("click", () => {
    const hidden = document.body.classList.toggle("without-pane");
    button.setAttribute("aria-pressed", String(!hidden));
  });
}

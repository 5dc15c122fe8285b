import type { Page } from "playwright-core";

/**
 * Texts in sight whose contrast with what lies behind them is below 4.5 to 1.
 *
 * @returns what each says, with its ratio
 * @source Web Content Accessibility Guidelines 2.2, success criterion 1.4.3 and the definitions of contrast ratio and relative luminance
 */
export async function weakTexts(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const canvas = document.createElement("canvas").getContext("2d", { willReadFrequently: true })!;
    const rgba = (colour: string): number[] => {
      canvas.clearRect(0, 0, 1, 1);
      canvas.fillStyle = colour;
      canvas.fillRect(0, 0, 1, 1);
      return [...canvas.getImageData(0, 0, 1, 1).data];
    };
    const luminance = (colour: number[]): number => {
      const [r, g, b] = colour.map((value) => (value / 255 <= 0.04045 ? value / 255 / 12.92 : ((value / 255 + 0.055) / 1.055) ** 2.4));
      return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
    };
    const behind = (element: Element | null): number[] => {
      for (let at = element; at !== null; at = at.parentElement) {
        const colour = rgba(getComputedStyle(at).backgroundColor);
        if (colour[3] === 255) return colour;
      }
      return [255, 255, 255, 255];
    };
    const weak: string[] = [];
    const walker = document.createTreeWalker(document.querySelector(".probeworth")!, NodeFilter.SHOW_TEXT);
    for (let node = walker.nextNode(); node !== null; node = walker.nextNode()) {
      const element = node.parentElement!;
      if (node.textContent!.trim() === "" || !element.checkVisibility() || element.closest(".unseen, [disabled], style, defs") !== null) continue;
      const style = getComputedStyle(element);
      const colour = rgba(element.closest("svg") === null ? style.color : style.fill);
      const [light, dark] = [luminance(colour), luminance(behind(element))].sort((a, b) => b - a);
      const ratio = (light! + 0.05) / (dark! + 0.05);
      if (ratio < 4.5) weak.push(`${node.textContent!.trim().slice(0, 40)}: ${ratio.toFixed(2)}`);
    }
    return weak;
  });
}

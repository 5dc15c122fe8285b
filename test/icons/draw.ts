import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { launchBrowser } from "../browser/harness/browser.js";

// Draws assets/icon-*.png anew from the two drawings: at 16 pixels the large one is a blur, so it has its own.
const assets = fileURLToPath(new URL("../../assets/", import.meta.url));
const browser = await launchBrowser();
try {
  const page = await browser.newPage();
  for (const size of [16, 32, 64, 80, 128]) {
    const drawing = readFileSync(`${assets}${size === 16 ? "icon-small" : "icon"}.svg`, "utf8");
    await page.setViewportSize({ width: size, height: size });
    await page.setContent(`<style>body{margin:0}svg{display:block;width:${size}px;height:${size}px}</style>${drawing}`);
    writeFileSync(`${assets}icon-${size}.png`, await page.screenshot({ omitBackground: true, type: "png" }));
  }
} finally {
  await browser.close();
}

import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { launchBrowser } from "../browser/harness/browser.js";

// Draws assets/*.png anew from the drawings beside them: at 16 and 20 pixels the tool's own mark is a blur, so it has a drawing for these.
const assets = fileURLToPath(new URL("../../assets/", import.meta.url));
const RIBBON = [16, 20, 24, 32, 40, 48, 64, 80];
const browser = await launchBrowser();
try {
  const page = await browser.newPage();
  for (const name of ["icon", "insert", "run", "repair"]) {
    for (const size of name === "icon" ? [...RIBBON, 128] : RIBBON) {
      const drawing = readFileSync(`${assets}${name === "icon" && size <= 20 ? "icon-small" : name}.svg`, "utf8");
      await page.setViewportSize({ width: size, height: size });
      await page.setContent(`<style>body{margin:0}svg{display:block;width:${size}px;height:${size}px}</style>${drawing}`);
      writeFileSync(`${assets}${name}-${size}.png`, await page.screenshot({ omitBackground: true, type: "png" }));
    }
  }
} finally {
  await browser.close();
}

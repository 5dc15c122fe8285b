import { chromium, type Browser } from "playwright-core";
import { unpackBrowser } from "./chromium.js";

/**
 * Starts the unpacked browser as a person's would run: web security, site isolation and separate processes stay on. Only
 * what makes it speak to the outside on its own account is off.
 */
export async function launchBrowser(): Promise<Browser> {
  const { executable, environment } = await unpackBrowser();
  return chromium.launch({
    executablePath: executable,
    env: { ...process.env, ...environment } as Record<string, string>,
    // a container's root may not make a sandbox; the pages opened here are our own
    chromiumSandbox: process.getuid?.() !== 0,
    args: [
      "--headless",
      "--disable-background-networking",
      "--disable-component-update",
      "--disable-domain-reliability",
      "--disable-sync",
      "--no-pings",
      "--font-render-hinting=none",
      "--use-gl=angle",
      "--use-angle=swiftshader",
      "--enable-unsafe-swiftshader",
    ],
  });
}

/** Headless Chromium, where this machine has one. */
import { existsSync } from "node:fs";
import { type Browser, chromium } from "playwright-core";

const places = ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];

/** Path of the browser; undefined where there is none. `CHROMIUM` names another. */
const path = [process.env["CHROMIUM"] ?? "", ...places].find((place) => place !== "" && existsSync(place));

/** Whether the page's tests are to be left out: no browser here. Under CI they run, and fail without one. */
export const noBrowser = path === undefined && process.env["CI"] === undefined;

if (noBrowser) {
  console.warn("Chromium is not installed, so the page's tests are not run: sudo apt-get install chromium");
}

const drawing = {
  software: ["--use-gl=angle", "--use-angle=swiftshader", "--enable-unsafe-swiftshader"],
  none: ["--disable-gpu", "--disable-software-rasterizer"],
} as const;

/** Draws 3-D in software or not at all, and talks to nobody but the page's own service. */
export function launch(webGl: keyof typeof drawing = "software"): Promise<Browser> {
  if (path === undefined) throw new Error("Chromium is not installed: apt-get install chromium");
  const args = [
    "--no-sandbox",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    ...drawing[webGl],
  ];
  return chromium.launch({ executablePath: path, args });
}

/** The sheet's colours as they stand now, for what is drawn rather than styled. */
import { useEffect, useState } from "preact/hooks";
import { type Palette, type Rgb, rgbOf } from "../../scene/paint.ts";

export interface Inks {
  readonly paper: string;
  readonly ink: string;
  readonly faint: string;
  readonly line: string;
  readonly font: string;
  readonly palette: Palette;
  readonly paperRgb: Rgb;
}

function inksNow(): Inks {
  const style = getComputedStyle(document.documentElement);
  const token = (name: string): string => style.getPropertyValue(name).trim();
  const rgb = (name: string): Rgb => rgbOf(sixDigits(token(name)));
  return {
    paper: token("--paper"),
    ink: token("--ink"),
    faint: token("--faint"),
    line: token("--line"),
    font: token("--font"),
    palette: { cold: rgb("--part"), guide: rgb("--guide"), hatch: rgb("--faint") },
    paperRgb: rgb("--paper"),
  };
}

/** The builder may have shortened "#aabbcc" to "#abc". */
const sixDigits = (hex: string): string =>
  hex.length === 4 ? `#${[...hex.slice(1)].map((digit) => digit + digit).join("")}` : hex;

/** The colours, and again when the machine changes between light and dark. */
export function useInks(): Inks {
  const [inks, setInks] = useState(inksNow);
  useEffect(() => {
    const dark = matchMedia("(prefers-color-scheme: dark)");
    const change = (): void => setInks(inksNow());
    dark.addEventListener("change", change);
    return () => dark.removeEventListener("change", change);
  }, []);
  return inks;
}

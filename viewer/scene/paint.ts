/** From cells to colours: what each cell is painted with, and the painting of a window of pixels. */
import { heatColour } from "../../api/format/colour.ts";
import { type HeatScale, position } from "../../api/format/heat-scale.ts";
import type { Heat } from "../heat.ts";
import { rasterColours, type Window } from "./raster.ts";

/** Red, green, blue, each 0 … 255. */
export type Rgb = readonly [number, number, number];

/** Colours of what carries no heat. */
export interface Palette {
  /** Bodies in which none arises. */
  readonly cold: Rgb;
  readonly guide: Rgb;
  /** The lines a guide is hatched with. */
  readonly hatch: Rgb;
}

/** What every cell is painted with. */
export interface Paint {
  /** A packed colour a cell, or `hatched`. */
  readonly colours: Uint32Array;
  /** Whether any cell is hatched. */
  readonly guides: boolean;
  readonly palette: Palette;
}

/** Stands for the guides' hatching, which is no single colour; the alpha of 0 makes it no colour of heat. */
const hatched = 1;

/** Colours that are told apart. */
const shades = 1024;

/** Four bytes red, green, blue, alpha as one number, in the machine's own order. */
export function packed([r, g, b]: Rgb, alpha = 255): number {
  const bytes = new Uint8ClampedArray([r, g, b, alpha]);
  return new Uint32Array(bytes.buffer)[0]!;
}

/** "#rrggbb" to its bytes. */
export function rgbOf(hex: string): Rgb {
  const at = (k: number): number => Number.parseInt(hex.slice(k, k + 2), 16);
  return [at(1), at(3), at(5)];
}

/** The colours of all cells; those of a body without any heat are cold, of guides hatched. `scale` null: nothing is heated. */
export function paintOf(
  { density, outline, outlines }: Heat,
  scale: HeatScale | null,
  palette: Palette,
): Paint {
  const ramp = Uint32Array.from({ length: shades }, (_, k) => packed(rgbOf(heatColour(k / (shades - 1)))));
  const cold = packed(palette.cold);
  const warm = new Uint8Array(outlines.length);
  for (let cell = 0; cell < density.length; cell++) if (density[cell]! > 0) warm[outline[cell]!] = 1;
  const guides = Uint8Array.from(outlines, ({ role }) => (role === "guide" ? 1 : 0));
  const colours = new Uint32Array(density.length);
  for (let cell = 0; cell < density.length; cell++) {
    const body = outline[cell]!;
    if (guides[body] === 1) colours[cell] = hatched;
    else if (scale === null || warm[body] === 0) colours[cell] = cold;
    else colours[cell] = ramp[Math.round(position(scale, density[cell]!) * (shades - 1))]!;
  }
  return { colours, guides: guides.includes(1), palette };
}

/** Distance between a guide's hatch lines and their width, in pixels of the screen. */
const hatching = { every: 7, line: 1.5 };

/**
 * Paints the cells of a window, packed colours row by row; where there is none stays `ground`. Hatch lines keep their place
 * on the section, so that they travel with it; `ratio` is the pixels of the window to one of the screen.
 */
export function paintPixels(
  corners: Heat["corners"],
  window: Window,
  paint: Paint,
  pixels: Uint32Array,
  { ground, ratio }: { readonly ground: number; readonly ratio: number },
): void {
  pixels.fill(ground);
  rasterColours(corners, window, paint.colours, pixels);
  if (paint.guides) hatchPixels(window, paint.palette, pixels, ratio);
}

function hatchPixels(
  { width, height, left, top, step }: Window,
  palette: Palette,
  pixels: Uint32Array,
  ratio: number,
): void {
  const guide = packed(palette.guide);
  const hatch = packed(palette.hatch);
  const every = Math.max(2, Math.round(hatching.every * ratio));
  const line = hatching.line * ratio;
  const start = Math.round(left / step) + Math.round(-top / step);
  for (let j = 0, at = 0; j < height; j++) {
    for (let i = 0; i < width; i++, at++) {
      if (pixels[at] !== hatched) continue;
      const along = (((i + j + start) % every) + every) % every;
      pixels[at] = along < line ? hatch : guide;
    }
  }
}

/** The plain colour of a cell where there is no room for hatching. */
export function plainColour({ colours, palette }: Paint, cell: number): number {
  const colour = colours[cell]!;
  return colour === hatched ? packed(palette.guide) : colour;
}

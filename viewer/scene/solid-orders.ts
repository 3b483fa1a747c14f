/** What the page and the thread that draws the solid say to each other. */
import type { Boundary } from "./boundary.ts";
import type { Camera } from "./orbit.ts";
import type { Shown } from "./shown.ts";

export type Order =
  | { readonly kind: "start"; readonly canvas: OffscreenCanvas }
  | { readonly kind: "show"; readonly shown: Shown; readonly ticket: number }
  /** px, and device pixels to one of them. */
  | { readonly kind: "resize"; readonly width: number; readonly height: number; readonly ratio: number }
  | { readonly kind: "draw"; readonly camera: Camera; readonly moving: boolean };

export type Report =
  /** Stands ready to be drawn; its surface is what the page reads from. */
  | { readonly kind: "built"; readonly surface: Boundary; readonly ticket: number }
  /** There is no WebGL, or no thread that may use it. */
  | { readonly kind: "missing" }
  | { readonly kind: "lost" };

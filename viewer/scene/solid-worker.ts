/**
 * The solid in a thread of its own: making the graphics context and the programs, and drawing without a graphics card, take
 * longer than a page may be held up. Orders come as messages; the newest picture asked for is the one drawn.
 */
import type { Camera } from "./orbit.ts";
import { Solid } from "./solid.ts";
import type { Order, Report } from "./solid-orders.ts";

let solid: Solid | null = null;
let next: { readonly camera: Camera; readonly moving: boolean } | null = null;

const tell = (report: Report): void => self.postMessage(report);

/** Draws at the screen's next turn, so that orders heaped up meanwhile cost one drawing. */
function drawSoon(camera: Camera, moving: boolean): void {
  const waiting = next !== null;
  next = { camera, moving };
  if (waiting) return;
  requestAnimationFrame(() => {
    const asked = next;
    next = null;
    if (asked !== null) solid?.draw(asked.camera, asked.moving);
  });
}

function start(canvas: OffscreenCanvas): void {
  canvas.addEventListener("webglcontextlost", () => tell({ kind: "lost" }));
  try {
    solid = new Solid(canvas);
  } catch {
    tell({ kind: "missing" });
  }
}

self.addEventListener("message", ({ data }: MessageEvent<Order>) => {
  switch (data.kind) {
    case "start":
      return start(data.canvas);
    case "show":
      return void solid?.show(data.shown).then((surface) => {
        if (surface !== null) tell({ kind: "built", surface, ticket: data.ticket });
      });
    case "resize":
      return solid?.resize(data.width, data.height, data.ratio);
    case "draw":
      return drawSoon(data.camera, data.moving);
  }
});

/** The page's end of the thread that draws the solid. */
import type { Boundary } from "./boundary.ts";
import type { Camera } from "./orbit.ts";
import type { Shown } from "./shown.ts";
import type { Order, Report } from "./solid-orders.ts";

/** Why there is no solid to look at. */
export type Trouble = "missing" | "lost";

export class SolidLink {
  private readonly worker: Worker;
  private ticket = 0;
  private built: (surface: Boundary) => void = () => {};

  /** Takes the canvas over; `trouble` is told when nothing can be drawn on it, or no longer. */
  constructor(canvas: HTMLCanvasElement, trouble: (what: Trouble) => void) {
    this.worker = new Worker(new URL("./solid-worker.ts", import.meta.url), { type: "module" });
    this.worker.addEventListener("message", ({ data }: MessageEvent<Report>) => {
      if (data.kind !== "built") trouble(data.kind);
      else if (data.ticket === this.ticket) this.built(data.surface);
    });
    this.worker.addEventListener("error", () => trouble("missing"));
    // Browsers that cannot draw from a thread have no such method.
    if (typeof canvas.transferControlToOffscreen !== "function") {
      trouble("missing");
      return;
    }
    const off = canvas.transferControlToOffscreen();
    this.worker.postMessage({ kind: "start", canvas: off } satisfies Order, [off]);
  }

  /** Has it built; `built` is called with the surface when it stands, unless something else was asked for meanwhile. */
  show(shown: Shown, built: (surface: Boundary) => void): void {
    this.ticket += 1;
    this.built = built;
    this.send({ kind: "show", shown, ticket: this.ticket });
  }

  /** The picture's size, px, and the device pixels to one of them. */
  resize(width: number, height: number, ratio: number): void {
    this.send({ kind: "resize", width, height, ratio });
  }

  /** Has it drawn: coarsely while it moves, else as finely as the screen. */
  draw(camera: Camera, moving: boolean): void {
    this.send({ kind: "draw", camera, moving });
  }

  /** Ends the thread, and with it all it holds. */
  close(): void {
    this.worker.terminate();
  }

  private send(order: Order): void {
    this.worker.postMessage(order);
  }
}

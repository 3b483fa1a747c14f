/** What the solid is to show. */
import type { Heat } from "../heat.ts";
import type { Paint } from "./paint.ts";

export interface Shown {
  readonly heat: Heat;
  readonly paint: Paint;
  /** "#rrggbb" of the ground and of the outlines. */
  readonly paper: string;
  readonly ink: string;
}

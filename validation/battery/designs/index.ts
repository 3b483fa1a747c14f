/** The battery: designs of every kind the document can say, invented, each under a plain descriptive name. */
import { COILS } from "./coils.ts";
import { COMPANY } from "./company.ts";
import { HARD } from "./hard.ts";
import type { Entry } from "./pieces.ts";
import { RODS } from "./rods.ts";
import { SHAPES } from "./shapes.ts";

export type { Entry } from "./pieces.ts";

export const BATTERY: readonly Entry[] = [...COILS, ...RODS, ...SHAPES, ...COMPANY, ...HARD].map((entry) => ({
  ...entry,
  design: { name: entry.id, ...entry.design },
}));

/** The figures of a result document by their paths: those with bars, and those told without. */
import type { PartResult, Result, Uncertain } from "../../meshes/result.ts";

/** What is compared of a part. */
export type PartOfFigures = Omit<PartResult, "name" | "skinDepthMm">;

/** What of a result is compared; a truth has the same shape, its bars its own doubt. */
export type Figures = Pick<Result, "empty" | "loaded" | "power" | "turns" | "strayField"> & {
  readonly parts: readonly PartOfFigures[];
};

const isObject = (x: unknown): x is Record<string, unknown> => typeof x === "object" && x !== null;

function isUncertain(x: unknown): x is Uncertain {
  return isObject(x) && typeof x["value"] === "number" && typeof x["plusMinus"] === "number";
}

/** Everything compared of a result, by path ("parts.0.powerW"). */
export interface Listed {
  /** Figures with bars. */
  readonly barred: ReadonlyMap<string, Uncertain>;
  /** Figures without: powers of turns, shares, hot spots. */
  readonly plain: ReadonlyMap<string, number>;
}

export function listed(of: Figures): Listed {
  const barred = new Map<string, Uncertain>();
  const plain = new Map<string, number>();
  const walk = (x: unknown, path: string): void => {
    if (isUncertain(x)) barred.set(path, x);
    else if (typeof x === "number") plain.set(path, x);
    else if (isObject(x)) for (const [key, item] of Object.entries(x)) walk(item, `${path}.${key}`);
  };
  const { empty, loaded, power, turns, strayField, parts } = of;
  for (const [key, item] of Object.entries({ empty, loaded, power })) walk(item, key);
  turns.forEach((t, k) => {
    walk(t.powerW, `turns.${k}.powerW`);
  });
  strayField.forEach((s, k) => {
    walk(s.fluxDensityT, `strayField.${k}.fluxDensityT`);
  });
  parts.forEach((p, k) => {
    const { depthShares, sideDepthShares, boreDepthShares, ...rest } = p;
    const part = { ...rest, name: null, skinDepthMm: null };
    walk(part, `parts.${k}`);
    for (const [key, shares] of Object.entries({ depthShares, sideDepthShares, boreDepthShares }))
      shares?.forEach((s, i) => {
        walk(s.share, `parts.${k}.${key}.${i}`);
      });
  });
  return { barred, plain };
}

/** A path without its counters: "parts.0.powerW" → "parts.powerW". */
export const kindOf = (path: string): string => path.replaceAll(/\.\d+/g, "");

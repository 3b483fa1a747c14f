/** What is kept between designs must change nothing but the time. */
import { describe, expect, it } from "vitest";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import { predict } from "./predict.ts";
import { readyAt } from "./ready.ts";

function rings(frequencyHz: number, sense: readonly number[] = [1, 1], currentA = 100) {
  return checkDesign({
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" },
      winding: {
        form: "rings",
        centresMm: [
          [30, -8],
          [30, 8],
        ],
        sense,
      },
    },
    parts: [
      {
        name: "collar",
        shape: "cylinder",
        diameterMm: 30,
        boreDiameterMm: 18,
        lengthMm: 30,
        material: { resistivityOhmM: 7e-7 },
      },
    ],
    drive: { frequencyHz, currentA },
    accuracyPercent: 2,
  });
}

const ready = ({ scene }: ReturnType<typeof rings>, level = 1) =>
  readyAt(scene, build(scene), level, () => {});

/** The digits of a prediction, without time and memory. */
function digits(design: ReturnType<typeof rings>): string {
  const { result, heat } = predict(design);
  return JSON.stringify([
    { ...result, numerics: { ...result.numerics, seconds: 0, peakMemoryBytes: 0 } },
    [...heat.density],
  ]);
}

describe("grids made ready", () => {
  it("are the same for another current, and for the same design again after another", () => {
    const first = ready(rings(3000));
    expect(ready(rings(3000, [1, 1], 250))).toBe(first);
    expect(ready(rings(30_000))).not.toBe(first);
    expect(ready(rings(3000))).toBe(first);
    expect(ready(rings(3000), 2)).not.toBe(first);
  });

  it("are the same for small changes of frequency: a step of skin depth is a factor of 2^(1/4)", () => {
    const meshes = (ratio: number, count: number): number =>
      new Set(
        Array.from({ length: count }, (_, k) => {
          const { mesh } = build(rings(30_000 * ratio ** k).scene);
          return JSON.stringify([...mesh.r, ...mesh.z]);
        }),
      ).size;
    // 18 % more frequency is 8 % less skin depth, in each of two materials.
    expect(meshes(1.01, 17)).toBeLessThanOrEqual(3);
    expect(meshes(2 ** 0.5, 5)).toBe(5);
  });

  it("are halves only for circuits that are the same on both sides", () => {
    expect(ready(rings(3000))).toHaveProperty("half");
    expect(ready(rings(3000, [1, -1]))).not.toHaveProperty("half");
    expect(ready(rings(3000))).toHaveProperty("half");
  });

  it("are forgotten after a few other designs", () => {
    const first = ready(rings(3000));
    for (const frequency of [300, 30_000, 3e5]) ready(rings(frequency));
    expect(ready(rings(3000))).not.toBe(first);
  });

  it("leave every digit as it is, whatever was solved before", () => {
    const fresh = digits(rings(4000));
    expect(digits(rings(4000))).toBe(fresh);
    for (const other of [rings(4000, [1, -1]), rings(400), rings(4e4), rings(4e5)]) digits(other);
    expect(digits(rings(4000))).toBe(fresh);
  });
});

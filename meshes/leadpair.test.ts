import { describe, expect, it } from "vitest";
import { randomScene } from "./fixtures.ts";
import { leadPair } from "./leadpair.ts";
import type { Scene } from "./scene.ts";

/** Solid wires of 8 mm, 1 mm apart: the current crowds into the sides that face each other. */
const close: Scene = {
  ...randomScene(1),
  section: { kind: "round", radius: 0.004, wall: 0 },
  conductor: { resistivity: 1.75e-8, relativePermeability: 1, lossTangent: 0, saturation: null },
  frequency: 10_000,
  leads: { length: 0.5, spacing: 0.009 },
};

describe("bars of the leads", () => {
  const rough = leadPair({ ...close, accuracy: 0.02 });
  const fine = leadPair({ ...close, accuracy: 0.002 });

  it("stay well within what is asked of the coil, so that leads never keep it from being met", () => {
    for (const [pair, asked] of [
      [rough, 0.02],
      [fine, 0.002],
    ] as const) {
      expect(pair.resistanceBar).toBeLessThan(0.5 * asked * pair.resistance);
      expect(pair.inductanceBar).toBeLessThan(0.5 * asked * pair.inductance);
    }
  });

  it("hold the finer answer", () => {
    expect(Math.abs(fine.resistance - rough.resistance)).toBeLessThan(rough.resistanceBar);
    expect(Math.abs(fine.inductance - rough.inductance)).toBeLessThan(rough.inductanceBar);
  });

  it("are zero, as the leads are, where there are none", () => {
    const none = leadPair({ ...close, leads: null });
    expect(Object.values(none)).toEqual([0, 0, 0, 0]);
  });
});

import { describe, expect, it } from "vitest";
import { checkDesign } from "./check.ts";
import { helixSurplus } from "./helix.ts";
import type { Scene } from "./scene.ts";

const coil = (winding: object, leads?: object): Scene =>
  checkDesign({
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 4, material: "copper" },
      winding,
      ...(leads === undefined ? {} : { leads }),
    },
    drive: { frequencyHz: 1000, currentA: 1 },
  }).scene;

describe("a helix against closed rings", () => {
  const helix = coil({ form: "helix", boreDiameterMm: 26, turns: 8, pitchMm: 40 });
  const found = helixSurplus(helix, 0.01);

  it("is as long as the right triangle of its way round and its rise", () => {
    const turn = Math.hypot(2 * Math.PI * 15, 40);
    expect(found.length).toBeCloseTo((8 * turn) / 1000, 12);
    expect(found.extraResistance).toBeCloseTo(0.01 * (turn / (2 * Math.PI * 15) - 1), 12);
  });

  it("has the length of leads, go and return, added", () => {
    const led = coil(
      { form: "helix", boreDiameterMm: 26, turns: 8, pitchMm: 40 },
      { lengthMm: 150, spacingMm: 20 },
    );
    expect(helixSurplus(led, 0.01).length - found.length).toBeCloseTo(0.3, 12);
  });

  it("a long one: (μ0 l/2π)(ln(2l/a) − 1) of a straight tube of current", () => {
    // Rosa, Bull. Bureau of Standards 4 (1908) 301, a tube l long and a in radius, l >> a (from memory); next term a/l.
    const [l, a] = [0.32, 0.015];
    const straight = 2e-7 * l * (Math.log((2 * l) / a) - 1 + a / l);
    expect(Math.abs(found.extraInductance / straight - 1)).toBeLessThan(1e-3);
  });

  it("equals two filaments l long at distance a: Neumann's integral by midpoints", () => {
    const [l, a, n] = [0.32, 0.015, 2000];
    const h = l / n;
    let sum = 0;
    for (let k = 0; k < n; k++) {
      // The inner integral in closed form: ∫ dz'/√((z−z')² + a²).
      const z = (k + 0.5) * h;
      sum += h * (Math.asinh(z / a) + Math.asinh((l - z) / a));
    }
    expect(found.extraInductance / (1e-7 * sum)).toBeCloseTo(1, 5);
  });
});

describe("other windings", () => {
  it("closed rings have no surplus", () => {
    const rings = coil({
      form: "rings",
      centresMm: [
        [20, 0],
        [30, 10],
      ],
    });
    const found = helixSurplus(rings, 0.01);
    expect(found.length).toBeCloseTo(2 * Math.PI * 0.05, 12);
    expect(found.extraResistance).toBe(0);
    expect(found.extraInductance).toBe(0);
  });

  it("a flat spiral grows along the radius", () => {
    const spiral = coil({ form: "spiral", innerDiameterMm: 36, turns: 3, pitchMm: 10, zMm: 0 });
    const length = [20, 30, 40].reduce((sum, r) => sum + Math.hypot(2 * Math.PI * r, 10), 0);
    expect(helixSurplus(spiral, 1).length).toBeCloseTo(length / 1000, 12);
    expect(helixSurplus(spiral, 1).extraInductance).toBeGreaterThan(0);
  });
});

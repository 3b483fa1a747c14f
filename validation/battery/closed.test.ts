/** The battery's closed forms in limits known otherwise. */
import { expect, it } from "vitest";
import { checkDesign } from "../../meshes/check.ts";
import { MU0 } from "../../solver/index.ts";
import { skinDepth } from "../analytic/skin.ts";
import { solidSphere } from "../analytic/sphere.ts";
import { closedForms } from "./closed.ts";
import { bar, rings, sphere, stack, watts } from "./designs/pieces.ts";

/** A ball of 24 mm in two rings of 3 m radius and spacing: its field is uniform to the fourth power of 0.004. */
it.each([
  [7.2e-7, 1, 500],
  [1e-8, 50, 1500],
])(
  "a sphere (ρ %s, µr %s, %s Hz) in wide rings takes what it takes in their uniform field",
  (rho, mur, f) => {
    const current = 20;
    const { scene } = checkDesign({
      coil: {
        conductor: bar(1),
        winding: rings([
          [3000, -1500],
          [3000, 1500],
        ]),
      },
      parts: [sphere(24, [rho, mur])],
      drive: { frequencyHz: f, currentA: current },
    });
    const a = 0.012;
    const omega = 2 * Math.PI * f;
    // Two rings at half their radius from the middle: H = 0.8^(3/2) I/a.
    const h = (0.8 ** 1.5 * current) / 3;
    const alpha = solidSphere(a / skinDepth(rho, f, mur), mur);
    const watt = -2 * Math.PI * a ** 3 * omega * MU0 * h ** 2 * alpha.im;
    const got = closedForms("ball-in-rings-wide-skin", scene).get("parts.0.powerW");
    expect(Math.abs((got?.value ?? 0) / watt - 1)).toBeLessThan(1e-6);
  },
);

/** A current that goes as 1/r sees ρ 2π/∫dS/r; skin effect begins as 1 + (b/δ)⁴/48 (Lord Kelvin's series, first term). */
it("R of a ring at 1 Hz is ρ 2π/∫dS/r, by midpoint sums, and the first trace of skin effect", () => {
  const { scene } = checkDesign({
    coil: { conductor: bar(2.8), winding: rings([[40, 0]]) },
    drive: { frequencyHz: 1, currentA: 1 },
  });
  const [a, b, n] = [0.04, 0.0014, 2000];
  let sum = 0;
  for (let k = 0; k < n; k++) {
    const angle = (Math.PI * (k + 0.5)) / n;
    sum += ((2 * (b * Math.sin(angle)) ** 2) / (a + b * Math.cos(angle))) * (Math.PI / n);
  }
  const skin = 1 + (b / skinDepth(1.75e-8, 1, 1)) ** 4 / 48;
  const ohm = (2 * Math.PI * 1.75e-8 * skin) / sum;
  const got = closedForms("one-ring-mains", scene).get("empty.resistanceOhm");
  expect(Math.abs((got?.value ?? 0) / ohm - 1)).toBeLessThan(1e-9);
});

/** Archimedes: a sphere has the surface of its cylinder's side. */
it("spheres of given power share it over their cylinders' sides", () => {
  const { scene } = checkDesign({
    coil: { conductor: bar(2), winding: rings([[40, 0]]) },
    parts: [stack(3, 1, { shape: "sphere", diameterMm: 13 }, [2e-7, 1])],
    drive: watts(60_000, 300),
  });
  const sides = 3 * Math.PI * 0.013 * 0.013;
  const got = closedForms("balls-tenth-gap", scene).get("parts.0.surfaceWPerM2");
  expect((got?.value ?? 0) * sides).toBeCloseTo(300, 9);
});

it("a stack of washers without gaps has no surface between them: two sides and two ends", () => {
  const { scene } = checkDesign({
    coil: { conductor: bar(2), winding: rings([[40, 0]]) },
    parts: [stack(5, 0, { shape: "cylinder", diameterMm: 36, boreDiameterMm: 12, lengthMm: 5 }, [2e-7, 1])],
    drive: watts(60_000, 300),
  });
  const surface = Math.PI * (0.036 + 0.012) * 0.025 + 2 * Math.PI * (0.018 ** 2 - 0.006 ** 2);
  const got = closedForms("washers-no-gap", scene).get("parts.0.surfaceWPerM2");
  expect((got?.value ?? 0) * surface).toBeCloseTo(300, 9);
});

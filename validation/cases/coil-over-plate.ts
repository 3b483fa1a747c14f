/** Coil of rectangular section over a conducting plate: what the plate adds to its impedance. */

import { type Check, type Constants, type Row, relativeRow } from "../check.ts";
import { box, conducting, meshOf, PASSIVE, reflectedImpedance, skinDepth, WINDING } from "../setups.ts";
import { checkValue } from "../tables/read.ts";

/** Radius of the disc that stands for the endless plate, in outer coil radii. */
const REACH = 8;
/** Thickness of the disc that stands for the half-space, in skin depths (or in coil radii where that is less). */
const DEEP = 9;

export const coilOverPlate: Check = {
  id: "coil-over-plate",
  title: "Coil over a plate",
  method: `Prescribed uniform density in the coil; the plate is a disc of ${REACH} outer coil radii, the half-space one ${DEEP} skin depths thick; ΔZ is the difference of two solutions on one grid.`,
  why: "The disc ends where the induced current has fallen to some 1e-3 of its greatest density; grid errors are below that.",
  spoiled: { conductivity: 1.05, permeability: 1, length: 1 },
  pieces: [
    "dd-half-al-7k",
    "dd-half-steel-20k",
    "dd-c9-10000",
    "dd-plate-al2-500",
    "dd-plate-steel5-200",
  ].map((id) => (constants) => rows(id, constants)),
};

function rows(id: string, constants: Constants): Row[] {
  const c = checkValue("probe-coil", id);
  const sigma = 1 / c.input("rho");
  const omega = 2 * Math.PI * c.input("f");
  const depth = skinDepth(sigma, omega, c.input("mur"));
  const thickness = id.includes("plate") ? c.input("c") : DEEP * depth;
  const unit = REACH * c.input("r2");
  const [r1, r2, h, l1] = [c.input("r1"), c.input("r2"), c.input("h"), c.input("l1")].map(
    (x) => x / unit,
  ) as [number, number, number, number];
  const shapes = [box(r1, r2, l1, l1 + h, 1), box(0, 1, -thickness / unit, 0, 2)];
  const traits = [PASSIVE, WINDING, conducting(depth, unit, c.input("mur"))];
  const mesh = meshOf(shapes, traits, { kind: "open", radius: 1.5, mirror: false }, unit);
  const [dR, dL] = reflectedImpedance(mesh, c.input("N"), omega, sigma, c.input("mur"), constants);
  return [
    relativeRow(`ΔR, ${c.description}, ${c.input("f")} Hz`, c.source, c.expected("dR"), dR, 2e-3),
    relativeRow(`ΔL, ${c.description}, ${c.input("f")} Hz`, c.source, c.expected("dL"), dL, 2e-3),
  ];
}

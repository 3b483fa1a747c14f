/** Coil of rectangular section round a long rod or tube: what the rod adds to its impedance. */

import { type Check, type Constants, type Row, relativeRow } from "../check.ts";
import { box, conducting, meshOf, PASSIVE, reflectedImpedance, skinDepth, WINDING } from "../setups.ts";
import { checkValue } from "../tables/read.ts";

/** Half-length of the rod, in coil heights. */
const REACH = 6;

export const coilRoundRod: Check = {
  id: "coil-round-rod",
  title: "Coil round a long rod and tube",
  method: `Prescribed uniform density in the coil; the endless rod is one of ${2 * REACH} coil heights; ΔZ is the difference of two solutions on one grid.`,
  why: "A non-magnetic rod's far part sees the coil as a dipole and matters little; a magnetic one carries flux along itself, hence the wider band there.",
  spoiled: { conductivity: 1.05, permeability: 1, length: 1 },
  pieces: [
    "dd-rod-cu-10k",
    "dd-rod-hot-10k",
    "dd-rod-graphite",
    "dd-rod-steel-5k",
    "dd-tube-al",
    "dd-tube-steel",
  ].map((id) => (constants) => rows(id, constants)),
};

function rows(id: string, constants: Constants): Row[] {
  const c = checkValue("probe-coil", id);
  const sigma = 1 / c.input("rho");
  const omega = 2 * Math.PI * c.input("f");
  const depth = skinDepth(sigma, omega, c.input("mur"));
  const unit = REACH * c.input("h");
  const [r1, r2, h, b] = [c.input("r1"), c.input("r2"), c.input("h"), c.input("b")].map((x) => x / unit) as [
    number,
    number,
    number,
    number,
  ];
  const bore = id.includes("tube") ? c.input("a") / unit : 0;
  const shapes = [box(r1, r2, -h / 2, h / 2, 1), box(bore, b, -1, 1, 2)];
  const traits = [PASSIVE, WINDING, conducting(depth, unit, c.input("mur"))];
  const mesh = meshOf(shapes, traits, { kind: "open", radius: 1.5, mirror: false }, unit);
  const [dR, dL] = reflectedImpedance(mesh, c.input("N"), omega, sigma, c.input("mur"), constants);
  const band = c.input("mur") > 1 ? 3e-3 : 1e-3;
  const out = [relativeRow(`ΔR, ${c.description}`, c.source, c.expected("dR"), dR, band)];
  // The graphite rod's ΔL is 5e-5 of L: nothing a difference of two solutions should be asked for.
  if (id !== "dd-rod-graphite")
    out.push(relativeRow(`ΔL, ${c.description}`, c.source, c.expected("dL"), dL, band));
  return out;
}

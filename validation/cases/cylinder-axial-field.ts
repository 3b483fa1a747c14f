/** Infinite cylinders and tubes in a uniform axial field: one slice with natural ends. */
import { lossesOf, MU0, type RegionMaterial, solveApplied, tensorPatches } from "../../solver/index.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { air, gradedInward, metal, omegaFor, onTwoGrids, skinDepth } from "../setups.ts";
import { caseIds, checkValue } from "../tables/read.ts";

const CONDUCTIVITY = 1e6;
const RADIUS = 0.01;

export const cylinderAxialField: Check = {
  id: "cylinder-axial-field",
  title: "Cylinder and tube in a uniform axial field",
  method:
    "A slice of an infinite cylinder, natural ends, natural outer side at the surface, applied field. µ' from the flux within the surface, µ'' from the power: P per metre = ω μ0 π a² H² µ'', H rms.",
  why: "One-dimensional and smooth: the grid's error alone.",
  spoiled: { conductivity: 1.02, permeability: 1, length: 1 },
  pieces: [
    ...["cyl-mueff-a0.5", "cyl-mueff-a2", "cyl-mueff-a5", "cyl-mueff-a20", "cyl-mueff-a50"].map(
      (id) => (constants: Constants) => solid(id, constants),
    ),
    ...["cyl-hollow-thick", "cyl-hollow-thin", "cyl-hollow-mag", "cyl-hollow-lowf"].map(
      (id) => (constants: Constants) => hollow(id, constants),
    ),
    ...caseIds("cylinder", "cyl-dim-").map((id) => (constants: Constants) => [power(id, constants)]),
  ],
};

function solid(id: string, constants: Constants): Row[] {
  const c = checkValue("cylinder", id);
  const ratio = c.input("a/delta");
  const [re, im] = effective(RADIUS, 0, RADIUS / ratio, 1, constants);
  return [
    relativeRow(`µ', a/δ = ${ratio}`, c.source, c.expected("mu_eff_re/mur"), re, 2e-4),
    relativeRow(`µ'', a/δ = ${ratio}`, c.source, c.expected("mu_eff_im/mur (mu'')"), im, 2e-4),
  ];
}

function hollow(id: string, constants: Constants): Row[] {
  const c = checkValue("cylinder", id);
  const b = c.input("inner_radius") * RADIUS;
  const [re, im] = effective(RADIUS, b, c.input("delta") * RADIUS, c.input("mur"), constants);
  const name = `b/a = ${c.input("inner_radius")}, δ/a = ${c.input("delta")}, µr = ${c.input("mur")}`;
  return [
    relativeRow(`µ', tube, ${name}`, c.source, c.expected("mu_eff_re"), re, 2e-4),
    relativeRow(`µ'', tube, ${name}`, c.source, c.expected("mu_eff_im"), im, 2e-4),
  ];
}

/** Power per metre at the table's own field. */
function power(id: string, constants: Constants): Row {
  const c = checkValue("cylinder", id);
  const a = c.input("a");
  const omega = 2 * Math.PI * c.input("f");
  const depth = skinDepth(1 / c.input("rho"), omega, c.input("mur"));
  const [, im] = effective(a, 0, depth, c.input("mur"), constants, 1 / c.input("rho"));
  const perMuff = omega * MU0 * Math.PI * a * a * c.input("H0_rms") ** 2;
  const watt = { value: im.value * perMuff, bar: (im.bar ?? 0) * perMuff };
  return relativeRow(`P per metre, ${c.description}`, c.source, c.expected("P_per_m"), watt, 2e-4);
}

/** µ' and µ'' of the slice r < a with a bore of radius b (0 = solid). */
function effective(
  a: number,
  b: number,
  depth: number,
  mur: number,
  constants: Constants,
  conductivity = CONDUCTIVITY,
): [Figure, Figure] {
  const height = a / 4;
  const wall = gradedInward(a, b, depth);
  const mesh = tensorPatches(b > 0 ? [0, b / 2, ...wall] : wall, [0, height], (r) => (r > b ? 1 : 0));
  const materials: RegionMaterial[] = [air(constants), metal(constants, conductivity, mur)];
  const omega = omegaFor(depth, conductivity, mur);
  const [re, im] = onTwoGrids(mesh, [-1, -1], [1, 2], (prepared) => {
    const field = solveApplied(prepared, { materials, omega }, MU0);
    const surface = prepared.grid.r.findIndex((r) => r >= a * (1 - 1e-12));
    const flux = field.psi.re[surface] ?? 0;
    const unit = omega * MU0 * Math.PI * a * a * height;
    return [(2 * flux) / (MU0 * a * a), (lossesOf(field).regionPower[1] ?? 0) / unit];
  });
  return [re!, im!];
}

/** Solid and hollow spheres in a uniform field, in open space. */
import {
  lossesOf,
  MU0,
  makeProbe,
  type Prepared,
  type RegionMaterial,
  solveApplied,
} from "../../solver/index.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { air, conducting, disc, meshOf, metal, omegaFor, onTwoGrids, PASSIVE, skinDepth } from "../setups.ts";
import { checkValue } from "../tables/read.ts";

const OPEN = { kind: "open", radius: 1.5, mirror: false } as const;
const CONDUCTIVITY = 1e6;
const RADIUS = 0.01;

export const sphereUniformField: Check = {
  id: "sphere-uniform-field",
  title: "Sphere and hollow sphere in a uniform field",
  method:
    "Applied field, open space. α' from the field on the axis at three radii, α'' from the power: P = −2π a³ ω μ0 H² α'', H rms.",
  why: "Two grids on curved cells; the open space itself is exact for a dipole.",
  spoiled: { conductivity: 1.05, permeability: 1, length: 1 },
  pieces: [
    ...[
      "sph-alpha-a0.5-mu1",
      "sph-alpha-a2-mu1",
      "sph-alpha-a10-mu1",
      "sph-alpha-a3-mu20",
      "sph-alpha-a50-mu100",
    ].map((id) => (constants: Constants) => solid(id, constants)),
    ...["sph-team6", "sph-hollow-mag"].map((id) => (constants: Constants) => hollow(id, constants)),
  ],
};

function solid(id: string, constants: Constants): Row[] {
  const c = checkValue("sphere", id);
  const mur = c.input("mur");
  const depth = RADIUS / c.input("a/delta");
  const mesh = meshOf([disc(0, 0, 1, 1)], [PASSIVE, conducting(depth, RADIUS, mur)], OPEN, RADIUS);
  const materials = [air(constants), metal(constants, CONDUCTIVITY, mur)];
  const omega = omegaFor(depth, CONDUCTIVITY, mur);
  const [re, im] = onTwoGrids(mesh, [-1, -1], [1, 2], (prepared) =>
    alpha(prepared, materials, omega, RADIUS),
  );
  const name = `a/δ = ${c.input("a/delta")}, µr = ${mur}`;
  return [
    relativeRow(
      `α', ${name}`,
      c.source,
      c.expected("alpha_re"),
      re!,
      id === "sph-alpha-a0.5-mu1" ? 1e-3 : 5e-4,
    ),
    relativeRow(`α'', ${name}`, c.source, c.expected("alpha_im"), im!, 5e-4),
  ];
}

/** α' and α''. */
function alpha(prepared: Prepared, materials: readonly RegionMaterial[], omega: number, a: number): number[] {
  const field = solveApplied(prepared, { materials, omega }, MU0);
  const { bz } = makeProbe(field)(0, 3 * a);
  const power = lossesOf(field).totalPower;
  return [27 * (bz.re / MU0 - 1), -power / (2 * Math.PI * a ** 3 * omega * MU0)];
}

function hollow(id: string, constants: Constants): Row[] {
  const c = checkValue("sphere", id);
  const [a, b, sigma, mur] = [c.input("a_outer"), c.input("b_inner"), c.input("sigma"), c.input("mur")];
  const omega = 2 * Math.PI * c.input("f");
  const shapes = [disc(0, 0, 1, 1), disc(0, 0, b / a, 0, 1)];
  const mesh = meshOf(shapes, [PASSIVE, conducting(skinDepth(sigma, omega, mur), a, mur)], OPEN, a);
  const materials = [air(constants), metal(constants, sigma, mur)];
  const figures = onTwoGrids(mesh, [-1, -1], [2, 4], (prepared) => {
    const field = solveApplied(prepared, { materials, omega }, c.input("B0_rms"));
    const probe = makeProbe(field);
    const cavity = probe(0, 0).bz;
    const above = probe(0, 1.5 * a).bz;
    return [lossesOf(field).totalPower, Math.hypot(cavity.re, cavity.im), above.re];
  });
  const rows: [string, string, number][] = [
    ["P", "P", 5e-4],
    ["|B| in the cavity", "B_cavity_abs", 2e-3],
    ["B_z on the axis at 1.5 a, in phase", "Bz_axis_at_1.5a_re", 5e-4],
  ];
  return rows.map(([name, key, tolerance], i) =>
    relativeRow(`${c.description}: ${name}`, c.source, c.expected(key), figures[i] as Figure, tolerance),
  );
}

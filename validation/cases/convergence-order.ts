/** How fast errors fall with the cells: against exact values, by the slope of ln|error| over ln h. */
import {
  cutGrid,
  lossesOf,
  MU0,
  type PatchMesh,
  prepare,
  solveApplied,
  tensorPatches,
} from "../../solver/index.ts";
import { solidCylinder } from "../analytic/cylinder.ts";
import { solidSphere } from "../analytic/sphere.ts";
import { absoluteRow, type Check, type Constants, type Row } from "../check.ts";
import { coarseFigures } from "../ninepoint/field.ts";
import { observedOrder } from "../order.ts";
import { air, conducting, disc, meshOf, metal, omegaFor, PASSIVE } from "../setups.ts";

const CONDUCTIVITY = 1e6;
const RADIUS = 0.01;
const SOURCE = "closed forms of W. R. Smythe, Static and Dynamic Electricity, evaluated here";

export const convergenceOrder: Check = {
  id: "convergence-order",
  title: "Observed order of convergence",
  method:
    "Power in a cylinder and in a sphere under a uniform field on grids cut 1, 2, 3, 4 … times; nine-node cells hold quadratics, so powers (squares of fields) converge with the fourth power of the cell; four-node cells with the second.",
  why: "Half an order: the slope of a few coarse grids.",
  // A wrong constant makes the error stay, and the slope 0.
  spoiled: { conductivity: 1.02, permeability: 1, length: 1 },
  pieces: [cylinder, sphere, bilinear].map((piece) => (constants) => [piece(constants)]),
};

function slope(name: string, expected: number, levels: readonly number[], errors: readonly number[]): Row {
  const told = errors.map((e) => e.toExponential(1)).join(", ");
  const figure = { value: observedOrder(levels, errors), bar: null };
  return absoluteRow(`${name}: errors ${told}`, SOURCE, expected, figure, 0.5);
}

function cylinder(constants: Constants): Row {
  const depth = RADIUS / 2;
  const lines = Array.from({ length: 5 }, (_, i) => (RADIUS * i) / 4);
  const mesh = tensorPatches(lines, [0, RADIUS / 4], () => 1);
  const exact =
    -solidCylinder(2, 1).im * omegaFor(depth, CONDUCTIVITY) * MU0 * Math.PI * RADIUS ** 2 * (RADIUS / 4);
  const levels = [1, 2, 4, 8];
  return slope("cylinder, a/δ = 2", 4, levels, errors(mesh, depth, levels, exact, constants));
}

function sphere(constants: Constants): Row {
  const levels = [1, 2, 3, 4];
  return slope(
    "sphere, a/δ = 3",
    4,
    levels,
    errors(sphereMesh(), RADIUS / 3, levels, sphereExact(), constants),
  );
}

function bilinear(constants: Constants): Row {
  const levels = [1, 2, 3, 4];
  const omega = omegaFor(RADIUS / 3, CONDUCTIVITY);
  const materials = [air(constants), metal(constants, CONDUCTIVITY)];
  const exact = sphereExact();
  const off = levels.map(
    (n) =>
      coarseFigures(cutGrid(sphereMesh(), n), materials, omega, { applied: MU0 }).regionPower[1]! / exact - 1,
  );
  return slope("the four-node scheme, same sphere", 2, levels, off);
}

const sphereMesh = (): PatchMesh =>
  meshOf(
    [disc(0, 0, 1, 1)],
    [PASSIVE, conducting(RADIUS / 3, RADIUS)],
    { kind: "open", radius: 1.5, mirror: false },
    RADIUS,
  );

/** P in W at H = 1 A/m rms. */
function sphereExact(): number {
  return -2 * Math.PI * RADIUS ** 3 * omegaFor(RADIUS / 3, CONDUCTIVITY) * MU0 * solidSphere(3, 1).im;
}

function errors(
  mesh: PatchMesh,
  depth: number,
  levels: readonly number[],
  exact: number,
  constants: Constants,
): number[] {
  const materials = [air(constants), metal(constants, CONDUCTIVITY)];
  const omega = omegaFor(depth, CONDUCTIVITY);
  return levels.map((n) => {
    const field = solveApplied(prepare(cutGrid(mesh, n), [-1, -1]), { materials, omega }, MU0);
    return lossesOf(field).totalPower / exact - 1;
  });
}

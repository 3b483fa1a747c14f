/** Solenoids: a current sheet, a coil of rectangular section, and a stack of round wires, all of uniform current. */
import { solvePrescribed } from "../../solver/index.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { air, box, disc, meshOf, onTwoGrids, PASSIVE, WINDING } from "../setups.ts";
import { checkValue } from "../tables/read.ts";

const OPEN = { kind: "open", radius: 1.5, mirror: false } as const;

export const solenoidInductance: Check = {
  id: "solenoid-inductance",
  title: "Solenoid inductance without skin effect",
  method:
    "Prescribed uniform current densities. The sheet is the limit of coils of radial thickness t = 1/50 and 1/100 of the lesser of radius and length, taken to 0 linearly; round-wire coils are stacks of rings as in the source.",
  why: "Sheet: the quadratic rest of the extrapolation. Stack of rings: the source treats mutual inductances as those of filaments, which leaves out (d/2a)² terms. Brooks coil: the grid alone.",
  spoiled: { conductivity: 1, permeability: 1.01, length: 1 },
  pieces: [
    ...["ind-lundin-long", "ind-lundin-equal", "ind-lundin-short"].map((id) => (constants: Constants) => [
      sheet(id, constants),
    ]),
    (constants) => [brooks(constants)],
    ...["ind-roundwire-7x2mm", "ind-roundwire-4x8mm"].map((id) => (constants: Constants) => [
      stack(id, constants),
    ]),
  ],
};

function sheet(id: string, constants: Constants): Row {
  const c = checkValue("inductance", id);
  const [a, l, n] = [c.input("a"), c.input("l"), c.input("N")];
  const [thick, thin] = [1 / 50, 1 / 100]
    .map((x) => x * Math.min(a, l))
    .map((t) => section(a - t / 2, a + t / 2, l, n, constants)) as [Figure, Figure];
  const value = 2 * thin.value - thick.value;
  const bar = 2 * (thin.bar ?? 0) + (thick.bar ?? 0);
  const name = `current sheet, 2a/l = ${(2 * a) / l}`;
  return relativeRow(name, c.source, c.expected("L_exact"), { value, bar }, 2e-4);
}

function brooks(constants: Constants): Row {
  const c = checkValue("inductance", "ind-brooks");
  const value = section(c.input("r1"), c.input("r2"), c.input("h"), c.input("N"), constants);
  return relativeRow("Brooks coil", c.source, c.expected("L"), value, 5e-5);
}

/** L of a coil of rectangular section. */
function section(r1: number, r2: number, h: number, turns: number, constants: Constants): Figure {
  const unit = Math.hypot(r2, h / 2);
  const shape = box(r1 / unit, r2 / unit, -h / 2 / unit, h / 2 / unit, 1);
  const mesh = meshOf([shape], [PASSIVE, WINDING], OPEN, unit * constants.length);
  const materials = [air(constants), air(constants)];
  const [figure] = onTwoGrids(mesh, [-1, -1], [1, 2], (prepared) => {
    const [link] = solvePrescribed(prepared, { materials, omega: 1 }, [
      { region: 1, density: { re: 1, im: 0 } },
    ]).linkages;
    return [(turns ** 2 * link!.linkage.re) / link!.current.re];
  });
  return figure!;
}

function stack(id: string, constants: Constants): Row {
  const c = checkValue("inductance", id);
  const [a, pitch, d, n] = [c.input("a"), c.input("pitch"), c.input("wire_d"), c.input("N")];
  const unit = Math.hypot(a + d / 2, (n * pitch) / 2);
  const heights = Array.from({ length: n }, (_, k) => (k - (n - 1) / 2) * pitch);
  const shapes = heights.map((z, k) => disc(a / unit, z / unit, d / 2 / unit, k + 1));
  const regions = [PASSIVE, ...heights.map(() => PASSIVE)];
  const mesh = meshOf(shapes, regions, OPEN, unit * constants.length);
  const materials = regions.map(() => air(constants));
  const windings = heights.map((_, k) => ({ region: k + 1, density: { re: 1, im: 0 } }));
  const [figure] = onTwoGrids(
    mesh,
    regions.map(() => -1),
    [1, 2],
    (prepared) => {
      const { linkages } = solvePrescribed(prepared, { materials, omega: 1 }, windings);
      return [linkages.reduce((sum, link) => sum + link.linkage.re / link.current.re, 0)];
    },
  );
  const size = Math.round((d / 2 / a) ** 2 * 1e4) / 1e4;
  return relativeRow(
    `${n} rings, (d/2a)² = ${size}`,
    c.source,
    c.expected("L_stack_of_rings"),
    figure!,
    1e-3,
  );
}

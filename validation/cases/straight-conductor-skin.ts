/** Skin effect in a straight round wire and tube: one ring, 500 wire diameters across. */
import { MU0 } from "../../solver/index.ts";
import { ringInductanceSurface } from "../analytic/ring.ts";
import { internalInductanceDc } from "../analytic/skin.ts";
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { resultOf, ringsDesign } from "../document.ts";
import { type CheckValue, checkValue } from "../tables/read.ts";

const RESISTIVITY = 1.7e-8;
const WIRE_MM = 2;
const RADIUS_MM = 500;

export const straightConductorSkin: Check = {
  id: "straight-conductor-skin",
  title: "Skin effect in a straight wire and tube",
  method:
    "Design documents of one ring 1 m across of 2 mm wire or tube; R over its dc value, and the internal inductance left when that of the flux outside a thin ring, μ0 a [ln(8a/r) − 2], is taken away.",
  why: "Curvature changes R by (r/a)² ln(a/r), 1e-5. The internal inductance is some 3 % of the whole, so the document's error of L counts about thirtyfold there.",
  spoiled: { conductivity: 1.05, permeability: 1, length: 1 },
  pieces: [
    ...["skin-wire-d2", "skin-wire-d4", "skin-wire-d8", "skin-wire-d16"].map(
      (id) => (constants: Constants) => {
        const c = checkValue("skin-effect", id);
        const name = `wire, d/δ = ${c.input("d/delta")}`;
        return rows(c, name, c.input("d/delta"), null, constants);
      },
    ),
    ...["skin-tube-ta0.2-td1", "skin-tube-ta0.2-td2", "skin-tube-ta0.4-td4"].map(
      (id) => (constants: Constants) => {
        const c = checkValue("skin-effect", id);
        const name = `tube, wall/radius = ${c.input("t/a")}, wall/δ = ${c.input("t/delta")}`;
        return rows(c, name, (2 * c.input("t/delta")) / c.input("t/a"), c.input("t/a"), constants);
      },
    ),
  ],
};

function rows(
  c: CheckValue,
  name: string,
  dOverDelta: number,
  wall: number | null,
  constants: Constants,
): Row[] {
  const depth = (WIRE_MM * 1e-3) / dOverDelta;
  const frequencyHz = RESISTIVITY / (Math.PI * MU0 * depth ** 2);
  const outer = (WIRE_MM * 1e-3) / 2;
  const inner = wall === null ? 0 : outer * (1 - wall);
  const design = ringsDesign(
    {
      centresMm: [[RADIUS_MM, 0]],
      diameterMm: WIRE_MM,
      ...(wall === null ? {} : { wallMm: (wall * WIRE_MM) / 2 }),
      resistivityOhmM: RESISTIVITY,
      frequencyHz,
      accuracyPercent: 0.05,
    },
    constants,
  );
  const { resistanceOhm, inductanceH } = resultOf(design).empty;
  const a = RADIUS_MM * 1e-3;
  const direct = (RESISTIVITY * 2 * a) / (outer ** 2 - inner ** 2);
  const internal = MU0 * a * internalInductanceDc(outer, inner);
  const resistance: Figure = { value: resistanceOhm.value / direct, bar: resistanceOhm.plusMinus / direct };
  const outside = ringInductanceSurface(a, outer);
  const inside: Figure = {
    value: (inductanceH.value - outside) / internal,
    bar: inductanceH.plusMinus / internal,
  };
  return [
    relativeRow(`R/R_dc, ${name}`, c.source, c.expected("R/R0"), resistance, 5e-4),
    relativeRow(`Li/Li_dc, ${name}`, c.source, c.expected("Li/Li0"), inside, 1e-2),
  ];
}

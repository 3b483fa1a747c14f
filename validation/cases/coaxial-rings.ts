/** Mutual inductance of two coaxial rings: M = (L wound together − L wound against each other)/4. */
import { type Check, type Constants, type Figure, type Row, relativeRow } from "../check.ts";
import { resultOf, ringsDesign } from "../document.ts";
import { checkValue } from "../tables/read.ts";

/** Wire diameter over the smaller ring's diameter. */
const THIN = 0.01;

export const coaxialRings: Check = {
  id: "coaxial-rings",
  title: "Two coaxial rings",
  method: `Design documents of two rings in series, once wound together and once against each other, wires of ${100 * THIN} % of the smaller ring, skin depth larger than the wire.`,
  why: "M is a quarter of the difference of two inductances, so their bars are divided by 2 and by M; the wire's thickness adds some 1e-4.",
  spoiled: { conductivity: 1, permeability: 1, length: 1.02 },
  pieces: ["ind-mutual-25-20-10", "ind-mutual-coplanar"].map((id) => (constants) => [row(id, constants)]),
};

function row(id: string, constants: Constants): Row {
  const c = checkValue("inductance", id);
  const [a, b, h] = [c.input("a") * 1e3, c.input("b") * 1e3, c.input("h") * 1e3];
  const wound = (sense: 1 | -1): Figure => {
    const { inductanceH } = resultOf(
      ringsDesign(
        {
          centresMm: [
            [a, 0],
            [b, h],
          ],
          sense: [1, sense],
          diameterMm: 2 * THIN * b,
          resistivityOhmM: 1.7e-8,
          frequencyHz: 50,
          accuracyPercent: 0.05,
        },
        constants,
      ),
    ).empty;
    return { value: inductanceH.value, bar: inductanceH.plusMinus };
  };
  const [together, against] = [wound(1), wound(-1)];
  const figure = {
    value: (together.value - against.value) / 4,
    bar: ((together.bar ?? 0) + (against.bar ?? 0)) / 4,
  };
  const name = `M, radii ${a} and ${b} mm, ${h} mm apart`;
  return relativeRow(name, c.source, c.expected("M"), figure, 1e-3);
}

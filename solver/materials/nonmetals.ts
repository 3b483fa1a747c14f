/** Conductors that are no metals. */
import { nonMagnetic, ROOM, readRows, recalled, recalledRows, TOOLBOX, table } from "./cite.ts";
import type { MaterialRecord } from "./laws.ts";

const GRAPHITE = "shape of isotropic grades, lowest near 600 °C; grades run from 7 to 15 µΩ·m at 20 °C";

export const nonmetals: readonly MaterialRecord[] = [
  {
    id: "graphite",
    description: "graphite, isotropic",
    kind: "nonmetal",
    resistivity: table(
      ...readRows(`${TOOLBOX}: graphite at 20 °C`, [[ROOM, 8e-6]]),
      ...recalledRows(0.4, GRAPHITE, [
        [473.15, 6.9e-6],
        [673.15, 6.4e-6],
        [873.15, 6.2e-6],
        [1073.15, 6.3e-6],
        [1473.15, 6.9e-6],
        [1873.15, 7.7e-6],
        [2273.15, 8.5e-6],
      ]),
    ),
    relativePermeability: nonMagnetic("it is diamagnetic by less than 1e-3 (handbook value, from memory)"),
    thermal: {
      density: recalled(1800, 0.06),
      specificHeat: recalled(710, 0.05),
      conductivity: recalled(100, 0.4),
      emissivity: recalled(0.85, 0.1),
    },
    range: { fromKelvin: ROOM, toKelvin: 2273.15, why: "the table ends there" },
  },
  {
    id: "silicon-carbide",
    description: "silicon carbide, recrystallised",
    kind: "nonmetal",
    resistivity: table(
      ...recalledRows(0.7, "order of size: impurities rule it below 600 °C", [
        [ROOM, 4e-3],
        [473.15, 2.5e-3],
        [673.15, 1.5e-3],
        [873.15, 1.1e-3],
        [1073.15, 1e-3],
        [1273.15, 1.02e-3],
        [1473.15, 1.1e-3],
        [1673.15, 1.2e-3],
      ]),
    ),
    relativePermeability: nonMagnetic("it is diamagnetic by about 1e-5 (handbook value, from memory)"),
    thermal: {
      density: recalled(2700, 0.15),
      specificHeat: recalled(680, 0.1),
      conductivity: recalled(30, 0.5),
      emissivity: recalled(0.85, 0.1),
    },
    range: { fromKelvin: ROOM, toKelvin: 1673.15, why: "the table ends there" },
  },
];

/** Molten metals; density as they melt. */
import { nonMagnetic, recalled, recalledRows, table } from "./cite.ts";
import type { MaterialRecord } from "./laws.ts";

const ASSAEL = "M. J. Assael et al., J. Phys. Chem. Ref. Data 35, 285 (2006)";
const LIQUID =
  "K. C. Mills, Recommended values of thermophysical properties for selected commercial alloys (2002)";

export const melts: readonly MaterialRecord[] = [
  {
    id: "molten-aluminium",
    description: "molten aluminium, pure",
    kind: "melt",
    resistivity: table(
      ...recalledRows(0.03, LIQUID, [
        [933.5, 2.48e-7],
        [1273.15, 2.98e-7],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(2377, 0.01, ASSAEL),
      specificHeat: recalled(1180, 0.05),
      conductivity: recalled(91, 0.1),
    },
    range: {
      fromKelvin: 934.15,
      toKelvin: 1273.15,
      why: "it is liquid from 660.3 °C; the table ends at 1000 °C",
    },
  },
  {
    id: "molten-copper",
    description: "molten copper, pure",
    kind: "melt",
    resistivity: table(
      ...recalledRows(0.03, LIQUID, [
        [1357.8, 2.11e-7],
        [1573.15, 2.3e-7],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(7997, 0.01, "M. J. Assael et al., J. Phys. Chem. Ref. Data 39, 033105 (2010)"),
      specificHeat: recalled(495, 0.05),
      conductivity: recalled(160, 0.1),
    },
    range: {
      fromKelvin: 1358.15,
      toKelvin: 1573.15,
      why: "it is liquid from 1084.6 °C; the table ends at 1300 °C",
    },
  },
  {
    id: "molten-iron",
    description: "molten iron, pure",
    kind: "melt",
    resistivity: table(
      ...recalledRows(0.04, LIQUID, [
        [1811, 1.386e-6],
        [1973.15, 1.43e-6],
      ]),
    ),
    relativePermeability: nonMagnetic("far above the Curie point"),
    thermal: {
      density: recalled(7035, 0.01, ASSAEL),
      specificHeat: recalled(820, 0.05),
      conductivity: recalled(35, 0.15),
    },
    range: {
      fromKelvin: 1811.15,
      toKelvin: 1973.15,
      why: "it is liquid from 1538 °C; the table ends at 1700 °C",
    },
  },
];

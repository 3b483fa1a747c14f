/** Iron with carbon and more: plain and alloy steels, stainless, grey cast iron. */
import {
  BISRA,
  fallsAsIron,
  nonMagnetic,
  ROOM,
  read,
  readRows,
  recalled,
  recalledRows,
  table,
} from "./cite.ts";
import type { MaterialRecord, Thermal } from "./laws.ts";

const EN_1993 =
  "EN 1993-1-2:2005, 3.4.1.2, specific heat of carbon steel (formula read in public code that agrees)";
const TEAM_13 =
  "T. Nakata, N. Takahashi, K. Fujiwara, magnetisation curve of the steel of TEAM problems 10 and 13 (read in public code that agrees)";
const MELTS =
  "the table ends there; the mean of heating and cooling through the change of structure between 720 and 850 °C";
const SHAPE = "permeability before hardening; hardened steel has a third to a half of it";

/** Specific heat of carbon steel, J/(kg·K), at `celsius`, by the code's formula. */
function codeHeat(celsius: number): number {
  if (celsius < 600) return 425 + 0.773 * celsius - 1.69e-3 * celsius ** 2 + 2.22e-6 * celsius ** 3;
  if (celsius < 735) return 666 + 13002 / (738 - celsius);
  return celsius < 900 ? 545 + 17820 / (celsius - 731) : 650;
}

/** Where the formula is tabulated, °C: close round its peak of 5000 at 735 °C. */
const heatAt = [
  20, 100, 200, 300, 400, 500, 600, 650, 680, 700, 710, 720, 725, 730, 735, 740, 745, 750, 760, 780, 800, 850,
  900, 1200,
];

const ofCarbonSteel: Thermal = {
  density: recalled(7850, 0.01, "EN 1993-1-2:2005, 3.2.2"),
  specificHeat: table(
    ...readRows(
      EN_1993,
      heatAt.map((t) => [t + 273.15, codeHeat(t)]),
    ),
  ),
  conductivity: table(
    ...recalledRows(0.1, "EN 1993-1-2:2005, 3.4.1.3", [
      [ROOM, 53.334],
      [1073.15, 27.36],
      [1473.15, 27.3],
    ]),
  ),
  emissivity: recalled(0.7, 0.2, "EN 1993-1-2:2005, carbon steel in fire"),
};

export const steels: readonly MaterialRecord[] = [
  {
    id: "mild-steel",
    description: "mild steel, plain carbon, about 0.2 % carbon",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.05, `${BISRA}, 0.23 % C`, [
        [ROOM, 1.69e-7],
        [373.15, 2.19e-7],
        [473.15, 2.92e-7],
        [673.15, 4.87e-7],
        [873.15, 7.58e-7],
        [973.15, 9.25e-7],
        [1073.15, 1.094e-6],
        [1173.15, 1.136e-6],
        [1273.15, 1.167e-6],
        [1473.15, 1.219e-6],
      ]),
    ),
    // B/(µ0 H) of the curve's first point, 0.0025 T at 16 A/m.
    relativePermeability: read(0.0025 / (4e-7 * Math.PI * 16), `${TEAM_13}: 0.0025 T at 16 A/m`),
    magnetism: {
      curie: recalled(1041.15, 0.01, "handbook value, 768 °C"),
      saturation: read(2.16, `${TEAM_13}: B = µ0 H + 2.16 T above 2.22 T`),
      falls: fallsAsIron,
    },
    thermal: ofCarbonSteel,
    range: { fromKelvin: ROOM, toKelvin: 1473.15, why: MELTS },
  },
  {
    id: "carbon-steel",
    description: "carbon steel, plain, about 0.4 % carbon",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.05, `${BISRA}, 0.4 % C`, [
        [ROOM, 1.71e-7],
        [373.15, 2.21e-7],
        [473.15, 2.96e-7],
        [673.15, 4.93e-7],
        [873.15, 7.66e-7],
        [973.15, 9.32e-7],
        [1073.15, 1.111e-6],
        [1173.15, 1.149e-6],
        [1273.15, 1.179e-6],
        [1473.15, 1.227e-6],
      ]),
    ),
    relativePermeability: recalled(100, 0.4, SHAPE),
    magnetism: {
      curie: recalled(1038.15, 0.015, "handbook value, 765 °C"),
      saturation: recalled(2.0, 0.04),
      falls: fallsAsIron,
    },
    thermal: ofCarbonSteel,
    range: { fromKelvin: ROOM, toKelvin: 1473.15, why: MELTS },
  },
  {
    id: "alloy-steel",
    description: "alloy steel, about 0.35 % carbon, 1 % chromium, 0.2 % molybdenum",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.07, `${BISRA}, Cr-Mo steel`, [
        [ROOM, 2.23e-7],
        [373.15, 2.71e-7],
        [473.15, 3.42e-7],
        [673.15, 5.29e-7],
        [873.15, 7.86e-7],
        [1073.15, 1.103e-6],
        [1273.15, 1.177e-6],
        [1473.15, 1.22e-6],
      ]),
    ),
    relativePermeability: recalled(90, 0.4, SHAPE),
    magnetism: {
      curie: recalled(1033.15, 0.015, "handbook value, 760 °C"),
      saturation: recalled(1.95, 0.05),
      falls: fallsAsIron,
    },
    thermal: {
      density: recalled(7830, 0.01),
      specificHeat: recalled(475, 0.05),
      conductivity: recalled(42, 0.1),
      emissivity: recalled(0.8, 0.2, "oxidised, 200 to 600 °C"),
    },
    range: { fromKelvin: ROOM, toKelvin: 1473.15, why: MELTS },
  },
  {
    id: "stainless-steel",
    description: "austenitic stainless steel, 18 % chromium, 8 % nickel",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.05, `${BISRA}, 18 Cr 8 Ni`, [
        [ROOM, 6.94e-7],
        [373.15, 7.76e-7],
        [473.15, 8.5e-7],
        [673.15, 9.76e-7],
        [873.15, 1.072e-6],
        [1073.15, 1.141e-6],
        [1273.15, 1.196e-6],
      ]),
    ),
    relativePermeability: nonMagnetic(
      "annealed it is below 1.02; cold-worked grades reach 1.1 to 2 (from memory)",
    ),
    thermal: {
      density: recalled(7900, 0.02),
      specificHeat: table(
        ...recalledRows(0.05, "EN 1993-1-2:2005, annex C", [
          [ROOM, 455.5],
          [473.15, 495.4],
          [673.15, 524],
          [873.15, 542.2],
          [1073.15, 556.4],
          [1273.15, 573],
        ]),
      ),
      conductivity: table(
        ...recalledRows(0.05, "EN 1993-1-2:2005, annex C", [
          [ROOM, 14.854],
          [1273.15, 27.3],
        ]),
      ),
      emissivity: recalled(0.4, 0.3, "EN 1993-1-2:2005, stainless steel in fire"),
    },
    range: { fromKelvin: ROOM, toKelvin: 1273.15, why: "the table ends there" },
  },
  {
    id: "cast-iron",
    description: "grey cast iron, as cast",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.25, "handbook value; grades run from 0.5 to 1 µΩ·m at 20 °C", [
        [ROOM, 7.5e-7],
        [473.15, 9e-7],
        [673.15, 1.1e-6],
        [873.15, 1.32e-6],
        [1073.15, 1.5e-6],
        [1273.15, 1.56e-6],
      ]),
    ),
    relativePermeability: recalled(120, 0.5),
    magnetism: {
      curie: recalled(1013.15, 0.03, "handbook value, 740 °C"),
      saturation: recalled(1.65, 0.1),
      falls: fallsAsIron,
    },
    thermal: {
      density: recalled(7200, 0.03),
      specificHeat: recalled(490, 0.1),
      conductivity: recalled(50, 0.2),
      emissivity: recalled(0.8, 0.2, "oxidised"),
    },
    range: { fromKelvin: ROOM, toKelvin: 1273.15, why: "grey iron starts to melt at about 1150 °C" },
  },
];

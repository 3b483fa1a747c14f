/** Metals that are not magnetic, copper apart. */
import {
  HANDBOOK,
  MATULA,
  nonMagnetic,
  ROOM,
  read,
  readRows,
  recalled,
  recalledRows,
  TOOLBOX,
  table,
} from "./cite.ts";
import type { MaterialRecord } from "./laws.ts";

const DESAI = "P. D. Desai, H. M. James, C. Y. Ho, J. Phys. Chem. Ref. Data 13, 1131 (1984)";
const EN_1999 = "EN 1999-1-2:2007, aluminium alloys, c = 903 + 0.41 θ";
const ENDS = "the table ends there";

export const nonferrous: readonly MaterialRecord[] = [
  {
    id: "brass",
    description: "brass, 63 % copper",
    kind: "metal",
    resistivity: {
      law: "linear",
      atReference: read(7.1e-8, `${TOOLBOX}: brass, 63 % Cu`),
      reference: read(ROOM, `${TOOLBOX}: 20 °C`),
      perKelvin: read(0.0015, `${TOOLBOX}: brass, 63 % Cu`),
    },
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(8500, 0.03),
      specificHeat: recalled(380, 0.05),
      conductivity: recalled(115, 0.15),
    },
    range: {
      fromKelvin: 253.15,
      toKelvin: 573.15,
      why: "how far a straight line may be drawn from one coefficient: common practice, no source",
    },
  },
  {
    id: "bronze",
    description: "tin bronze, about 8 % tin",
    kind: "metal",
    resistivity: {
      law: "linear",
      atReference: recalled(1.33e-7, 0.15),
      reference: read(ROOM, "20 °C, where the value stands"),
      perKelvin: recalled(0.0007, 0.3),
    },
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(8800, 0.02),
      specificHeat: recalled(377, 0.05),
      conductivity: recalled(65, 0.15),
    },
    range: {
      fromKelvin: 253.15,
      toKelvin: 573.15,
      why: "how far a straight line may be drawn from one coefficient: common practice, no source",
    },
  },
  {
    id: "aluminium",
    description: "aluminium, pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.02, DESAI, [[273, 2.417e-8]]),
      ...readRows(`${TOOLBOX}: aluminium at 20 °C`, [[ROOM, 2.65e-8]]),
      ...recalledRows(0.02, DESAI, [
        [400, 3.87e-8],
        [500, 4.99e-8],
        [600, 6.13e-8],
        [700, 7.35e-8],
        [800, 8.7e-8],
        [900, 1.018e-7],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(2700, 0.01),
      specificHeat: table(
        ...recalledRows(0.03, EN_1999, [
          [ROOM, 911.2],
          [473.15, 985],
          [673.15, 1067],
          [773.15, 1108],
        ]),
      ),
      conductivity: recalled(237, 0.05, HANDBOOK),
      emissivity: recalled(0.08, 0.5, "bare"),
    },
    range: { fromKelvin: 273.15, toKelvin: 893.15, why: "the table ends near it; aluminium melts at 660 °C" },
  },
  {
    id: "silver",
    description: "silver, pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.02, MATULA, [
        [273, 1.467e-8],
        [293, 1.587e-8],
        [300, 1.629e-8],
        [400, 2.241e-8],
        [500, 2.87e-8],
        [600, 3.53e-8],
        [700, 4.21e-8],
        [800, 4.91e-8],
        [900, 5.64e-8],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(10490, 0.01, HANDBOOK),
      specificHeat: recalled(235, 0.03, HANDBOOK),
      conductivity: recalled(429, 0.03, HANDBOOK),
      emissivity: recalled(0.03, 0.5, "polished"),
    },
    range: { fromKelvin: 273.15, toKelvin: 873.15, why: ENDS },
  },
  {
    id: "gold",
    description: "gold, pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.02, MATULA, [
        [273, 2.051e-8],
        [293, 2.214e-8],
        [300, 2.271e-8],
        [400, 3.107e-8],
        [500, 3.97e-8],
        [600, 4.87e-8],
        [700, 5.82e-8],
        [800, 6.81e-8],
        [900, 7.86e-8],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(19300, 0.01, HANDBOOK),
      specificHeat: recalled(129, 0.03, HANDBOOK),
      conductivity: recalled(317, 0.03, HANDBOOK),
      emissivity: recalled(0.03, 0.5, "polished"),
    },
    range: { fromKelvin: 273.15, toKelvin: 873.15, why: ENDS },
  },
  {
    id: "titanium",
    description: "titanium, commercially pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(
        0.15,
        "handbook value; pure metal is a fifth lower, the alloy with 6 % aluminium three times as high",
        [
          [ROOM, 5.5e-7],
          [473.15, 8.4e-7],
          [673.15, 1.12e-6],
          [873.15, 1.36e-6],
          [1073.15, 1.53e-6],
        ],
      ),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(4510, 0.01),
      specificHeat: recalled(520, 0.05),
      conductivity: recalled(17, 0.15),
    },
    range: {
      fromKelvin: ROOM,
      toKelvin: 1073.15,
      why: "the table ends below the change of structure at about 880 °C",
    },
  },
  {
    id: "tungsten",
    description: "tungsten, pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.04, HANDBOOK, [
        [273, 4.82e-8],
        [293, 5.28e-8],
        [300, 5.44e-8],
        [400, 7.83e-8],
        [500, 1.03e-7],
        [600, 1.3e-7],
        [700, 1.57e-7],
        [800, 1.86e-7],
        [900, 2.15e-7],
        [1200, 3.05e-7],
        [2000, 5.7e-7],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(19250, 0.01, HANDBOOK),
      specificHeat: recalled(132, 0.04, HANDBOOK),
      conductivity: recalled(173, 0.04, HANDBOOK),
    },
    range: { fromKelvin: 273.15, toKelvin: 1973.15, why: ENDS },
  },
  {
    id: "molybdenum",
    description: "molybdenum, pure",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.05, HANDBOOK, [
        [273, 4.85e-8],
        [293, 5.34e-8],
        [300, 5.52e-8],
        [400, 8.02e-8],
        [500, 1.06e-7],
        [600, 1.31e-7],
        [700, 1.58e-7],
        [800, 1.84e-7],
        [900, 2.12e-7],
        [1200, 2.96e-7],
        [1600, 4.13e-7],
        [2000, 5.35e-7],
      ]),
    ),
    relativePermeability: nonMagnetic(),
    thermal: {
      density: recalled(10220, 0.01, HANDBOOK),
      specificHeat: recalled(251, 0.04, HANDBOOK),
      conductivity: recalled(138, 0.04, HANDBOOK),
    },
    range: { fromKelvin: 273.15, toKelvin: 1973.15, why: ENDS },
  },
  {
    id: "nickel-alloy",
    description: "nickel alloy, with chromium and molybdenum, UNS N06625",
    kind: "metal",
    resistivity: table(
      ...recalledRows(0.03, "makers' data sheets of UNS N06625", [
        [ROOM, 1.29e-6],
        [366.15, 1.32e-6],
        [477.15, 1.34e-6],
        [589.15, 1.35e-6],
        [700.15, 1.36e-6],
        [811.15, 1.38e-6],
        [922.15, 1.38e-6],
        [1033.15, 1.37e-6],
        [1144.15, 1.36e-6],
        [1255.15, 1.35e-6],
      ]),
    ),
    relativePermeability: nonMagnetic("the alloy is paramagnetic, about 1.0006 (maker's data, from memory)"),
    thermal: {
      density: recalled(8440, 0.01),
      specificHeat: recalled(410, 0.05),
      conductivity: recalled(9.8, 0.1),
    },
    range: { fromKelvin: ROOM, toKelvin: 1253.15, why: "the table ends near it" },
  },
];

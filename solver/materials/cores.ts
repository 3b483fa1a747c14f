/** What steers the flux: magnetic and practically not conducting. Taken as isotropic, and as the same at every frequency. */
import { fallsAsIron, ROOM, recalled, recalledRows, table } from "./cite.ts";
import type { MaterialRecord } from "./laws.ts";

const FERRITE = "order of size of manganese-zinc power ferrites";
const POWDER = "order of size of pressed iron powder for induction heating; grades run from 10 to 120";
const LAMINATED =
  "order of size of stacked silicon iron of 0.2 mm, field along the sheets, below about 3 kHz";

export const cores: readonly MaterialRecord[] = [
  {
    id: "ferrite",
    description: "ferrite, manganese-zinc power grades",
    kind: "core",
    resistivity: null,
    relativePermeability: recalled(2200, 0.25, FERRITE),
    magnetism: {
      curie: recalled(488.15, 0.03, `${FERRITE}, 215 °C`),
      saturation: recalled(0.48, 0.1, FERRITE),
      falls: {
        law: "tables",
        permeability: table(
          ...recalledRows(0.3, FERRITE, [
            [ROOM, 2200],
            [373.15, 3600],
            [473.15, 4200],
            [488.15, 1],
          ]),
        ),
        saturation: table(
          ...recalledRows(0.15, FERRITE, [
            [ROOM, 0.48],
            [373.15, 0.39],
            [473.15, 0.2],
            [488.15, 0],
          ]),
        ),
      },
    },
    lossTangent: recalled(0.01, 0.7, `${FERRITE}, low field, 100 kHz`),
    thermal: {
      density: recalled(4800, 0.03),
      specificHeat: recalled(750, 0.1),
      conductivity: recalled(4, 0.3),
    },
    range: {
      fromKelvin: ROOM,
      toKelvin: 573.15,
      why: "of no use as a core beyond: its Curie point is passed",
    },
  },
  {
    id: "iron-powder",
    description: "pressed iron powder, bound and insulated",
    kind: "core",
    resistivity: null,
    relativePermeability: recalled(40, 0.3, POWDER),
    magnetism: {
      curie: recalled(1043.15, 0.005, "Curie point of iron, 770 °C, handbook value"),
      saturation: recalled(1.4, 0.15, POWDER),
      falls: fallsAsIron,
    },
    lossTangent: recalled(0.01, 0.7, `${POWDER}, low field, 10 kHz`),
    thermal: {
      density: recalled(6500, 0.1),
      specificHeat: recalled(450, 0.1),
      conductivity: recalled(15, 0.5),
    },
    range: {
      fromKelvin: ROOM,
      toKelvin: 473.15,
      why: "the binder lasts no further (common practice, no source)",
    },
  },
  {
    id: "laminated-iron",
    description: "laminated iron, silicon-iron sheets of 0.2 mm, below about 3 kHz",
    kind: "core",
    resistivity: null,
    relativePermeability: recalled(700, 0.5, LAMINATED),
    magnetism: {
      curie: recalled(1013.15, 0.01, "3 % silicon iron, 740 °C, handbook value"),
      saturation: recalled(1.95, 0.05, LAMINATED),
      falls: fallsAsIron,
    },
    lossTangent: recalled(0.1, 0.7, LAMINATED),
    thermal: {
      density: recalled(7500, 0.03),
      specificHeat: recalled(460, 0.05),
      conductivity: recalled(25, 0.3),
    },
    range: {
      fromKelvin: ROOM,
      toKelvin: 473.15,
      why: "the varnish lasts no further (common practice, no source)",
    },
  },
];

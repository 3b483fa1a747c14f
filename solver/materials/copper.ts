/** Annealed copper, the conductor of every coil until told otherwise. */
import { HANDBOOK, MATULA, recalled } from "./cite.ts";
import type { MaterialRecord } from "./laws.ts";

const IEC_60028 = "IEC 60028:1925, International standard of resistance for copper";

export const copper: MaterialRecord = {
  id: "copper",
  description: "copper, annealed, of 100 % standard conductivity",
  kind: "metal",
  resistivity: {
    law: "linear",
    atReference: { value: 1e-6 / 58, source: `${IEC_60028}: 1/58 µΩ·m at 20 °C` },
    reference: { value: 293.15, source: `${IEC_60028}: 20 °C` },
    perKelvin: { value: 0.00393, source: `${IEC_60028}: 0.00393 per K at 20 °C, constant mass` },
  },
  relativePermeability: {
    value: 1,
    source: "taken as 1: the susceptibility of copper is about −1e-5 (handbook value, from memory)",
  },
  thermal: {
    density: recalled(8960, 0.01, HANDBOOK),
    specificHeat: recalled(385, 0.03, HANDBOOK),
    conductivity: recalled(398, 0.03, HANDBOOK),
    emissivity: recalled(0.04, 0.5, "polished"),
  },
  range: {
    fromKelvin: 223.15,
    toKelvin: 523.15,
    why: `the straight line of IEC 60028 stays within 2 % of measured copper between −50 and 250 °C (${MATULA}, table values from memory); beyond, copper bends away from it`,
  },
};

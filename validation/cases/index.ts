/** Every check, in the order of the report. */
import type { Check } from "../check.ts";
import { coilOverPlate } from "./coil-over-plate.ts";
import { coilRoundRod } from "./coil-round-rod.ts";
import { cylinderAxialField } from "./cylinder-axial-field.ts";
import { ringInductance } from "./ring-inductance.ts";
import { solenoidInductance } from "./solenoid-inductance.ts";
import { sphereUniformField } from "./sphere-uniform-field.ts";
import { wireRow } from "./wire-row.ts";

export const CHECKS: readonly Check[] = [
  ringInductance,
  solenoidInductance,
  wireRow,
  cylinderAxialField,
  sphereUniformField,
  coilOverPlate,
  coilRoundRod,
];

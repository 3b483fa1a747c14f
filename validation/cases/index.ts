/** Every check, in the order of the report. */
import type { Check } from "../check.ts";
import { coaxialRings } from "./coaxial-rings.ts";
import { coilOverPlate } from "./coil-over-plate.ts";
import { coilRoundRod } from "./coil-round-rod.ts";
import { convergenceOrder } from "./convergence-order.ts";
import { cylinderAxialField } from "./cylinder-axial-field.ts";
import { independentScheme } from "./independent-scheme.ts";
import { openCases } from "./open-cases.ts";
import { ringInductance } from "./ring-inductance.ts";
import { ringStackLimit } from "./ring-stack-limit.ts";
import { solenoidInductance } from "./solenoid-inductance.ts";
import { sphereUniformField } from "./sphere-uniform-field.ts";
import { straightConductorSkin } from "./straight-conductor-skin.ts";
import { wireRow } from "./wire-row.ts";

export const CHECKS: readonly Check[] = [
  ringInductance,
  solenoidInductance,
  coaxialRings,
  ringStackLimit,
  straightConductorSkin,
  wireRow,
  cylinderAxialField,
  sphereUniformField,
  coilOverPlate,
  coilRoundRod,
  openCases,
  independentScheme,
  convergenceOrder,
];

/** Every check, in the order of the report. */
import type { Check } from "../check.ts";
import { ringInductance } from "./ring-inductance.ts";
import { solenoidInductance } from "./solenoid-inductance.ts";
import { wireRow } from "./wire-row.ts";

export const CHECKS: readonly Check[] = [ringInductance, solenoidInductance, wireRow];

/** From the coil per ampere to the coil at work: the drive's current, powers, voltage and what the tank must give. */
import type { Power, Terminal } from "./result.ts";
import type { Drive } from "./scene.ts";
import { magnitude, plus, product, ratio, root, sure, times, type Uncertain } from "./uncertain.ts";

/** Loss per ampere squared (W/A² = Ω) of coil (leads included), heated and other pieces, and reactance, Ω. */
export interface PerAmpere {
  readonly resistance: Uncertain;
  readonly reactance: Uncertain;
  readonly coil: Uncertain;
  readonly heated: Uncertain;
  readonly other: Uncertain;
}

/** Terminal values from R and X at angular frequency omega. */
export function terminal(resistance: Uncertain, reactance: Uncertain, omega: number): Terminal {
  return {
    resistanceOhm: resistance,
    inductanceH: times(1 / omega, reactance),
    reactanceOhm: reactance,
    q: ratio(reactance, resistance),
  };
}

/** Current through the terminals, A rms. */
export function currentOf(drive: Drive, coil: PerAmpere): Uncertain {
  if (drive.kind === "current") return sure(drive.ampere);
  if (drive.kind === "power") return root(ratio(sure(drive.watt), coil.heated));
  return ratio(sure(drive.volt), magnitude(coil.resistance, coil.reactance));
}

/** Powers and drive at work. What the drive fixes is exact. */
export function powerAt(drive: Drive, coil: PerAmpere, omega: number): Power {
  const current = currentOf(drive, coil);
  const square = product(current, current);
  const fixed = drive.kind === "power";
  // Efficiency from heated against the rest: an error of the heated power is in the total as well.
  const efficiency = shareOf(coil.heated, plus(coil.coil, coil.other));
  return {
    totalW: fixed ? ratio(sure(drive.watt), efficiency) : product(square, coil.resistance),
    coilW: product(square, coil.coil),
    heatedW: fixed ? sure(drive.watt) : product(square, coil.heated),
    otherW: product(square, coil.other),
    efficiency,
    currentA: current,
    coilVoltageV:
      drive.kind === "voltage"
        ? sure(drive.volt)
        : product(current, magnitude(coil.resistance, coil.reactance)),
    reactiveVar: product(square, coil.reactance),
    resonantCapacitanceF: ratio(sure(1 / omega), coil.reactance),
  };
}

/** a / (a + b) with da and db independent. */
function shareOf(a: Uncertain, b: Uncertain): Uncertain {
  const total = a.value + b.value;
  if (total === 0) return sure(0);
  const moved = b.value * a.plusMinus + a.value * b.plusMinus;
  return { value: a.value / total, plusMinus: moved / total ** 2 };
}

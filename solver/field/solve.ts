/**
 * The field of a coil that carries 1 A rms in all, and its impedance.
 *
 * A [ψ; u] = [0; μ0 c_k I_p] for every path p, c_k = ±1 the sense of the turns on it. V_p = 2πjω Σ_{k on p} c_k u_k gives
 * the path impedances Z_pq; parallel paths share one voltage, Z I = V 1, Σ I_p = 1.
 */
import { Matrix, solve as solveDense } from "ml-matrix";
import { MU0 } from "../constants.ts";
import { SolverError } from "../errors.ts";
import { type Factor, factorise, solveRefined } from "../linear/direct.ts";
import type { ElementValues } from "../linear/structure.ts";
import type { Circuit, Complex, ComplexVector } from "../types.ts";
import type { CoilSolution, Folded, Prepared, Tick } from "./prepare.ts";
import { checkState, elementValues, type FieldState } from "./system.ts";

/** One matrix, factorised. */
export interface Factorised {
  readonly values: ElementValues;
  readonly factor: Factor;
}

/** Parts of the whole time spent before and after the factorisation, for `tick`. */
const BEFORE = 0.1;
const AFTER = 0.9;

/** Matrix of a state and its factor. Throws SolverError `materials`, `singular`; whatever `tick` throws. */
export function factoriseState(prepared: Prepared, state: FieldState, tick?: Tick): Factorised {
  checkState(prepared.system, prepared.grid, state);
  tick?.(0);
  const values = elementValues(prepared.system, prepared.grid, prepared.integrals, state);
  tick?.(BEFORE);
  const factor = factorise(prepared.analysis, values, (f) => tick?.(BEFORE + (AFTER - BEFORE) * f));
  return { values, factor };
}

/**
 * Field of 1 A rms through the coil (total over parallel paths), its impedance and currents. `state.materials` by region,
 * `state.omega` in rad/s. Throws SolverError `circuit` when the circuit does not fit the prepared turns.
 */
export function solveState(
  prepared: Prepared | Folded,
  state: FieldState,
  circuit: Circuit,
  tick?: Tick,
): CoilSolution {
  const paths = checkCircuit(circuit, prepared.system.turns);
  const { solved, own, turnOf, share } = equationsOf(prepared, state);
  const { values, factor } = factoriseState(solved, own, tick);
  const { structure, nodal } = solved.system;
  const n = structure.unknowns;
  const fields: Field[] = [];
  let residual = 0;
  for (let p = 0; p < paths; p++) {
    tick?.(AFTER + ((1 - AFTER) * p) / paths);
    const rhs = { re: new Float64Array(n), im: new Float64Array(n) };
    for (let k = 0; k < circuit.turns; k++)
      if (circuit.path[k] === p) rhs.re[nodal + turnOf[k]] = MU0 * circuit.sense[k] * share[turnOf[k]];
    const refined = solveRefined(factor, values, rhs);
    residual = Math.max(residual, refined.residual);
    fields.push(fieldAt(prepared, refined.x));
  }
  const pathImpedances = impedancesOf(fields, circuit, state.omega);
  const { impedance, currents } = shareCurrent(pathImpedances, paths);
  const psi = superpose(
    fields.map((f) => f.psi),
    currents,
  );
  const u = superpose(
    fields.map((f) => f.u),
    currents,
  );
  tick?.(1);
  return {
    prepared,
    ...conditions(state),
    psi,
    u,
    applied: 0,
    residual,
    impedance,
    pathCurrents: currents,
    turnCurrents: turnCurrents(circuit, currents),
    pathImpedances,
  };
}

/** What is solved: a state of the grid, or of its half; per turn its number there, and how much of it is there. */
function equationsOf(
  prepared: Prepared | Folded,
  state: FieldState,
): { solved: Prepared; own: FieldState; turnOf: Int32Array; share: Float64Array } {
  if (!("half" in prepared)) {
    const { turns } = prepared.system;
    const turnOf = Int32Array.from({ length: turns }, (_, k) => k);
    return { solved: prepared, own: state, turnOf, share: new Float64Array(turns).fill(1) };
  }
  const { half, turnOf, share } = prepared;
  if (state.cellReluctivity !== undefined)
    throw new SolverError("materials", "ν cell by cell needs the whole grid");
  const materials = state.materials.map((m) => (m.turn < 0 ? m : { ...m, turn: turnOf[m.turn] }));
  return { solved: half, own: { materials, omega: state.omega }, turnOf, share };
}

/** ψ by node of the whole grid, u by turn. */
interface Field {
  readonly psi: ComplexVector;
  readonly u: ComplexVector;
}

/** A solution of the equations, read at every node and turn; unfolded where they are those of the half. */
function fieldAt(prepared: Prepared | Folded, x: ComplexVector): Field {
  const folded = "half" in prepared;
  const { unknownOfNode, nodal } = folded ? prepared.half.system : prepared.system;
  const nodes = prepared.grid.r.length;
  const { turns } = prepared.system;
  const psi = { re: new Float64Array(nodes), im: new Float64Array(nodes) };
  for (let i = 0; i < nodes; i++) {
    const unknown = unknownOfNode[folded ? prepared.nodeOf[i] : i];
    if (unknown < 0) continue;
    psi.re[i] = x.re[unknown];
    psi.im[i] = x.im[unknown];
  }
  const u = { re: new Float64Array(turns), im: new Float64Array(turns) };
  for (let k = 0; k < turns; k++) {
    const at = nodal + (folded ? prepared.turnOf[k] : k);
    u.re[k] = x.re[at];
    u.im[k] = x.im[at];
  }
  return { psi, u };
}

/** The state a solution belongs to. */
function conditions({ materials, omega, cellReluctivity }: FieldState): FieldState {
  return { materials, omega, ...(cellReluctivity === undefined ? {} : { cellReluctivity }) };
}

/** The parts every solution of whole equations has: the state, ψ by node, u by turn. */
export function fieldOf(
  prepared: Prepared,
  state: FieldState,
  x: ComplexVector,
): Field & FieldState & { prepared: Prepared } {
  return { prepared, ...conditions(state), ...fieldAt(prepared, x) };
}

/** Number of paths. */
function checkCircuit(circuit: Circuit, turns: number): number {
  const { path, sense } = circuit;
  if (turns === 0 || circuit.turns !== turns || path.length !== turns || sense.length !== turns)
    throw new SolverError("circuit", `the grid has ${turns} turns, the circuit ${circuit.turns}`);
  const paths = Math.max(...path) + 1;
  for (let p = 0; p < paths; p++)
    if (!path.includes(p)) throw new SolverError("circuit", `path ${p} carries no turn`);
  return paths;
}

/** Z_pq = 2πjω Σ_{k on p} c_k u_k of the field of 1 A in path q. */
function impedancesOf(fields: readonly Field[], circuit: Circuit, omega: number): ComplexVector {
  const paths = fields.length;
  const z = { re: new Float64Array(paths * paths), im: new Float64Array(paths * paths) };
  fields.forEach(({ u }, q) => {
    for (let k = 0; k < circuit.turns; k++) {
      const at = circuit.path[k] * paths + q;
      z.re[at] -= 2 * Math.PI * omega * circuit.sense[k] * u.im[k];
      z.im[at] += 2 * Math.PI * omega * circuit.sense[k] * u.re[k];
    }
  });
  return z;
}

/** Z y = 1 as a real system of twice the size; I = y/Σy, V = 1/Σy. */
function shareCurrent(z: ComplexVector, paths: number): { impedance: Complex; currents: ComplexVector } {
  if (paths === 1)
    return {
      impedance: { re: z.re[0], im: z.im[0] },
      currents: { re: Float64Array.of(1), im: Float64Array.of(0) },
    };
  const block = Matrix.zeros(2 * paths, 2 * paths);
  const ones = Matrix.zeros(2 * paths, 1);
  for (let p = 0; p < paths; p++) {
    ones.set(p, 0, 1);
    for (let q = 0; q < paths; q++) {
      const at = p * paths + q;
      block.set(p, q, z.re[at]);
      block.set(p, paths + q, -z.im[at]);
      block.set(paths + p, q, z.im[at]);
      block.set(paths + p, paths + q, z.re[at]);
    }
  }
  const y = solveDense(block, ones).to1DArray();
  let sumRe = 0;
  let sumIm = 0;
  for (let p = 0; p < paths; p++) {
    sumRe += y[p];
    sumIm += y[paths + p];
  }
  const size = sumRe * sumRe + sumIm * sumIm;
  const impedance = { re: sumRe / size, im: -sumIm / size };
  const currents = { re: new Float64Array(paths), im: new Float64Array(paths) };
  for (let p = 0; p < paths; p++) {
    currents.re[p] = y[p] * impedance.re - y[paths + p] * impedance.im;
    currents.im[p] = y[p] * impedance.im + y[paths + p] * impedance.re;
  }
  return { impedance, currents };
}

/** Σ_p I_p x_p. */
function superpose(fields: readonly ComplexVector[], currents: ComplexVector): ComplexVector {
  if (fields.length === 1) return fields[0];
  const n = fields[0].re.length;
  const sum = { re: new Float64Array(n), im: new Float64Array(n) };
  fields.forEach((x, p) => {
    const a = currents.re[p];
    const b = currents.im[p];
    for (let i = 0; i < n; i++) {
      sum.re[i] += a * x.re[i] - b * x.im[i];
      sum.im[i] += a * x.im[i] + b * x.re[i];
    }
  });
  return sum;
}

function turnCurrents(circuit: Circuit, currents: ComplexVector): ComplexVector {
  const out = { re: new Float64Array(circuit.turns), im: new Float64Array(circuit.turns) };
  for (let k = 0; k < circuit.turns; k++) {
    out.re[k] = circuit.sense[k] * currents.re[circuit.path[k]];
    out.im[k] = circuit.sense[k] * currents.im[circuit.path[k]];
  }
  return out;
}

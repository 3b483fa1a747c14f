/** A = Σ_e P_eᵀ A_e P_e: the pattern and the values of a complex symmetric matrix given by its elements, never assembled. */
import { SolverError } from "../errors.ts";

/** Which unknowns each element couples, and where it lies. */
export interface ElementStructure {
  /** Number of unknowns; every unknown belongs to at least one element. */
  readonly unknowns: number;
  /** Length elements + 1: element e owns ids[start[e]] … ids[start[e+1] − 1]. */
  readonly start: Int32Array;
  /** Unknown ids, each in 0 … unknowns − 1, none twice inside one element. */
  readonly ids: Int32Array;
  /** A representative point per element, any unit: a hint for the ordering, without influence on the solution. */
  readonly x: Float64Array;
  readonly y: Float64Array;
}

/** Packed lower triangles by rows (a00, a10, a11, a20, …), m(m+1)/2 numbers for an element of m unknowns, element after element. */
export interface ElementValues {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** A chain of elements of two unknowns each, at points without order. */
export function chain(elements: number): ElementStructure {
  return {
    unknowns: elements + 1,
    start: Int32Array.from({ length: elements + 1 }, (_, e) => 2 * e),
    ids: Int32Array.from({ length: 2 * elements }, (_, i) => (i + 1) >> 1),
    x: Float64Array.from({ length: elements }, (_, e) => (e * 37) % elements),
    y: Float64Array.from({ length: elements }, (_, e) => (e * 61) % elements),
  };
}

/** Throws SolverError `structure` unless the arrays describe a matrix without empty rows. */
export function checkStructure(structure: ElementStructure): void {
  const { unknowns, start, ids, x, y } = structure;
  const elements = start.length - 1;
  if (elements < 0 || start[0] !== 0 || start[elements] !== ids.length)
    throw fault(`start must run from 0 to the ${ids.length} ids`);
  if (x.length !== elements || y.length !== elements)
    throw fault(`${elements} elements need as many points, got ${x.length} and ${y.length}`);
  const lastElement = new Int32Array(unknowns).fill(-1);
  for (let e = 0; e < elements; e++) {
    if (start[e + 1] < start[e]) throw fault(`start falls at element ${e}`);
    if (!Number.isFinite(x[e] + y[e])) throw fault(`the point of element ${e} is not finite`);
    for (let i = start[e]; i < start[e + 1]; i++) {
      const v = ids[i];
      if (!(v >= 0 && v < unknowns)) throw fault(`element ${e} names unknown ${v} of ${unknowns}`);
      if (lastElement[v] === e) throw fault(`element ${e} names unknown ${v} twice`);
      lastElement[v] = e;
    }
  }
  const missing = lastElement.indexOf(-1);
  if (missing >= 0) throw fault(`unknown ${missing} belongs to no element`);
}

/** Throws SolverError `structure` unless there are `count` values. */
export function checkValues(values: ElementValues, count: number): void {
  if (values.re.length !== count || values.im.length !== count)
    throw fault(`expected ${count} values, got ${values.re.length} and ${values.im.length}`);
}

function fault(message: string): SolverError {
  return new SolverError("structure", message);
}

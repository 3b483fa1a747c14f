/** What a check is: inputs and expected figures from a named source, computed figures from the project, row by row. */

/**
 * Factors on the constants a check is computed with; all 1 in truth. Each check names a spoiled set that must turn it red.
 * Only what the solver is given is spoiled, never the expected figures.
 */
export interface Constants {
  readonly conductivity: number;
  readonly permeability: number;
  readonly length: number;
}

export const TRUE: Constants = { conductivity: 1, permeability: 1, length: 1 };

/** One figure. `difference`, `bar` and `tolerance` are relative to `expected` (or absolute where the row says so). */
export interface Row {
  readonly name: string;
  readonly source: string;
  readonly expected: number;
  readonly computed: number;
  readonly difference: number;
  /** The project's own error bar; null where the figure has none. */
  readonly bar: number | null;
  readonly tolerance: number;
  readonly passed: boolean;
}

export interface Check {
  /** File name without its end. */
  readonly id: string;
  readonly title: string;
  /** What is computed, on which grids, and how it relates to the source's case. */
  readonly method: string;
  /** Where the tolerance comes from. */
  readonly why: string;
  /** Constants that must turn at least one row red. */
  readonly spoiled: Constants;
  /** The check in pieces that can be run by themselves, in the report's order. */
  readonly pieces: readonly ((constants: Constants) => Row[])[];
}

/** All rows of a check. */
export function rowsOf(check: Check, constants: Constants): Row[] {
  return check.pieces.flatMap((piece) => piece(constants));
}

/** Whether any piece turns red; stops at the first that does. */
export function turnsRed(check: Check, constants: Constants): boolean {
  return check.pieces.some((piece) => piece(constants).some((row) => !row.passed));
}

/** A figure with the project's own error bar (same unit), if it has one. */
export interface Figure {
  readonly value: number;
  readonly bar: number | null;
}

/** A row whose tolerance is relative to the expected figure. */
export function relativeRow(
  name: string,
  source: string,
  expected: number,
  got: Figure,
  tolerance: number,
): Row {
  const scale = Math.abs(expected);
  const difference = (got.value - expected) / scale;
  return {
    name,
    source,
    expected,
    computed: got.value,
    difference,
    bar: got.bar === null ? null : got.bar / scale,
    tolerance,
    passed: Math.abs(difference) <= tolerance,
  };
}

/** A row compared in the figure's own unit: shares and coefficients that may be near 0. */
export function absoluteRow(
  name: string,
  source: string,
  expected: number,
  got: Figure,
  tolerance: number,
): Row {
  const difference = got.value - expected;
  const passed = Math.abs(difference) <= tolerance;
  return {
    name: `${name} (absolute)`,
    source,
    expected,
    computed: got.value,
    difference,
    bar: got.bar,
    tolerance,
    passed,
  };
}

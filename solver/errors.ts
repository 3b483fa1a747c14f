/** A fault the solver can name. `code` is stable and machine-readable; `message` is for people. */
export class SolverError extends Error {
  readonly code: string;

  constructor(code: string, message: string) {
    super(message);
    this.name = "SolverError";
    this.code = code;
  }
}

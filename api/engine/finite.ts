/** JSON has no NaN and would print null for it: better to fail than to hand out a hole. */

/** @throws Error naming the first number of `value` that is none; `pointer` is where `value` stands. */
export function demandNumbers(value: unknown, pointer = ""): void {
  if (typeof value === "number" && !Number.isFinite(value)) {
    throw new Error(`the result has no number at ${pointer}`);
  }
  if (typeof value !== "object" || value === null) return;
  for (const [key, inner] of Object.entries(value)) demandNumbers(inner, `${pointer}/${key}`);
}

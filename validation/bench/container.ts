/**
 * Typed arrays in one file, for processes that speak different languages. Little-endian:
 * one float64 with the number of arrays; per array two float64, its kind (0 int32, 1 float64) and length; then the arrays one after another.
 */
import { closeSync, openSync, readFileSync, writeSync } from "node:fs";

type Numbers = Int32Array | Float64Array;

/** Writes the arrays, in their order. */
export function writeArrays(path: string, arrays: readonly Numbers[]): void {
  const head = arrays.flatMap((a) => [a instanceof Int32Array ? 0 : 1, a.length]);
  const file = openSync(path, "w");
  try {
    for (const array of [Float64Array.of(arrays.length, ...head), ...arrays]) writeWhole(file, array);
  } finally {
    closeSync(file);
  }
}

/** One call may write less than asked: Linux stops at 2 GiB. */
function writeWhole(file: number, array: Numbers): void {
  const bytes = new Uint8Array(array.buffer, array.byteOffset, array.byteLength);
  let done = 0;
  while (done < bytes.length) done += writeSync(file, bytes, done);
}

/** The arrays of a file. @throws RangeError when the file is not as its head says. */
export function readArrays(path: string): Numbers[] {
  const bytes = readFileSync(path);
  const count = bytes.readDoubleLE(0);
  let at = 8 * (1 + 2 * count);
  const arrays = Array.from({ length: count }, (_, i) => {
    const kind = bytes.readDoubleLE(8 + 16 * i);
    const length = bytes.readDoubleLE(16 + 16 * i);
    const size = kind === 0 ? 4 : 8;
    const own = new Uint8Array(bytes.subarray(at, at + size * length)).buffer;
    at += size * length;
    return kind === 0 ? new Int32Array(own) : new Float64Array(own);
  });
  if (at !== bytes.length) throw new RangeError(`${path}: expected ${at} bytes, got ${bytes.length}`);
  return arrays;
}

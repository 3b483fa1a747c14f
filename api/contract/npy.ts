/**
 * NumPy's .npy file, version 1.0 (NEP 1, and numpy.lib.format's description):
 *
 *   \x93NUMPY, 1, 0, header length as uint16, header, data
 *
 * The header is a Python dictionary { 'descr', 'fortran_order', 'shape' } in ASCII, padded with spaces and closed by a line feed so that the data begins at
 * a multiple of 64. Data little endian in C order: '<f8', or '<c16' as pairs re, im. Runs in browsers as in Node.
 */

const MAGIC = [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59, 1, 0];
const HEADER_AT = 10;
const ALIGNMENT = 64;

/** The file of an array of this shape; complex where `im` is there. @throws RangeError when lengths and shape differ */
export function encodeNpy(
  shape: readonly number[],
  re: Float64Array,
  im: Float64Array | null = null,
): Uint8Array<ArrayBuffer> {
  const size = shape.reduce((a, b) => a * b, 1);
  if (re.length !== size || (im !== null && im.length !== size)) {
    throw new RangeError(`${re.length} numbers do not fill shape (${shape.join(", ")})`);
  }
  const header = headerOf(im === null ? "<f8" : "<c16", shape);
  const first = HEADER_AT + header.length;
  const bytes = new Uint8Array(first + 8 * size * (im === null ? 1 : 2));
  const view = new DataView(bytes.buffer);
  bytes.set(MAGIC);
  view.setUint16(MAGIC.length, header.length, true);
  bytes.set(new TextEncoder().encode(header), HEADER_AT);
  const stride = im === null ? 8 : 16;
  re.forEach((x, i) => {
    view.setFloat64(first + stride * i, x, true);
  });
  im?.forEach((y, i) => {
    view.setFloat64(first + stride * i + 8, y, true);
  });
  return bytes;
}

function headerOf(descr: string, shape: readonly number[]): string {
  const tuple = shape.length === 1 ? `(${shape[0]},)` : `(${shape.join(", ")})`;
  const text = `{'descr': '${descr}', 'fortran_order': False, 'shape': ${tuple}, }`;
  const length = Math.ceil((HEADER_AT + text.length + 1) / ALIGNMENT) * ALIGNMENT - HEADER_AT;
  return `${text.padEnd(length - 1)}\n`;
}

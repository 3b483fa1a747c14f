/**
 * One binary file for a JSON header and typed arrays. Little endian, as is every platform this runs on:
 *
 *   0  8 bytes  magic "emberbin"
 *   8  uint32   version, 1
 *   12 uint32   length of the header, padding included
 *   16 header   JSON in UTF-8, padded with spaces to a multiple of 8: { kind, meta, arrays: [{ name, type, length }] }
 *   …  arrays   in the header's order, each padded with zeros to a multiple of 8
 *
 * so that arrays are read as views, without a copy. Runs in browsers as in Node.
 */

const MAGIC = "emberbin";
const VERSION = 1;
const HEADER_AT = 16;
const ALIGNMENT = 8;

/** The arrays a file may hold, by name. */
interface ArrayTypes {
  readonly Float64Array: Float64Array;
  readonly Float32Array: Float32Array;
  readonly Uint32Array: Uint32Array;
  readonly Uint16Array: Uint16Array;
}
type ArrayType = keyof ArrayTypes;
export type PackedArray = ArrayTypes[ArrayType];

const arrayTypes: { readonly [T in ArrayType]: ArrayMaker<ArrayTypes[T]> } = {
  Float64Array,
  Float32Array,
  Uint32Array,
  Uint16Array,
};

interface ArrayMaker<T> {
  readonly BYTES_PER_ELEMENT: number;
  new (buffer: ArrayBufferLike, byteOffset: number, length: number): T;
}

/** A file, read. */
interface Unpacked {
  readonly meta: unknown;
  /** @throws ContainerError `header` when there is none of this name and type */
  readonly array: <T extends ArrayType>(name: string, type: T) => ArrayTypes[T];
}

/** What a file cannot be read for. */
export type ContainerFault = "magic" | "version" | "kind" | "header" | "length";

/** Thrown by `unpack`: this is no such file, or not all of it. */
export class ContainerError extends Error {
  override readonly name = "ContainerError";
  readonly code: ContainerFault;

  constructor(code: ContainerFault, message: string) {
    super(message);
    this.code = code;
  }
}

interface ArrayEntry {
  readonly name: string;
  readonly type: ArrayType;
  readonly length: number;
}

const aligned = (n: number): number => Math.ceil(n / ALIGNMENT) * ALIGNMENT;

/** One file of this kind; `meta` is anything JSON can say. */
export function pack(
  kind: string,
  meta: unknown,
  arrays: Readonly<Record<string, PackedArray>>,
): Uint8Array<ArrayBuffer> {
  const entries = Object.entries(arrays);
  const table = entries.map(([name, a]) => ({ name, type: typeOf(a), length: a.length }));
  const header = new TextEncoder().encode(JSON.stringify({ kind, meta, arrays: table }));
  const first = HEADER_AT + aligned(header.length);
  const total = entries.reduce((at, [, a]) => at + aligned(a.byteLength), first);
  const bytes = new Uint8Array(total);
  const view = new DataView(bytes.buffer);
  bytes.set(new TextEncoder().encode(MAGIC));
  view.setUint32(8, VERSION, true);
  view.setUint32(12, first - HEADER_AT, true);
  bytes.fill(0x20, HEADER_AT, first);
  bytes.set(header, HEADER_AT);
  let at = first;
  for (const [, a] of entries) {
    bytes.set(new Uint8Array(a.buffer, a.byteOffset, a.byteLength), at);
    at += aligned(a.byteLength);
  }
  return bytes;
}

function typeOf(array: PackedArray): ArrayType {
  const name = array.constructor.name;
  if (name in arrayTypes) return name as ArrayType;
  throw new TypeError(`no file holds a ${name}`);
}

/** Meta and arrays of a file; arrays are views into its bytes (into a copy where these do not begin at a multiple of 8). @throws ContainerError */
export function unpack(file: ArrayBuffer | Uint8Array, kind: string): Unpacked {
  const bytes = alignedBytes(file);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const { header, first } = readHeader(bytes, view, kind);
  const places = new Map<string, { entry: ArrayEntry; at: number }>();
  let at = first;
  for (const entry of header.arrays) {
    places.set(entry.name, { entry, at });
    at += aligned(entry.length * arrayTypes[entry.type].BYTES_PER_ELEMENT);
  }
  if (at !== bytes.length) throw new ContainerError("length", `${bytes.length} bytes instead of ${at}`);
  return {
    meta: header.meta,
    array: (name, type) => {
      const place = places.get(name);
      if (place === undefined || place.entry.type !== type) {
        throw new ContainerError("header", `the file has no ${type} named ${name}`);
      }
      return new arrayTypes[type](bytes.buffer, bytes.byteOffset + place.at, place.entry.length);
    },
  };
}

function alignedBytes(file: ArrayBuffer | Uint8Array): Uint8Array {
  if (file instanceof ArrayBuffer) return new Uint8Array(file);
  return file.byteOffset % ALIGNMENT === 0 ? file : new Uint8Array(file);
}

interface Header {
  readonly kind: string;
  readonly meta: unknown;
  readonly arrays: readonly ArrayEntry[];
}

function readHeader(bytes: Uint8Array, view: DataView, kind: string): { header: Header; first: number } {
  const magic = new TextDecoder().decode(bytes.subarray(0, MAGIC.length));
  if (magic !== MAGIC) throw new ContainerError("magic", `the file does not begin with ${MAGIC}`);
  if (bytes.length < HEADER_AT) throw new ContainerError("length", `only ${bytes.length} bytes`);
  const version = view.getUint32(8, true);
  if (version !== VERSION)
    throw new ContainerError("version", `version ${version}; this program reads ${VERSION}`);
  const first = HEADER_AT + view.getUint32(12, true);
  if (first > bytes.length)
    throw new ContainerError("length", `the header ends at ${first} of ${bytes.length}`);
  const header = parseHeader(new TextDecoder().decode(bytes.subarray(HEADER_AT, first)));
  if (header.kind !== kind) throw new ContainerError("kind", `the file holds ${header.kind}, not ${kind}`);
  return { header, first };
}

function parseHeader(text: string): Header {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw new ContainerError("header", "the header is no JSON");
  }
  const header = value as Partial<Header> | null;
  const sound =
    typeof header?.kind === "string" && Array.isArray(header.arrays) && header.arrays.every(isArrayEntry);
  if (!sound) throw new ContainerError("header", "the header does not list the file's arrays");
  return header as Header;
}

function isArrayEntry(value: unknown): boolean {
  const entry = value as Partial<ArrayEntry> | null;
  const { name, type, length } = entry ?? {};
  return (
    typeof name === "string" && typeof type === "string" && Object.hasOwn(arrayTypes, type) && isCount(length)
  );
}

const isCount = (n: unknown): boolean => Number.isSafeInteger(n) && (n as number) >= 0;

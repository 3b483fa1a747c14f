/**
 * A WebAssembly module written instruction by instruction: just the instructions the dense kernels need.
 * Codes and binary format: WebAssembly Core Specification 2.0 (W3C, 2022), chapter 5.
 *
 * Code is bytes and pieces of code, nested as they were put together (joining flat arrays would copy each byte once a level);
 * an expression leaves one value on the stack, a statement none.
 */
export type Code = readonly (number | Code)[];

/** The bytes of a piece of code, in order. */
function flat(code: Code, bytes: number[] = []): number[] {
  for (const item of code) {
    if (typeof item === "number") bytes.push(item);
    else flat(item, bytes);
  }
  return bytes;
}

export const I32 = 0x7f;
export const F64 = 0x7c;
export const V128 = 0x7b;
type ValueType = typeof I32 | typeof F64 | typeof V128;

/** A function under construction: its parameters (all i32) come first among its locals. */
export class FunctionBuilder {
  private readonly locals: ValueType[] = [];
  readonly parameters: number;
  readonly result: boolean;

  constructor(parameters: number, result: boolean) {
    this.parameters = parameters;
    this.result = result;
  }

  /** A new local variable. */
  local(type: ValueType): number {
    return this.parameters + this.locals.push(type) - 1;
  }

  /** The function's entry in the code section. */
  finish(body: Code): Code {
    const declared = this.locals.flatMap((type) => [1, type]);
    const code = flat([leb(this.locals.length), declared, body, END]);
    return [leb(code.length), code];
  }
}

/** A function of a module. */
export interface Part {
  readonly builder: FunctionBuilder;
  readonly code: Code;
}

/** The module's bytes: functions by index, `exported` the indices of those to be called from outside by name; the memory is imported as `host.memory`. */
export function moduleOf(functions: readonly Part[], exported: Readonly<Record<string, number>>): Uint8Array {
  const types = functions.flatMap(({ builder }) => [
    0x60,
    ...leb(builder.parameters),
    ...new Array<number>(builder.parameters).fill(I32),
    ...(builder.result ? [1, I32] : [0]),
  ]);
  const count = functions.length;
  const names = Object.entries(exported);
  return Uint8Array.from(
    flat([
      [0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
      section(1, [count, types]),
      section(2, [1, name("host"), name("memory"), 2, 0, 1]),
      section(3, [count, ...functions.keys()]),
      section(7, [names.length, ...names.map(([key, index]) => [name(key), 0, index])]),
      section(10, [count, ...functions.map(({ code }) => code)]),
    ]),
  );
}

const END = 0x0b;
const VOID = 0x40;

/** Unsigned LEB128. */
function leb(n: number): number[] {
  return n < 128 ? [n] : [(n & 127) | 128, ...leb(n >>> 7)];
}

function section(id: number, content: Code): Code {
  const bytes = flat(content);
  return [id, leb(bytes.length), bytes];
}

function name(text: string): Code {
  return [text.length, ...Array.from(text, (letter) => letter.charCodeAt(0))];
}

const binary =
  (...code: number[]) =>
  (a: Code, b: Code): Code => [a, b, ...code];

export const get = (local: number): Code => [0x20, local];
export const set = (local: number, value: Code): Code => [value, 0x21, local];
/** −64 … 8191. */
export const constant = (n: number): Code => [0x41, ...(n < 64 ? [n & 127] : [(n & 127) | 128, n >> 7])];
export const add = binary(0x6a);
export const subtract = binary(0x6b);
export const multiply = binary(0x6c);
export const and = binary(0x71);
export const less = binary(0x48);
export const shiftLeft = (a: Code, bits: number): Code => [a, constant(bits), 0x74];
export const shiftRight = (a: Code, bits: number): Code => [a, constant(bits), 0x75];
/** a where a < b, else b; and the other way round. Both are evaluated twice. */
export const smaller = (a: Code, b: Code): Code => [a, b, less(a, b), 0x1b];
export const larger = (a: Code, b: Code): Code => [b, a, less(a, b), 0x1b];

/** A 32-bit integer at an address plus a byte offset. */
export const loadInteger = (address: Code, offset: number): Code => [address, 0x28, 2, leb(offset)];
/** Numbers at an address plus a byte offset. */
export const loadNumber = (address: Code, offset: number): Code => [address, 0x2b, 3, leb(offset)];
export const storeNumber = (address: Code, offset: number, value: Code): Code => [
  address,
  value,
  ...[0x39, 3, leb(offset)],
];
export const numberAdd = binary(0xa0);
export const numberSubtract = binary(0xa1);
export const numberMultiply = binary(0xa2);
export const numberDivide = binary(0xa3);
export const numberNegate = (a: Code): Code => [a, 0x9a];
/** 1 unless 0 < a < ∞. */
export const notPositive = (a: Code): Code => {
  const zero = [0x44, 0, 0, 0, 0, 0, 0, 0, 0];
  const infinity = [0x44, 0, 0, 0, 0, 0, 0, 0xf0, 0x7f];
  return [a, zero, 0x64, a, infinity, 0x63, 0x71, 0x45];
};

/** Vectors of two numbers. */
export const load = (address: Code, offset: number): Code => [address, 0xfd, 0x00, 3, leb(offset)];
export const loadBoth = (address: Code, offset: number): Code => [address, 0xfd, 0x0a, 3, leb(offset)];
export const store = (address: Code, offset: number, value: Code): Code => [
  address,
  value,
  ...[0xfd, 0x0b, 3, leb(offset)],
];
export const both = (a: Code): Code => [a, 0xfd, 0x14];
export const vectorAdd = binary(0xfd, 0xf0, 1);
export const vectorSubtract = binary(0xfd, 0xf1, 1);
export const vectorMultiply = binary(0xfd, 0xf2, 1);
export const firstOf = (a: Code): Code => [a, 0xfd, 0x21, 0];
export const secondOf = (a: Code): Code => [a, 0xfd, 0x21, 1];
/** [a₀, b₀] and [a₁, b₁]. */
export const firsts = binary(0xfd, 0x0d, 0, 1, 2, 3, 4, 5, 6, 7, 16, 17, 18, 19, 20, 21, 22, 23);
export const seconds = binary(0xfd, 0x0d, 8, 9, 10, 11, 12, 13, 14, 15, 24, 25, 26, 27, 28, 29, 30, 31);

/** Runs body while a < b (i32). */
export const whileLess = (a: Code, b: Code, body: Code): Code => [
  ...[0x02, VOID, less(a, b), 0x45, 0x0d, 0],
  ...[0x03, VOID, body, less(a, b), 0x0d, 0, END, END],
];
export const when = (condition: Code, body: Code, otherwise: Code = []): Code => [
  condition,
  ...[0x04, VOID, body, 0x05, otherwise, END],
];
export const call = (index: number, values: readonly Code[]): Code => [...values, 0x10, index];
export const leave = (value: Code): Code => [value, 0x0f];

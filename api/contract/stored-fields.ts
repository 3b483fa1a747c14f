/** All fields of a job as one file, in full precision: what a store keeps, and every download is made from. */
import type { ComplexField, FieldGrid, Fields, StateFields } from "../../meshes/fields.ts";
import { type PackedArray, pack, unpack } from "./container.ts";

const KIND = "fields";
const STATES = ["loaded", "empty"] as const;

interface Meta {
  readonly nr: number;
  readonly nz: number;
  readonly loaded: boolean;
}

/** The file of both states. */
export function encodeFields({ grid, loaded, empty }: Fields): Uint8Array<ArrayBuffer> {
  const arrays: Record<string, PackedArray> = { r: grid.r, z: grid.z };
  for (const [name, state] of [["loaded", loaded] as const, ["empty", empty] as const]) {
    if (state === null) continue;
    arrays[`${name}.aRe`] = state.vectorPotential.re;
    arrays[`${name}.aIm`] = state.vectorPotential.im;
    arrays[`${name}.bRe`] = state.fluxDensity.re;
    arrays[`${name}.bIm`] = state.fluxDensity.im;
    arrays[`${name}.power`] = state.powerDensity;
    arrays[`${name}.current`] = state.currentDensity;
  }
  const meta: Meta = { nr: grid.nr, nz: grid.nz, loaded: loaded !== null };
  return pack(KIND, meta, arrays);
}

/** The fields of such a file, as views into it. @throws ContainerError when it is none, or not whole */
export function decodeFields(bytes: ArrayBuffer | Uint8Array): Fields {
  const { meta, array } = unpack(bytes, KIND);
  const { nr, nz, loaded } = meta as Meta;
  const numbers = (name: string): Float64Array => array(name, "Float64Array");
  const complex = (name: string): ComplexField => ({ re: numbers(`${name}Re`), im: numbers(`${name}Im`) });
  const state = (name: (typeof STATES)[number]): StateFields => ({
    vectorPotential: complex(`${name}.a`),
    fluxDensity: complex(`${name}.b`),
    powerDensity: numbers(`${name}.power`),
    currentDensity: numbers(`${name}.current`),
  });
  const grid: FieldGrid = { nr, nz, r: numbers("r"), z: numbers("z") };
  return { grid, loaded: loaded ? state("loaded") : null, empty: state("empty") };
}

/** `/v1/materials`: the library, a citation per number. */
import type { Router } from "express";
import { celsiusFromKelvin } from "../../meshes/units.ts";
import { type MaterialRecord, materials, type ResistivityLaw } from "../../solver/index.ts";
import type { MaterialList } from "../contract/materials.ts";
import { door, sendJson } from "./door.ts";

export function materialRoutes(router: Router): void {
  const list: MaterialList = { materials: [...materials.values()].map(wireMaterial) };
  const text = JSON.stringify(list);
  door(router, "/v1/materials", { get: (request, response) => sendJson(request, response, text) });
}

function wireMaterial(record: MaterialRecord): MaterialList["materials"][number] {
  const { id, description, resistivity, relativePermeability, range } = record;
  return {
    id,
    description,
    resistivity: resistivity === null ? null : wireLaw(resistivity),
    relativePermeability,
    range: { fromC: celsius(range.fromKelvin), toC: celsius(range.toKelvin), why: range.why },
  };
}

function wireLaw({ law, atReference, reference, perKelvin }: ResistivityLaw) {
  const referenceC = { value: celsius(reference.value), source: reference.source };
  return { law, atReferenceOhmM: atReference, referenceC, perKelvin };
}

/** Free of the last bits that the zero of Celsius leaves behind. */
const celsius = (kelvin: number): number => Number(celsiusFromKelvin(kelvin).toFixed(6));

/** The library of materials in its wire form: the solver's records with °C for kelvin. */
import { celsiusFromKelvin } from "../../meshes/units.ts";
import {
  type Cited,
  type Magnetism,
  type MaterialRecord,
  materialIdsFor,
  materials,
  type ResistivityLaw,
  type Role,
  type Row,
  type Table,
  type Thermal,
} from "../../solver/index.ts";
import type { MaterialList } from "../contract/materials.ts";

type Wire = MaterialList["materials"][number];

/** Every library material, in the catalogue's order. */
export function materialList(): MaterialList {
  const roles: readonly Role[] = ["conductor", "part", "guide"];
  const taken = roles.map((role) => [role, new Set(materialIdsFor(role))] as const);
  return {
    materials: [...materials.values()].map((record) => ({
      ...wire(record),
      roles: taken.filter(([, ids]) => ids.has(record.id)).map(([role]) => role),
    })),
  };
}

function wire(record: MaterialRecord): Omit<Wire, "roles"> {
  const { id, description, kind, resistivity, relativePermeability, range } = record;
  return {
    id,
    description,
    kind,
    resistivity: resistivity === null ? null : wireResistivity(resistivity),
    relativePermeability,
    ...(record.magnetism === undefined ? {} : { magnetism: wireMagnetism(record.magnetism) }),
    ...(record.lossTangent === undefined ? {} : { lossTangent: record.lossTangent }),
    thermal: wireThermal(record.thermal),
    range: { fromC: celsius(range.fromKelvin), toC: celsius(range.toKelvin), why: range.why },
  };
}

function wireResistivity(law: ResistivityLaw): NonNullable<Wire["resistivity"]> {
  if (law.law === "table") return { law: law.law, rowsOhmM: law.rows.map(wireRow) };
  const { atReference, reference, perKelvin } = law;
  return { law: law.law, atReferenceOhmM: atReference, referenceC: inCelsius(reference), perKelvin };
}

function wireMagnetism({ curie, saturation, falls }: Magnetism): NonNullable<Wire["magnetism"]> {
  return {
    curieC: inCelsius(curie),
    saturationT: saturation,
    falls:
      falls.law === "tables"
        ? {
            law: falls.law,
            rowsPermeability: falls.permeability.rows.map(wireRow),
            rowsSaturationT: falls.saturation.rows.map(wireRow),
          }
        : { law: falls.law, referenceC: celsius(falls.reference), s: falls.s, p: falls.p },
  };
}

function wireThermal({ density, specificHeat, conductivity, emissivity }: Thermal): Wire["thermal"] {
  return {
    ...(density === undefined ? {} : { densityKgPerM3: density }),
    ...(specificHeat === undefined ? {} : { specificHeatJPerKgK: wireTable(specificHeat) }),
    ...(conductivity === undefined ? {} : { conductivityWPerMK: wireTable(conductivity) }),
    ...(emissivity === undefined ? {} : { emissivity }),
  };
}

const wireTable = (law: Cited | Table) =>
  "rows" in law ? { law: law.law, rows: law.rows.map(wireRow) } : law;

const wireRow = ({ kelvin, ...cited }: Row) => ({ atC: celsius(kelvin), ...cited });

/** A temperature; its relative spread stays that of kelvin. */
const inCelsius = (cited: Cited): Cited => ({ ...cited, value: celsius(cited.value) });

/** Free of the last bits that the zero of Celsius leaves behind. */
const celsius = (kelvin: number): number => Number(celsiusFromKelvin(kelvin).toFixed(6));

/** The library of materials: records with a citation per number, looked up by id. */
import { copper } from "./copper.ts";
import { cores } from "./cores.ts";
import { type MaterialRecord, magneticAt, resistivityAt } from "./laws.ts";
import { melts } from "./melts.ts";
import { nonferrous } from "./nonferrous.ts";
import { nonmetals } from "./nonmetals.ts";
import { steels } from "./steels.ts";

/** What a library material is at one temperature. */
export interface MaterialState {
  /** Ω·m; null = does not conduct. */
  readonly resistivity: number | null;
  /** At low field; 1 from the Curie point up. */
  readonly relativePermeability: number;
  /** tan δ at low field; 0 where none is recorded and from the Curie point up. */
  readonly lossTangent: number;
  /** Saturation polarisation Bs, T; null where it is not magnetic. */
  readonly saturation: number | null;
}

/** What a material may be in a design. */
export type Role = "conductor" | "part" | "guide";

const records: readonly MaterialRecord[] = [
  copper,
  ...nonferrous,
  ...steels,
  ...nonmetals,
  ...melts,
  ...cores,
];

/** Every library material by its id. */
export const materials: ReadonlyMap<string, MaterialRecord> = new Map(records.map((m) => [m.id, m]));

/**
 * The library ids that make sense in a role, in the catalogue's order. Parts: all. Conductors: solid metals that are not
 * magnetic (nothing would tell that one saturates). Guides: cores, which are magnetic and practically do not conduct.
 */
export function materialIdsFor(role: Role): string[] {
  return records
    .filter(({ kind, magnetism }) => {
      if (role === "part") return true;
      return role === "guide" ? kind === "core" : kind === "metal" && magnetism === undefined;
    })
    .map(({ id }) => id);
}

/**
 * The state of material `id` at `kelvin`.
 * @throws RangeError for an unknown id or a temperature outside the material's range: callers check both first.
 */
export function materialAt(id: string, kelvin: number): MaterialState {
  const record = materials.get(id);
  if (record === undefined) throw new RangeError(`no library material ${id}`);
  const { fromKelvin, toKelvin } = record.range;
  // Half a millikelvin of grace: −50 °C written as kelvin is not exactly 223.15.
  if (!(kelvin > fromKelvin - 5e-4 && kelvin < toKelvin + 5e-4)) {
    throw new RangeError(`${id} is known from ${fromKelvin} K to ${toKelvin} K, not at ${kelvin} K`);
  }
  const { permeability, saturation } = magneticAt(record, kelvin);
  return {
    resistivity: record.resistivity === null ? null : resistivityAt(record.resistivity, kelvin),
    relativePermeability: permeability,
    lossTangent: saturation === null ? 0 : (record.lossTangent?.value ?? 0),
    saturation,
  };
}

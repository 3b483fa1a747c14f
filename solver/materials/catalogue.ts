/** The library of materials: records with a citation per number, looked up by id. */
import { copper } from "./copper.ts";
import { type MaterialRecord, resistivityAt } from "./laws.ts";

/** What a library material is at one temperature. */
export interface MaterialState {
  /** Ω·m; null = does not conduct. */
  readonly resistivity: number | null;
  readonly relativePermeability: number;
}

/** Every library material by its id. */
export const materials: ReadonlyMap<string, MaterialRecord> = new Map([copper].map((m) => [m.id, m]));

/** The library ids, in the catalogue's order. */
export const materialIds: readonly string[] = [...materials.keys()];

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
  return {
    resistivity: record.resistivity === null ? null : resistivityAt(record.resistivity, kelvin),
    relativePermeability: record.relativePermeability.value,
  };
}

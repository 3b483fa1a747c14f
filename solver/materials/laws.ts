/** Property laws of library materials against temperature. SI: kelvin, Ω·m, tesla. */

/** A number and where it was taken from. */
export interface Cited {
  readonly value: number;
  readonly source: string;
  /** Relative spread to expect; there exactly when the number is from memory. */
  readonly spread?: number;
}

/** ρ(T) = ρ_ref · [1 + α (T − T_ref)]. */
export interface LinearResistivity {
  readonly law: "linear";
  /** ρ_ref, Ω·m. */
  readonly atReference: Cited;
  /** T_ref, K. */
  readonly reference: Cited;
  /** α at T_ref, 1/K. */
  readonly perKelvin: Cited;
}

/** One row of a table: the value at `kelvin`. */
export interface Row extends Cited {
  readonly kelvin: number;
}

/** A property by rows of rising temperature, straight in between. */
export interface Table {
  readonly law: "table";
  readonly rows: readonly Row[];
}

/** Laws of resistivity; a union that grows with the library. */
export type ResistivityLaw = LinearResistivity | Table;

/**
 * How µr − 1 and Bs fall towards the Curie point.
 * - `magnetisation`: both as Kuz'min's m(t) = [1 − s t^1.5 − (1 − s) t^p]^(1/3), t = T/T_C, from their values at `reference`;
 *   the curve of magnetisation so keeps its knee field and shrinks in B.
 * - `tables`: each by its own table, ending in 1 and 0 at the Curie point.
 */
export type MagneticLaw =
  | { readonly law: "magnetisation"; readonly reference: number; readonly s: Cited; readonly p: Cited }
  | { readonly law: "tables"; readonly permeability: Table; readonly saturation: Table };

/** What makes a material magnetic; from the Curie point up it is as air. */
export interface Magnetism {
  /** T_C, K. */
  readonly curie: Cited;
  /** Saturation polarisation Bs at 20 °C, T. */
  readonly saturation: Cited;
  readonly falls: MagneticLaw;
}

/** Thermal figures, at 20 °C (a melt: where it melts) unless they are a table. Recorded, not yet computed with. */
export interface Thermal {
  /** kg/m³. */
  readonly density?: Cited;
  /** J/(kg·K). */
  readonly specificHeat?: Cited | Table;
  /** W/(m·K). */
  readonly conductivity?: Cited | Table;
  /** Total hemispherical emissivity of the surface its source names. */
  readonly emissivity?: Cited;
}

/** Solid metal, molten metal, conducting non-metal, or a practically non-conducting magnetic core. */
export type Kind = "metal" | "melt" | "nonmetal" | "core";

/** One library material. Grows by optional laws; a new one never changes what stands. */
export interface MaterialRecord {
  readonly id: string;
  /** Its name up to the first comma, then what tells it from its kin. */
  readonly description: string;
  readonly kind: Kind;
  /** null = does not conduct. */
  readonly resistivity: ResistivityLaw | null;
  /** µr at low field; of what is magnetic, at 20 °C. */
  readonly relativePermeability: Cited;
  readonly magnetism?: Magnetism;
  /** tan δ of a core at low field, below the Curie point. */
  readonly lossTangent?: Cited;
  readonly thermal: Thermal;
  /** Temperatures (K) its laws hold for, and why no further. */
  readonly range: { readonly fromKelvin: number; readonly toKelvin: number; readonly why: string };
}

/** ρ (Ω·m) at T (K). The caller keeps T within the material's range. */
export function resistivityAt(law: ResistivityLaw, kelvin: number): number {
  if (law.law === "table") return tableAt(law, kelvin);
  return law.atReference.value * (1 + law.perKelvin.value * (kelvin - law.reference.value));
}

/** µr at low field and Bs (T; null where it is not magnetic) at T (K). */
export function magneticAt(
  { relativePermeability, magnetism }: Pick<MaterialRecord, "relativePermeability" | "magnetism">,
  kelvin: number,
): { readonly permeability: number; readonly saturation: number | null } {
  if (magnetism === undefined) return { permeability: relativePermeability.value, saturation: null };
  const { curie, saturation, falls } = magnetism;
  if (kelvin >= curie.value) return { permeability: 1, saturation: null };
  if (falls.law === "tables") {
    return {
      permeability: tableAt(falls.permeability, kelvin),
      saturation: tableAt(falls.saturation, kelvin),
    };
  }
  const m = (at: number): number => {
    const t = at / curie.value;
    return Math.cbrt(1 - falls.s.value * t ** 1.5 - (1 - falls.s.value) * t ** falls.p.value);
  };
  const share = m(kelvin) / m(falls.reference);
  return {
    permeability: 1 + (relativePermeability.value - 1) * share,
    saturation: saturation.value * share,
  };
}

/** A table's value at T (K), straight between rows; beyond its ends (rounding of the range's ends) the end's own. */
export function tableAt({ rows }: Table, kelvin: number): number {
  const above = rows.findIndex((row) => row.kelvin >= kelvin);
  if (above <= 0) return rows[above === 0 ? 0 : rows.length - 1].value;
  const [a, b] = [rows[above - 1], rows[above]];
  return a.value + ((b.value - a.value) * (kelvin - a.kelvin)) / (b.kelvin - a.kelvin);
}

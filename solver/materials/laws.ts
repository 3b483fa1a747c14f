/** Property laws of library materials against temperature. SI: kelvin, Ω·m. */

/** A number and the publication it was taken from. */
export interface Cited {
  readonly value: number;
  readonly source: string;
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

/** Laws of resistivity; a union that grows with the library. */
export type ResistivityLaw = LinearResistivity;

/** One library material. Grows by optional laws; a new one never changes what stands. */
export interface MaterialRecord {
  readonly id: string;
  readonly description: string;
  /** null = does not conduct. */
  readonly resistivity: ResistivityLaw | null;
  readonly relativePermeability: Cited;
  /** Temperatures (K) its laws hold for, and why no further. */
  readonly range: { readonly fromKelvin: number; readonly toKelvin: number; readonly why: string };
}

/** ρ (Ω·m) at T (K). The caller keeps T within the material's range. */
export function resistivityAt(law: ResistivityLaw, kelvin: number): number {
  return law.atReference.value * (1 + law.perKelvin.value * (kelvin - law.reference.value));
}

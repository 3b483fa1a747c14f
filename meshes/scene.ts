/**
 * The scene: a design document turned into plain geometry and materials, in SI units, with every default filled in.
 * Grids and results are made from this; nothing past this point knows millimetres or winding forms.
 */
import type { Circuit } from "../solver/index.ts";

/** [r, z] in metres. */
export type Point = readonly [number, number];

/** Cross-section of a turn's conductor; lengths in metres; wall 0 = solid. */
export type Section =
  | { readonly kind: "round"; readonly radius: number; readonly wall: number }
  | { readonly kind: "rect"; readonly width: number; readonly height: number; readonly wall: number };

/** One turn: a closed ring through its section's centre. */
export interface Turn {
  readonly r: number;
  readonly z: number;
}

/** A connected piece of a part or guide. Polygons run counter-clockwise (r right, z up) without repeated or collinear corners. */
export type Piece =
  | { readonly kind: "polygon"; readonly points: readonly Point[] }
  | { readonly kind: "sphere"; readonly centreZ: number; readonly radius: number };

/** A material in its place, as the linear solver takes it. */
export interface SceneMaterial {
  /** Ω·m; null = does not conduct. */
  readonly resistivity: number | null;
  readonly relativePermeability: number;
  readonly lossTangent: number;
  /** Saturation polarisation, T, where the document gives one (directly or as the end of a curve); else null. */
  readonly saturation: number | null;
}

export interface Body {
  readonly name: string;
  readonly role: "part" | "guide";
  /** Index in the document's parts or guides. */
  readonly index: number;
  readonly heated: boolean;
  readonly pieces: readonly Piece[];
  readonly material: SceneMaterial;
  /** True for a cylinder or a stack of cylinders: depth shares from side and bore are defined. */
  readonly cylinder: boolean;
}

/** Quantity the drive fixes. */
export type Drive =
  | { readonly kind: "current"; readonly ampere: number }
  | { readonly kind: "power"; readonly watt: number }
  | { readonly kind: "voltage"; readonly volt: number };

export interface Leads {
  readonly length: number;
  readonly spacing: number;
}

export interface Scene {
  readonly section: Section;
  readonly conductor: SceneMaterial;
  readonly turns: readonly Turn[];
  readonly circuit: Circuit;
  /** Axial and radial advance of each turn to the next in the same winding, m (0, 0 for rings): for copper length. */
  readonly advance: readonly { readonly axial: number; readonly radial: number }[];
  readonly leads: Leads | null;
  /** Parts first, then guides, each in document order. */
  readonly bodies: readonly Body[];
  readonly frequency: number;
  readonly drive: Drive;
  readonly strayPoints: readonly Point[];
  /** Asked accuracy as a fraction (0.002 for 0.2 %). */
  readonly accuracy: number;
}

/**
 * The colours of heat: dark violet through red and amber to pale yellow, lightness rising evenly all the way, so that it
 * reads the same in grey print. Computed here from CIE L*C*h, no table of anyone's: L* = 12 + 82 t, hue turning from violet
 * to yellow, chroma least at both ends. Conversions: CIE 15:2004 (L*a*b*, white D65) and IEC 61966-2-1 (sRGB).
 */

/** L*, a*, b* at t in [0, 1]; the constants keep every colour inside sRGB and the steps between them even (our own fit). */
export function heatLab(t: number): readonly [number, number, number] {
  const hue = ((-55 + 150 * t) * Math.PI) / 180;
  const chroma = 14 + 48 * Math.sin(Math.PI * t) + 14 * t;
  return [12 + 82 * t, chroma * Math.cos(hue), chroma * Math.sin(hue)];
}

/** CIE 15:2004, L*a*b* backwards: the inverse of the cube-root law with its linear foot. */
function unroot(f: number): number {
  return f > 6 / 29 ? f ** 3 : 3 * (6 / 29) ** 2 * (f - 4 / 29);
}

/** IEC 61966-2-1: linear light to the stored value, clipped to 0 … 1. */
function encode(linear: number): number {
  const v = Math.min(1, Math.max(0, linear));
  return v <= 0.0031308 ? 12.92 * v : 1.055 * v ** (1 / 2.4) - 0.055;
}

/** L*a*b* (D65) to sRGB, each 0 … 255. */
export function toRgb([l, a, b]: readonly [number, number, number]): [number, number, number] {
  const fy = (l + 16) / 116;
  const x = 0.95047 * unroot(fy + a / 500);
  const y = unroot(fy);
  const z = 1.08883 * unroot(fy - b / 200);
  const linear = [
    3.2406 * x - 1.5372 * y - 0.4986 * z,
    -0.9689 * x + 1.8758 * y + 0.0415 * z,
    0.0557 * x - 0.204 * y + 1.057 * z,
  ] as const;
  return [
    Math.round(255 * encode(linear[0])),
    Math.round(255 * encode(linear[1])),
    Math.round(255 * encode(linear[2])),
  ];
}

/** The colour at t in [0, 1] as "#rrggbb"; values outside are held at the ends. */
export function heatColour(t: number): string {
  const rgb = toRgb(heatLab(Math.min(1, Math.max(0, t))));
  return `#${rgb.map((v) => v.toString(16).padStart(2, "0")).join("")}`;
}

/** Figures as SVG path data, px; one path for many figures, so that a thousand turns are one element. */

import type { Figure } from "../../../meshes/shapes.ts";
import type { SectionMm } from "../../../meshes/windings.ts";
import { type View, xOf, yOf } from "./arrange.ts";

/** Hundredths of a pixel; rounding so is much faster than toFixed. */
const px = (x: number): number => Math.round(100 * x) / 100;

/** Outlines of figures in the right half, each a closed subpath. */
export function pathOf(figures: readonly Figure[], view: View): string {
  return figures.map((f) => figurePath(f, view)).join("");
}

function figurePath(f: Figure, view: View): string {
  if (f.kind === "polygon") {
    return `M${f.points.map(([r, z]) => `${px(xOf(view, r))} ${px(yOf(view, z))}`).join("L")}Z`;
  }
  const radius = f.radius * view.scale;
  const [x, y] = [xOf(view, f.r), yOf(view, f.z)];
  const arc = (toY: number) => `A${px(radius)} ${px(radius)} 0 0 1 ${px(x)} ${px(toY)}`;
  // A sphere on the axis is half a disc; its mirror image is the other half.
  const half = `M${px(x)} ${px(y - radius)}${arc(y + radius)}`;
  return f.r === 0 ? `${half}Z` : `${half}${arc(y - radius)}Z`;
}

/** The surfaces of figures: their outlines without what lies on the axis, where nothing ends. */
export function edgePath(figures: readonly Figure[], view: View): string {
  return figures
    .map((f) => {
      if (f.kind === "disc") return figurePath(f, view).replace("Z", "");
      const corners = f.points.map(([r, z]) => ({ r, at: `${px(xOf(view, r))} ${px(yOf(view, z))}` }));
      return corners
        .map((b, i) => ({ a: corners.at(i - 1)!, b, i }))
        .map(({ a, b, i }) => {
          const onAxis = a.r === 0 && b.r === 0;
          return onAxis || i === 0 ? `M${onAxis ? "" : `${a.at}L`}${b.at}` : `L${b.at}`;
        })
        .join("");
    })
    .join("");
}

/** The bores of tubes, to be cut out of the copper's path by the even-odd rule. */
export function borePath(figures: readonly Figure[], section: SectionMm, view: View): string {
  if (section.wallMm === 0) return "";
  return pathOf(
    figures.map((f): Figure => {
      if (f.kind === "disc") return { ...f, radius: f.radius - section.wallMm };
      const [low, high] = [f.points[0]!, f.points[2]!];
      const [a, b, c, d] = [
        low[0] + section.wallMm,
        high[0] - section.wallMm,
        low[1] + section.wallMm,
        high[1] - section.wallMm,
      ];
      return {
        kind: "polygon",
        points: [
          [a, c],
          [b, c],
          [b, d],
          [a, d],
        ],
      };
    }),
    view,
  );
}

/** A dimension's lines: extensions, the line itself, arrow heads (outside where there is no room between). */
export function dimensionPath(
  line: { from: number; to: number; line: number; fromAt: number; toAt: number },
  upright: boolean,
): { readonly thin: string; readonly heads: string } {
  const at = (along: number, across: number): string =>
    upright ? `${px(across)} ${px(along)}` : `${px(along)} ${px(across)}`;
  const [a, b] = [Math.min(line.from, line.to), Math.max(line.from, line.to)];
  const beyond = Math.sign(line.line - line.fromAt) * 4;
  const extension = (along: number, start: number) =>
    `M${at(along, start + beyond / 2)}L${at(along, line.line + beyond)}`;
  const inward = b - a < 20;
  const reach = inward ? 12 : 0;
  const head = (tip: number, direction: number) =>
    `M${at(tip, line.line)}L${at(tip + 7 * direction, line.line - 2.5)}L${at(tip + 7 * direction, line.line + 2.5)}Z`;
  return {
    thin: `${extension(line.from, line.fromAt)}${extension(line.to, line.toAt)}M${at(a - reach, line.line)}L${at(b + reach, line.line)}`,
    heads: head(a, inward ? -1 : 1) + head(b, inward ? 1 : -1),
  };
}

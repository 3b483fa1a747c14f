/** The pieces the solid is put together from: its material, pictures of colours, triangles and lines, as three.js wants them. */
import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DataTexture,
  DoubleSide,
  LinearFilter,
  LineBasicMaterial,
  LineSegments,
  Mesh,
  NearestFilter,
  ShaderMaterial,
} from "three";
import type { Outline } from "../../meshes/heatmap.ts";
import type { Heat } from "../heat.ts";
import { type Paint, paintPixels } from "./paint.ts";
import { opening } from "./pick.ts";
import type { Window } from "./raster.ts";
import type { Rings } from "./rings.ts";

/** Colours go to the screen as they are, so that they match the legend; only turned surfaces are shaded, and gently. */
const vertexShader = `
uniform float lit;
varying vec2 place;
varying float shade;
void main() {
  place = uv;
  vec3 n = normalize(normalMatrix * normal);
  float light = max(0.0, dot(n, normalize(vec3(-0.35, 0.5, 0.8))));
  shade = mix(1.0, 0.74 + 0.26 * light, lit);
  gl_Position = projectionMatrix * modelViewMatrix * vec4(position, 1.0);
}`;
const fragmentShader = `
uniform sampler2D colours;
varying vec2 place;
varying float shade;
void main() {
  vec4 colour = texture2D(colours, place);
  if (colour.a < 0.5) discard;
  gl_FragColor = vec4(colour.rgb * shade, 1.0);
}`;

function textureOf(pixels: Uint32Array, width: number, height: number, smooth: boolean): DataTexture {
  const texture = new DataTexture(new Uint8Array(pixels.buffer as ArrayBuffer), width, height);
  const filter = smooth ? LinearFilter : NearestFilter;
  texture.minFilter = filter;
  texture.magFilter = filter;
  texture.needsUpdate = true;
  return texture;
}

/** `lit`: shaded by how the surface lies to the eye. */
function materialOf(colours: DataTexture, lit: boolean): ShaderMaterial {
  return new ShaderMaterial({
    uniforms: { colours: { value: colours }, lit: { value: lit ? 1 : 0 } },
    vertexShader,
    fragmentShader,
    side: DoubleSide,
    // The outlines lie in the faces and have to win there.
    polygonOffset: !lit,
    polygonOffsetFactor: 1,
    polygonOffsetUnits: 2,
  });
}

/** The turned surfaces, coloured by a table of packed colours with a row a chain. */
export function surfaceMesh(rings: Rings, table: Uint32Array, columns: number): Mesh {
  const geometry = new BufferGeometry();
  geometry.setAttribute("position", new BufferAttribute(rings.position, 3));
  geometry.setAttribute("normal", new BufferAttribute(rings.normal, 3));
  geometry.setAttribute("uv", new BufferAttribute(rings.uv, 2));
  geometry.setIndex(new BufferAttribute(rings.index, 1));
  const texture = textureOf(table, columns, Math.max(1, table.length / columns), false);
  return still(new Mesh(geometry, materialOf(texture, true)));
}

/** Both cut faces where the window shows them, with the section map on them. */
export function faceMesh(heat: Heat, paint: Paint, window: Window, ratio: number): Mesh {
  const { left, top, step, width, height } = window;
  const pixels = new Uint32Array(width * height);
  paintPixels(heat.corners, window, paint, pixels, { ground: 0, ratio });
  const [right, bottom] = [left + width * step, top - height * step];
  const corners = [
    [left, top, 0, 0],
    [right, top, 1, 0],
    [left, bottom, 0, 1],
    [right, bottom, 1, 1],
  ] as const;
  const angles = [opening.from, opening.to];
  const position = angles.flatMap((angle) =>
    corners.flatMap(([r, z]) => [r * Math.cos(angle), z, r * Math.sin(angle)]),
  );
  const geometry = new BufferGeometry();
  geometry.setAttribute("position", new BufferAttribute(Float32Array.from(position), 3));
  geometry.setAttribute("normal", new BufferAttribute(new Float32Array(24).fill(1), 3));
  const uv = angles.flatMap(() => corners.flatMap(([, , u, v]) => [u, v]));
  geometry.setAttribute("uv", new BufferAttribute(Float32Array.from(uv), 2));
  geometry.setIndex([0, 2, 1, 1, 2, 3, 4, 6, 5, 5, 6, 7]);
  return still(new Mesh(geometry, materialOf(textureOf(pixels, width, height, true), false)));
}

/** The bodies' outlines on both cut faces. */
export function outlineLines(outlines: readonly Outline[], ink: string): LineSegments {
  const points: number[] = [];
  for (const angle of [opening.from, opening.to]) {
    const put = ([r, z]: readonly [number, number]): void => {
      points.push(r * Math.cos(angle), z, r * Math.sin(angle));
    };
    for (const outline of outlines) {
      outline.points.forEach((p, k) => {
        const q = outline.points[(k + 1) % outline.points.length]!;
        // The axis is no edge of anything.
        if (p[0] <= 0 && q[0] <= 0) return;
        put(p);
        put(q);
      });
    }
  }
  const geometry = new BufferGeometry();
  geometry.setAttribute("position", new BufferAttribute(Float32Array.from(points), 3));
  const lines = new LineSegments(geometry, new LineBasicMaterial({ color: new Color(ink) }));
  lines.frustumCulled = false;
  lines.matrixAutoUpdate = false;
  return lines;
}

/** It stands at the origin, is always looked at, and is never moved. */
function still(mesh: Mesh): Mesh {
  mesh.frustumCulled = false;
  mesh.matrixAutoUpdate = false;
  return mesh;
}

/** Gives back what a mesh holds on the graphics side. */
export function release(mesh: Mesh | LineSegments): void {
  mesh.geometry.dispose();
  const { material } = mesh;
  for (const one of Array.isArray(material) ? material : [material]) {
    if (one instanceof ShaderMaterial) (one.uniforms["colours"]?.value as DataTexture | undefined)?.dispose();
    one.dispose();
  }
}

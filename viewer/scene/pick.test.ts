import { vec3 } from "gl-matrix";
import { describe, expect, it } from "vitest";
import { boundaryOf } from "./boundary.ts";
import { atFirst, type Camera, cameraOf, closer, placeOf, rayAt, turned } from "./orbit.ts";
import { meet } from "./pick.ts";
import { visibleWindow } from "./visible.ts";

/** A solid cylinder of radius 20 mm and height 40 mm about the origin, of cells 1 mm wide and high, numbered along r first. */
const corners = Float64Array.from(
  Array.from({ length: 20 * 40 }, (_, k) => {
    const [r, z] = [(k % 20) * 1e-3, Math.floor(k / 20) * 1e-3 - 0.02];
    return [r, z, r + 1e-3, z, r + 1e-3, z + 1e-3, r, z + 1e-3];
  }).flat(),
);
const heat = { corners };
const boundary = boundaryOf(heat);
const bounds = { rMax: 0.02, zMin: -0.02, zMax: 0.02 };
const aspect = 1.5;
const first = cameraOf(atFirst, bounds, aspect);

/** The ray through where a point of the solid stands in the picture. */
const through = (camera: Camera, point: [number, number, number]) => {
  const [x, y] = placeOf(camera, vec3.fromValues(...point));
  return rayAt(camera, x, y);
};

describe("reading the solid", () => {
  it("finds the cell of a point on either cut face", () => {
    for (const point of [
      [0.0123, -0.0044, 0],
      [0, -0.0044, 0.0123],
    ] as [number, number, number][]) {
      const met = meet(heat, boundary, through(first, point))!;
      expect(met.on).toBe("cut");
      expect(met.r).toBeCloseTo(0.0123, 6);
      expect(met.z).toBeCloseTo(-0.0044, 6);
      expect(met.cell).toBe(15 * 20 + 12);
    }
  });

  it("finds the cell beneath a point of the side, of the top, and past the solid nothing", () => {
    const back = cameraOf(turned(atFirst, Math.PI, 0), bounds, aspect);
    const angle = (5 * Math.PI) / 4;
    const side = meet(
      heat,
      boundary,
      through(back, [0.02 * Math.cos(angle), 0.0061, 0.02 * Math.sin(angle)]),
    )!;
    expect(side).toMatchObject({ on: "surface", cell: 26 * 20 + 19 });
    expect(side.r).toBeCloseTo(0.02, 6);
    const top = meet(heat, boundary, through(back, [-0.0105, 0.02, 0]))!;
    expect(top).toMatchObject({ on: "surface", cell: 39 * 20 + 10 });
    expect(meet(heat, boundary, rayAt(first, 0.99, 0.99))).toBeNull();
  });

  it("looks through the opened quarter, not at it", () => {
    const met = meet(heat, boundary, through(first, [0.02 * Math.SQRT1_2, 0, 0.02 * Math.SQRT1_2]))!;
    expect(met.on).toBe("cut");
  });
});

describe("the eye", () => {
  it("shows the whole solid at first, filling most of the picture", () => {
    let most = 0;
    for (let k = 0; k < 64; k++) {
      const angle = (k * Math.PI) / 32;
      for (const y of [-0.02, 0.02]) {
        const place = placeOf(first, [0.02 * Math.cos(angle), y, 0.02 * Math.sin(angle)]);
        most = Math.max(most, ...place.map(Math.abs));
      }
    }
    expect(most).toBeGreaterThan(0.9);
    expect(most).toBeLessThan(0.96);
  });

  it("keeps what is under the pointer there when it comes closer, and never loses the solid", () => {
    const point: [number, number, number] = [0.0123, -0.0044, 0];
    const [x, y] = placeOf(first, point);
    const near = cameraOf(closer(atFirst, 9, [(x / 2) * aspect, y / 2]), bounds, aspect);
    const after = placeOf(near, point);
    expect(after[0]).toBeCloseTo(x, 5);
    expect(after[1]).toBeCloseTo(y, 5);
    expect(closer(atFirst, 1e9).zoom).toBeLessThan(1e4);
    expect(turned(atFirst, 0, 99).elevation).toBeLessThan(Math.PI / 2);
  });

  it("draws finely what is seen of the cut faces, and only that", () => {
    const pixels = { width: 900, height: 600 };
    const whole = visibleWindow(first, bounds, pixels)!;
    expect(whole.left).toBeCloseTo(0, 9);
    expect(whole.top).toBeCloseTo(0.02, 9);
    expect(whole.width * whole.step).toBeCloseTo(0.02, 3);
    const [x, y] = placeOf(first, [0.0123, -0.0044, 0]);
    const near = visibleWindow(
      cameraOf(closer(atFirst, 40, [(x / 2) * aspect, y / 2]), bounds, aspect),
      bounds,
      pixels,
    )!;
    expect(near.left).toBeLessThan(0.0123);
    expect(near.left + near.width * near.step).toBeGreaterThan(0.0123);
    expect(near.top).toBeGreaterThan(-0.0044);
    expect(near.width * near.step).toBeLessThan(0.005);
    expect(near.step).toBeLessThan(whole.step / 20);
    const behind = cameraOf(closer(turned(atFirst, Math.PI, 0), 40, [0.45, 0.45]), bounds, aspect);
    expect(visibleWindow(behind, bounds, pixels)).toBeNull();
  });
});

/**
 * The cut-away solid of revolution, drawn with three.js. The two cut faces carry the section map as a picture, so that they
 * are as fine as the screen whatever the grid; the turned surfaces carry the colours of the cells beneath them. It draws when
 * it is told to, never by itself: coarsely while it is turned, finely at rest.
 */
import { Color, type LineSegments, type Mesh, PerspectiveCamera, Scene, WebGLRenderer } from "three";
import { type Bounds, boundsOf } from "../heat.ts";
import { type Boundary, boundaryOf, chainsOf } from "./boundary.ts";
import { faceMesh, outlineLines, release, surfaceMesh } from "./meshes.ts";
import { ballOf, type Camera } from "./orbit.ts";
import { plainColour } from "./paint.ts";
import type { Window } from "./raster.ts";
import { chainColours, ringsOf } from "./rings.ts";
import type { Shown } from "./shown.ts";
import { visibleWindow } from "./visible.ts";

/** Triangles of the surfaces while turning, and at rest; a processor drawing them alone does 25 000 in a tenth of a second. */
const triangles = { turning: 16_000, rest: 70_000 };
/** Pixels across of the faces' picture while turning, and of the table of surface colours. */
const coarse = 900;
const columns = 1024;

/** Lets orders that came meanwhile be heard between two pieces of work. */
const nextTask = (): Promise<void> => new Promise((done) => setTimeout(done));

/** What stands in the scene for one heat map. */
interface Built extends Shown {
  readonly bounds: Bounds;
  readonly turning: Mesh;
  readonly rest: Mesh;
  readonly lines: LineSegments;
  /** Both faces whole, for turning. */
  readonly whole: Mesh;
}

export class Solid {
  private readonly renderer: WebGLRenderer;
  private readonly scene = new Scene();
  private readonly camera = new PerspectiveCamera();
  private built: Built | null = null;
  /** The piece of the faces that was in view when the solid came to rest, finely. */
  private fine: Mesh | null = null;
  private pixels = { width: 1, height: 1, ratio: 1 };
  /** Counts what was asked to be shown; a building that is no longer the newest is given up. */
  private asked = 0;

  /** @throws when there is no WebGL */
  constructor(canvas: OffscreenCanvas) {
    this.renderer = new WebGLRenderer({ canvas, antialias: true });
    this.renderer.debug.checkShaderErrors = false;
    this.camera.matrixAutoUpdate = false;
    this.camera.matrixWorldAutoUpdate = false;
  }

  /**
   * Builds the solid in pieces of work. Resolves to its surface, for reading it; null when something
   * else was asked for meanwhile.
   */
  async show(shown: Shown): Promise<Boundary | null> {
    this.asked += 1;
    const ticket = this.asked;
    const bounds = boundsOf(shown.heat.outlines);
    const size = 2 * ballOf(bounds).radius;
    await nextTask();
    const boundary = boundaryOf(shown.heat);
    await nextTask();
    const chains = chainsOf(boundary);
    const table = chainColours(chains, (cell) => plainColour(shown.paint, cell), columns);
    await nextTask();
    const turning = ringsOf(chains, size, triangles.turning);
    await nextTask();
    const rest = ringsOf(chains, size, triangles.rest);
    await nextTask();
    if (ticket !== this.asked) return null;
    this.clear();
    this.renderer.setClearColor(new Color(shown.paper));
    this.built = {
      ...shown,
      bounds,
      turning: surfaceMesh(turning, table, columns),
      rest: surfaceMesh(rest, table, columns),
      lines: outlineLines(shown.heat.outlines, shown.ink),
      whole: faceMesh(shown.heat, shown.paint, wholeWindow(bounds), 1),
    };
    const { turning: a, rest: b, lines, whole } = this.built;
    this.scene.add(a, b, lines, whole);
    return boundary;
  }

  /** Sets the picture's size, px, and the device pixels to one of them. */
  resize(width: number, height: number, ratio: number): void {
    this.pixels = { width: Math.round(width * ratio), height: Math.round(height * ratio), ratio };
    this.renderer.setPixelRatio(ratio);
    this.renderer.setSize(width, height, false);
  }

  /** Draws once: coarsely while it moves, else as finely as the screen. */
  draw(camera: Camera, moving: boolean): void {
    if (this.built === null) return;
    const { turning, rest, whole, bounds, heat, paint } = this.built;
    this.dropFine();
    const window = moving ? null : visibleWindow(camera, bounds, this.pixels);
    if (window !== null) {
      this.fine = faceMesh(heat, paint, window, this.pixels.ratio);
      this.scene.add(this.fine);
    }
    turning.visible = moving;
    rest.visible = !moving;
    whole.visible = window === null;
    this.look(camera);
    this.renderer.render(this.scene, this.camera);
  }

  private look({ view, projection }: Camera): void {
    this.camera.matrixWorldInverse.fromArray(view);
    this.camera.matrixWorld.copy(this.camera.matrixWorldInverse).invert();
    this.camera.projectionMatrix.fromArray(projection);
    this.camera.projectionMatrixInverse.copy(this.camera.projectionMatrix).invert();
  }

  private dropFine(): void {
    if (this.fine === null) return;
    this.scene.remove(this.fine);
    release(this.fine);
    this.fine = null;
  }

  private clear(): void {
    this.dropFine();
    if (this.built === null) return;
    const { turning, rest, lines, whole } = this.built;
    for (const mesh of [turning, rest, lines, whole]) {
      this.scene.remove(mesh);
      release(mesh);
    }
    this.built = null;
  }
}

function wholeWindow({ rMax, zMin, zMax }: Bounds): Window {
  const step = Math.max(rMax, zMax - zMin) / coarse;
  return {
    left: 0,
    top: zMax,
    step,
    width: Math.ceil(rMax / step),
    height: Math.ceil((zMax - zMin) / step),
  };
}

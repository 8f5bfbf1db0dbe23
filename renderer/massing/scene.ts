import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DoubleSide,
  LineBasicMaterial,
  LineDashedMaterial,
  LineSegments,
  type Material,
  Mesh,
  MeshBasicMaterial,
  OrthographicCamera,
  Raycaster,
  Scene,
  Vector2,
  WebGLRenderer,
} from 'three';
import { axesOf, type Camera, type Size } from './camera.ts';
import type { Faces, Owner } from './faces.ts';
import type { Rgb } from './palette.ts';
import { StillPicture } from './still-picture.ts';
import type { Strokes } from './strokes.ts';

/** The layers of the drawing from the ground up. Ground layers are painted in this order; solids hide what lies behind them. */
const ORDER = ['plot', 'shadow', 'added', 'hatch', 'boundary', 'solids', 'faceShadow', 'edges', 'dashes'] as const;
export type Layer = (typeof ORDER)[number];

/** The camera stands this far back: outside any site [m]. */
const BACK_m = 5000;
const DASH_px = 5;
/** A view that has not changed for so long is at rest. */
const STILL_AFTER_ms = 160;

const FLAT = { vertexColors: true, side: DoubleSide } as const;
const ON_GROUND = { depthTest: false, depthWrite: false } as const;

/** Each layer's way of drawing. Faces stand back a little so that ink edges on them stay whole. */
const materials = (): { readonly [L in Layer]: Material } => ({
  plot: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  shadow: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  added: new MeshBasicMaterial({ ...FLAT, ...ON_GROUND }),
  hatch: new LineBasicMaterial({ vertexColors: true, ...ON_GROUND }),
  boundary: new LineDashedMaterial({ vertexColors: true, ...ON_GROUND }),
  solids: new MeshBasicMaterial({ ...FLAT, polygonOffset: true, polygonOffsetFactor: 2, polygonOffsetUnits: 4 }),
  faceShadow: new MeshBasicMaterial({
    ...FLAT,
    polygonOffset: true,
    polygonOffsetFactor: 1,
    polygonOffsetUnits: 2,
    depthWrite: false,
  }),
  edges: new LineBasicMaterial({ vertexColors: true }),
  dashes: new LineDashedMaterial({ vertexColors: true }),
});

/**
 * The drawing on the graphics card: a few merged meshes, redrawn only when something has changed. It holds no state of its own
 * beyond what it was last given.
 */
export class MassingScene {
  readonly #renderer: WebGLRenderer;
  readonly #scene = new Scene();
  readonly #camera = new OrthographicCamera();
  readonly #materials = materials();
  readonly #layers = new Map<Layer, Mesh | LineSegments>();
  readonly #caster = new Raycaster();
  #owners: readonly (Owner | null)[] = [];
  #size: Size = { width: 1, height: 1 };
  #view: Camera | null = null;
  #frame = 0;
  readonly #rest: StillPicture | null;
  #still: ReturnType<typeof setTimeout> | null = null;

  /**
   * @param canvas  drawn on by the graphics card, or by software in its place
   * @param above   a canvas over it for the picture at rest
   * @throws {Error} when the machine gives no WebGL context
   */
  constructor(canvas: HTMLCanvasElement, above: HTMLCanvasElement) {
    const isSoftware = drawsInSoftware();
    this.#renderer = new WebGLRenderer({ canvas, antialias: !isSoftware, powerPreference: 'low-power' });
    this.#rest = isSoftware ? new StillPicture(above, (dx, dy) => this.#drawAside(dx, dy)) : null;
    above.hidden = true;
    this.#scene.matrixAutoUpdate = false;
  }

  setGround(colour: Rgb): void {
    this.#scene.background = new Color().setRGB(...colour, 'srgb');
    this.invalidate();
  }

  setFaces(layer: Layer, faces: Faces): void {
    if (layer === 'solids') this.#owners = faces.owners;
    this.#put(layer, faces.positions, faces.colours, (g) => new Mesh(g, this.#materials[layer]));
  }

  setStrokes(layer: Layer, strokes: Strokes): void {
    this.#put(layer, strokes.positions, strokes.colours, (g) => {
      const lines = new LineSegments(g, this.#materials[layer]);
      if (this.#materials[layer] instanceof LineDashedMaterial) lines.computeLineDistances();
      return lines;
    });
  }

  #put(
    layer: Layer,
    positions: Float32Array,
    colours: Float32Array,
    make: (g: BufferGeometry) => Mesh | LineSegments,
  ): void {
    const old = this.#layers.get(layer);
    if (old !== undefined) {
      this.#scene.remove(old);
      old.geometry.dispose();
      this.#layers.delete(layer);
    }
    if (positions.length > 0) {
      const geometry = new BufferGeometry();
      geometry.setAttribute('position', new BufferAttribute(positions, 3));
      geometry.setAttribute('color', new BufferAttribute(linear(colours), 3));
      const thing = make(geometry);
      thing.renderOrder = ORDER.indexOf(layer);
      thing.frustumCulled = false;
      thing.matrixAutoUpdate = false;
      this.#layers.set(layer, thing);
      this.#scene.add(thing);
    }
    this.invalidate();
  }

  setCamera(view: Camera): void {
    this.#view = view;
    const { right, up, into } = axesOf(view);
    const [x, y, z] = view.centre;
    const camera = this.#camera;
    const halfWidth = this.#size.width / 2 / view.scale;
    const halfHeight = this.#size.height / 2 / view.scale;
    Object.assign(camera, {
      left: -halfWidth,
      right: halfWidth,
      top: halfHeight,
      bottom: -halfHeight,
      near: 0,
      far: 2 * BACK_m,
    });
    camera.matrixAutoUpdate = false;
    camera.matrix.set(
      right[0],
      up[0],
      -into[0],
      x - into[0] * BACK_m,
      right[1],
      up[1],
      -into[1],
      y - into[1] * BACK_m,
      right[2],
      up[2],
      -into[2],
      z - into[2] * BACK_m,
      0,
      0,
      0,
      1,
    );
    camera.matrixWorldNeedsUpdate = true;
    camera.updateMatrixWorld(true);
    camera.updateProjectionMatrix();
    for (const layer of ['boundary', 'dashes'] as const) {
      const material = this.#materials[layer] as LineDashedMaterial;
      material.dashSize = DASH_px / view.scale;
      material.gapSize = (DASH_px * 0.8) / view.scale;
    }
    this.invalidate();
  }

  resize(size: Size, pixelRatio: number): void {
    this.#size = size;
    this.#renderer.setPixelRatio(pixelRatio);
    this.#renderer.setSize(size.width, size.height, false);
    if (this.#view !== null) this.setCamera(this.#view);
    this.invalidate();
  }

  /** Asks for one redraw on the next frame, however often it is called. */
  invalidate(): void {
    this.#rest?.disturb();
    if (this.#still !== null) clearTimeout(this.#still);
    this.#still = this.#rest === null ? null : setTimeout(() => this.#rest?.rest(), STILL_AFTER_ms);
    if (this.#frame !== 0) return;
    this.#frame = requestAnimationFrame(() => {
      this.#frame = 0;
      this.draw();
    });
  }

  draw(): void {
    if (this.#view !== null) this.#renderer.render(this.#scene, this.#camera);
  }

  /** The picture moved by a fraction of a pixel, for smooth edges at rest. */
  #drawAside(dx: number, dy: number): HTMLCanvasElement {
    const { width, height } = this.#size;
    const pixel = 1 / this.#renderer.getPixelRatio();
    this.#camera.setViewOffset(width, height, dx * pixel, dy * pixel, width, height);
    this.draw();
    this.#camera.clearViewOffset();
    return this.#renderer.domElement;
  }

  /** What lies under a place on the screen, from the top left [px]. */
  pick(x: number, y: number): Owner | null {
    const solids = this.#layers.get('solids');
    if (solids === undefined) return null;
    const at = new Vector2((x / this.#size.width) * 2 - 1, 1 - (y / this.#size.height) * 2);
    this.#caster.setFromCamera(at, this.#camera);
    const hit = this.#caster.intersectObject(solids)[0];
    return hit?.faceIndex === undefined || hit.faceIndex === null ? null : (this.#owners[hit.faceIndex] ?? null);
  }

  dispose(): void {
    cancelAnimationFrame(this.#frame);
    if (this.#still !== null) clearTimeout(this.#still);
    for (const thing of this.#layers.values()) thing.geometry.dispose();
    for (const material of Object.values(this.#materials)) material.dispose();
    this.#rest?.dispose();
    this.#renderer.dispose();
  }
}

/** Whether pictures are drawn by the processor: smoothing edges as the card does then costs more than all the rest. */
function drawsInSoftware(): boolean {
  const probe = document.createElement('canvas').getContext('webgl2');
  if (probe === null) return true;
  const name = String(
    probe.getParameter(probe.getExtension('WEBGL_debug_renderer_info')?.UNMASKED_RENDERER_WEBGL ?? probe.RENDERER),
  );
  probe.getExtension('WEBGL_lose_context')?.loseContext();
  return /swiftshader|llvmpipe|software|basic render/i.test(name);
}

/** Style sheet colours are in sRGB; the card mixes and writes from linear light. */
function linear(colours: Float32Array): Float32Array {
  return colours.map((v) => (v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4));
}

import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DataTexture,
  LinearSRGBColorSpace,
  LineDashedMaterial,
  LineSegments,
  Mesh,
  type MeshBasicMaterial,
  OrthographicCamera,
  Raycaster,
  Scene,
  Vector2,
  WebGLRenderer,
} from 'three';
import { axesOf, type Camera, type Size } from './camera.ts';
import { drawsInSoftware } from './draws-in-software.ts';
import type { Vec3 } from '../../core/plane/vec.ts';
import type { Faces, Owner } from './faces.ts';
import type { CarriedMap } from './map-layer.ts';
import { type Layer, materials, ORDER } from './layers.ts';
import { Pace } from './pace.ts';
import type { Rgb } from './palette.ts';
import { StillPicture } from './still-picture.ts';
import type { Strokes } from './strokes.ts';

/** Layers of things that can be picked. */
const PICKED = ['solids', 'openings'] as const;

/** The camera stands this far back: outside any site [m]. */
const BACK_m = 5000;
const DASH_px = 5;
/** While a moving view cannot keep pace it is drawn with so many pixels for each of the screen's, across and down. */
const COARSE = 0.6;
/** A view that has not changed for so long is at rest. */
const STILL_AFTER_ms = 160;

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
  readonly #owners = new Map<Layer, readonly (Owner | null)[]>();
  #picture: DataTexture | null = null;
  #size: Size = { width: 1, height: 1 };
  #view: Camera | null = null;
  #frame = 0;
  #pixelRatio = 1;
  #sharpness = 1;
  readonly #pace = new Pace();
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
    // Nothing is lit and nothing shows through: colours of the style sheet go to the screen as they are, which spares every
    // pixel two powers.
    this.#renderer.outputColorSpace = LinearSRGBColorSpace;
    this.#rest = isSoftware ? new StillPicture(above, (dx, dy) => this.#drawAside(dx, dy)) : null;
    above.hidden = true;
    this.#scene.matrixAutoUpdate = false;
  }

  setGround(colour: Rgb): void {
    this.#scene.background = new Color().setRGB(...colour);
    this.invalidate();
  }

  setFaces(layer: Layer, faces: Faces): void {
    this.#owners.set(layer, faces.owners);
    const colours = new BufferAttribute(faces.colours, 3);
    this.#put(layer, faces.positions, 'color', colours, (g) => new Mesh(g, this.#materials[layer]));
  }

  /** Surfaces that carry a map; none, and they carry none. The picture comes by `setPicture`. */
  setMap(carried: CarriedMap | null): void {
    for (const [layer, part] of [
      ['groundMap', carried?.ground],
      ['faceMap', carried?.faces],
    ] as const) {
      const places = new BufferAttribute(part?.places ?? new Float32Array(0), 2);
      const positions = part?.positions ?? new Float32Array(0);
      this.#put(layer, positions, 'uv', places, (g) => new Mesh(g, this.#materials[layer]));
    }
  }

  /** The cells of the map, a pixel each: red, green, blue and 255, from the lower left. */
  setPicture(pixels: Uint8Array<ArrayBuffer>, width: number, height: number): void {
    if (this.#picture?.image.width === width && this.#picture.image.height === height) {
      this.#picture.image.data = pixels;
    } else {
      this.#picture?.dispose();
      this.#picture = new DataTexture(pixels, width, height);
      for (const layer of ['groundMap', 'faceMap'] as const) {
        const material = this.#materials[layer] as MeshBasicMaterial;
        material.map = this.#picture;
        material.needsUpdate = true;
      }
    }
    this.#picture.needsUpdate = true;
    this.invalidate();
  }

  setStrokes(layer: Layer, strokes: Strokes): void {
    const colours = new BufferAttribute(strokes.colours, 3);
    this.#put(layer, strokes.positions, 'color', colours, (g) => {
      const lines = new LineSegments(g, this.#materials[layer]);
      if (this.#materials[layer] instanceof LineDashedMaterial) lines.computeLineDistances();
      return lines;
    });
  }

  #put(
    layer: Layer,
    positions: Float32Array,
    name: 'color' | 'uv',
    attribute: BufferAttribute,
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
      geometry.setAttribute(name, attribute);
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
    this.#pixelRatio = pixelRatio;
    this.#setSharpness(1);
    if (this.#view !== null) this.setCamera(this.#view);
    this.invalidate();
  }

  /** Asks for one redraw on the next frame, however often it is called. */
  invalidate(): void {
    this.#rest?.disturb();
    if (this.#still !== null) clearTimeout(this.#still);
    this.#still = this.#rest === null ? null : setTimeout(() => this.#settle(), STILL_AFTER_ms);
    if (this.#frame !== 0) return;
    this.#frame = requestAnimationFrame((now) => {
      this.#frame = 0;
      const isSlow = this.#rest !== null && this.#pace.isTooSlow(now);
      if (isSlow && this.#sharpness === 1) this.#setSharpness(COARSE);
      this.draw();
    });
  }

  /** Sharp again, and then smooth. */
  #settle(): void {
    this.#pace.reset();
    if (this.#sharpness !== 1) {
      this.#setSharpness(1);
      this.draw();
    }
    this.#rest?.rest();
  }

  /** Draws with so many pixels for each that the screen has, across and down. */
  #setSharpness(share: number): void {
    this.#sharpness = share;
    this.#renderer.setPixelRatio(this.#pixelRatio * share);
    this.#renderer.setSize(this.#size.width, this.#size.height, false);
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

  /** What stands under a place on the screen, from the top left [px], and where it is met; null for the ground. */
  pick(x: number, y: number): { readonly owner: Owner | null; readonly at: Vec3 } | null {
    const at = new Vector2((x / this.#size.width) * 2 - 1, 1 - (y / this.#size.height) * 2);
    this.#caster.setFromCamera(at, this.#camera);
    let [nearest, found]: [number, ReturnType<MassingScene['pick']>] = [Infinity, null];
    for (const layer of PICKED) {
      const mesh = this.#layers.get(layer);
      const hit = mesh === undefined ? undefined : this.#caster.intersectObject(mesh)[0];
      if (hit === undefined || hit.distance >= nearest) continue;
      const owner = this.#owners.get(layer)?.[hit.faceIndex ?? -1] ?? null;
      [nearest, found] = [hit.distance, { owner, at: [hit.point.x, hit.point.y, hit.point.z] }];
    }
    return found;
  }

  dispose(): void {
    cancelAnimationFrame(this.#frame);
    if (this.#still !== null) clearTimeout(this.#still);
    for (const thing of this.#layers.values()) thing.geometry.dispose();
    for (const material of Object.values(this.#materials)) material.dispose();
    this.#picture?.dispose();
    this.#rest?.dispose();
    this.#renderer.dispose();
  }
}

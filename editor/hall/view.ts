import * as three from 'three';
import { OrbitControls } from 'three/addons/controls/OrbitControls.js';
import type { Mark } from '../../src/graph/index.ts';
import { buildHall, type HallColours } from './model.ts';

type HallMark = Mark & { mark: 'hall' };
export type Side = 'corner' | 'front' | 'back' | 'left' | 'right' | 'inside';

/** The hall on a canvas: built again when it changes, painted only when something has moved. */
export class HallView {
  private readonly renderer: three.WebGLRenderer;
  private readonly scene = new three.Scene();
  private readonly camera = new three.PerspectiveCamera(40, 1, 0.1, 1000);
  private readonly controls: OrbitControls;
  private group: three.Group | undefined;
  private waiting = false;

  /** @throws Error where the browser has no WebGL. */
  constructor(canvas: HTMLCanvasElement) {
    this.renderer = new three.WebGLRenderer({ canvas, antialias: true });
    this.controls = new OrbitControls(this.camera, canvas);
    this.controls.addEventListener('change', () => this.paint());
    const sun = new three.DirectionalLight('#ffffff', 2.2);
    sun.position.set(-30, 60, 40);
    this.scene.add(sun, new three.HemisphereLight('#ffffff', '#b5a98f', 1.6));
  }

  resize(width: number, height: number): void {
    this.renderer.setSize(width, height, false);
    this.camera.aspect = width / Math.max(height, 1);
    this.camera.updateProjectionMatrix();
    this.paint();
  }

  show(hall: HallMark | undefined, colours: HallColours, sky: string): void {
    if (this.group !== undefined) {
      this.scene.remove(this.group);
      dispose(this.group);
    }
    this.scene.background = new three.Color(sky);
    this.group = hall === undefined ? undefined : buildHall(hall, colours);
    if (this.group !== undefined) this.scene.add(this.group);
    this.paint();
  }

  /** Looks at the hall from a side. */
  look(hall: HallMark, side: Side): void {
    const xs = hall.points.map(({ x }) => x);
    const ys = hall.points.map(({ y }) => y);
    const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
    const length = hall.bays * hall.spacing;
    const centre = new three.Vector3((left + right) / 2, (low + high) / 2, length / 2);
    const reach = Math.max(right - left, length, high - low);
    const from: Record<Side, readonly [number, number, number]> = {
      corner: [left - reach * 0.55, high + reach * 0.3, length + reach * 0.75],
      front: [centre.x, centre.y, length + reach * 1.3],
      back: [centre.x, centre.y, -reach * 1.3],
      left: [left - reach * 1.3, centre.y, centre.z],
      right: [right + reach * 1.3, centre.y, centre.z],
      inside: [centre.x, low + 1.7, length - 0.5],
    };
    this.camera.position.set(...from[side]);
    this.controls.target.copy(side === 'inside' ? new three.Vector3(centre.x, low + 2.4, 0) : centre);
    this.controls.update();
    this.paint();
  }

  destroy(): void {
    this.controls.dispose();
    if (this.group !== undefined) dispose(this.group);
    this.renderer.dispose();
  }

  private paint(): void {
    if (this.waiting) return;
    this.waiting = true;
    requestAnimationFrame(() => {
      this.waiting = false;
      this.renderer.render(this.scene, this.camera);
    });
  }
}

function dispose(group: three.Group): void {
  group.traverse((object) => {
    if (object instanceof three.Mesh || object instanceof three.LineSegments) {
      object.geometry.dispose();
      (object.material as three.Material).dispose();
    }
    if (object instanceof three.InstancedMesh) object.dispose();
  });
}

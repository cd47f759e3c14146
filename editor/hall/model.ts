import * as three from 'three';
import type { Mark, XY } from '../../src/graph/index.ts';

type HallMark = Mark & { mark: 'hall' };

/** Colours of the hall, taken from the window's look. */
export interface HallColours {
  readonly member: string;
  readonly ground: string;
  readonly line: string;
  readonly person: string;
}

/** The arch repeated along its bays, with purlins, ground, bay grid and people: a group of instanced boxes. */
export function buildHall(hall: HallMark, colours: HallColours): three.Group {
  const group = new three.Group();
  const frames = Array.from({ length: hall.bays + 1 }, (_, i) => i * hall.spacing);
  const length = hall.bays * hall.spacing;
  const pieces = hall.points.slice(1).map((to, i) => [hall.points[i] as XY, to] as const);

  const members = boxes(colours.member, pieces.length * frames.length);
  let n = 0;
  for (const z of frames) {
    for (const [from, to] of pieces)
      members.setMatrixAt(n++, alongPlane(from, to, z, hall.depth, hall.breadth));
  }
  group.add(members);

  const thickness = Math.max(0.12, hall.depth * 0.3);
  const purlins = boxes(colours.member, hall.purlins.length);
  for (const [i, at] of hall.purlins.entries()) {
    const matrix = new three.Matrix4().makeTranslation(
      at.x,
      at.y + hall.depth / 2 + thickness / 2,
      length / 2,
    );
    purlins.setMatrixAt(i, matrix.scale(new three.Vector3(thickness, thickness, Math.max(length, 0.01))));
  }
  group.add(purlins);
  group.add(groundOf(hall, frames, length, colours), people(hall, length, colours));
  return group;
}

function boxes(colour: string, count: number): three.InstancedMesh {
  const material = new three.MeshLambertMaterial({ color: colour });
  return new three.InstancedMesh(new three.BoxGeometry(1, 1, 1), material, count);
}

/** A box from one point to another of an arch, as deep as its members. */
function alongPlane(from: XY, to: XY, z: number, depth: number, breadth: number): three.Matrix4 {
  const [dx, dy] = [to.x - from.x, to.y - from.y];
  // Half the depth more at either end closes the outside of the knees.
  const long = Math.hypot(dx, dy) + depth * 0.4;
  const place = new three.Vector3((from.x + to.x) / 2, (from.y + to.y) / 2, z);
  const turn = new three.Quaternion().setFromAxisAngle(new three.Vector3(0, 0, 1), Math.atan2(dy, dx));
  return new three.Matrix4().compose(place, turn, new three.Vector3(long, depth, breadth));
}

function lowest(hall: HallMark): number {
  return Math.min(...hall.points.map(({ y }) => y));
}

function groundOf(hall: HallMark, frames: readonly number[], length: number, { ground, line }: HallColours) {
  const group = new three.Group();
  const xs = hall.points.map(({ x }) => x);
  const [left, right] = [Math.min(...xs), Math.max(...xs)];
  const low = lowest(hall);
  const margin = (right - left) * 0.5;
  const plane = new three.Mesh(
    new three.PlaneGeometry(right - left + 2 * margin, length + 2 * margin),
    new three.MeshLambertMaterial({ color: ground }),
  );
  plane.rotation.x = -Math.PI / 2;
  plane.position.set((left + right) / 2, low - 0.02, length / 2);
  const grid = [
    ...frames.flatMap((z) => [left - 2, low, z, right + 2, low, z]),
    ...[left, right].flatMap((x) => [x, low, -2, x, low, length + 2]),
  ];
  const geometry = new three.BufferGeometry();
  geometry.setAttribute('position', new three.Float32BufferAttribute(grid, 3));
  group.add(plane, new three.LineSegments(geometry, new three.LineBasicMaterial({ color: line })));
  return group;
}

/** Figures 1.75 m tall, for scale. */
function people(hall: HallMark, length: number, { person }: HallColours): three.Group {
  const group = new three.Group();
  const low = lowest(hall);
  const xs = hall.points.map(({ x }) => x);
  const [left, right] = [Math.min(...xs), Math.max(...xs)];
  const material = new three.MeshLambertMaterial({ color: person });
  for (const [u, v] of [
    [0.42, 0.15],
    [0.47, 0.17],
    [0.6, 0.45],
    [0.35, 0.7],
  ] as const) {
    const body = new three.Mesh(new three.CapsuleGeometry(0.22, 1.05, 4, 8), material);
    const head = new three.Mesh(new three.SphereGeometry(0.13, 10, 8), material);
    const [x, z] = [left + (right - left) * u, length * v];
    body.position.set(x, low + 0.75, z);
    head.position.set(x, low + 1.62, z);
    group.add(body, head);
  }
  return group;
}

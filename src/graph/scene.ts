import type { Mark } from './mark.ts';
import type { Session } from './session.ts';

/** What one output of a node draws. */
export interface SceneItem {
  readonly node: string;
  readonly output: string;
  readonly marks: readonly Mark[];
}

/** All that a graph has to draw now, in the order of its links. What waits for a query draws nothing. */
export function sceneOf(session: Session): SceneItem[] {
  const items: SceneItem[] = [];
  for (const [id, { type }] of session.live.traced.nodes) {
    for (const [output, spec] of Object.entries(type?.outputs ?? {})) {
      const { draw } = spec.kind;
      const value = draw === undefined ? undefined : session.value(id, output);
      if (draw === undefined || value === undefined) continue;
      const values: readonly unknown[] = spec.many ? (value as unknown[]) : [value];
      items.push({ node: id, output, marks: values.flatMap((one) => draw(one)) });
    }
  }
  return items;
}

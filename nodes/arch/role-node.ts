import { type AnyNodeDeclaration, defineNode, input, output } from '../../src/graph/index.ts';
import type { Role } from '../../src/mechanics/index.ts';
import { point } from '../setting-out/kinds.ts';
import { keyPoint } from './kinds.ts';

/** A node that says what the arch does at a point. */
export function roleNode(role: Role, name: string, title: string, help: string): AnyNodeDeclaration {
  return defineNode({
    name,
    title,
    band: 'arch',
    help,
    inputs: { point: input(point, 'Point') },
    outputs: { keyPoint: output(keyPoint, title) },
    trace: ({ point: at }) => ({ keyPoint: { role, point: at } }),
    example: { inputs: { point: ['4 m', '3 m'] }, gives: { keyPoint: [role, ['4 m', '3 m']] } },
  });
}

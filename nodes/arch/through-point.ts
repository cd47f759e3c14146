import { roleNode } from './role-node.ts';

export const throughPoint = roleNode(
  'through',
  'through-point',
  'Point on an arc',
  'Makes the segment between its two neighbours the arc that passes through it.',
);

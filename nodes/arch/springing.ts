import { roleNode } from './role-node.ts';

export const springing = roleNode(
  'springing',
  'springing',
  'Springing',
  'Where the arch stands: pinned to the ground, at either end of the axis.',
);

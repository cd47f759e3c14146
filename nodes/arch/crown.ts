import { roleNode } from './role-node.ts';

export const crown = roleNode('crown', 'crown', 'Crown', 'The hinge between the two halves.');

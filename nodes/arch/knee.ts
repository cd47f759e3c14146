import { roleNode } from './role-node.ts';

export const knee = roleNode('knee', 'knee', 'Knee', 'A rigid corner of the axis.');

import type { Point } from '../../src/geometry/index.ts';
import { Refusal } from '../../src/tape/index.ts';

/** The branch of an intersection from its setting and the reference point, which `nearest` needs. */
export function branchOf<B extends string>(
  branch: B | 'nearest',
  reference: Point | undefined,
): Exclude<B, 'nearest'> | { readonly nearest: Point } {
  if (branch !== 'nearest') return branch as Exclude<B, 'nearest'>;
  if (reference === undefined) {
    throw new Refusal(
      'no-reference',
      'the point nearest to a reference is wanted, and no reference is linked: link one, or set which point is meant',
    );
  }
  return { nearest: reference };
}

import { measures } from '../quantity/index.ts';
import { countAsNumber, defineKind, type Kind, quantity, scalarKind } from './kind.ts';

/** The kinds of figures, which every pack shares. */
export const number = scalarKind('number', measures.number);
export const length = scalarKind('length', measures.length);
export const angle = scalarKind('angle', measures.angle);
export const force = scalarKind('force', measures.force);
export const moment = scalarKind('moment', measures.moment, { line: 'results' });
export const lineLoad = scalarKind('line load', measures.lineLoad);
export const areaLoad = scalarKind('area load', measures.areaLoad);

/** A whole number that is known while tracing: it decides how many of something there are. */
export const count: Kind<number> = defineKind<number>({
  name: 'count',
  called: 'a count',
  line: 'numbers',
  measure: measures.number,
  typed: 'counts',
  alsoAs: [
    { kind: quantity, convert: countAsNumber },
    { kind: number, convert: countAsNumber },
  ],
  literal: (literal) => Number(literal),
});

/** A turn that drives a mechanism, followed as a variable of its own. It also stands for an angle. */
export const perturbation = scalarKind('perturbation', measures.angle, { line: 'virtual', also: [angle] });

export { quantity };

/** All of the above. */
export const figureKinds = [
  number,
  count,
  length,
  angle,
  force,
  moment,
  lineLoad,
  areaLoad,
  quantity,
  perturbation,
] as const;

import * as v from 'valibot';
import { FORMAT_VERSION } from './document.ts';

const name = v.pipe(v.string(), v.minLength(1), v.maxLength(200));
const words = v.pipe(v.string(), v.maxLength(10_000));
const end = v.strictTuple([name, name]);

const nodeSchema = v.looseObject({
  id: v.pipe(name, v.description('Unique within the graph.')),
  type: v.pipe(name, v.description('PACK/NODE.')),
  name: v.optional(words),
  place: v.pipe(
    v.optional(v.strictTuple([v.number(), v.number()])),
    v.description('Where the node lies on the board.'),
  ),
  values: v.pipe(
    v.optional(v.record(name, v.pipe(v.string(), v.maxLength(200)))),
    v.description('What is typed into inputs, with units: "3 m".'),
  ),
  settings: v.optional(v.record(name, v.union([v.pipe(v.string(), v.maxLength(10_000)), v.boolean()]))),
  remark: v.optional(words),
});

const linkSchema = v.looseObject({
  from: v.pipe(end, v.description('Node and output.')),
  to: v.pipe(end, v.description('Node and input. Links into one input are ordered as they stand here.')),
});

/** The shape of a graph file of the present version. Members that are not named here are allowed and kept. */
export const documentSchema = v.pipe(
  v.looseObject({
    format: v.literal('skewback-graph'),
    version: v.literal(FORMAT_VERSION),
    title: words,
    remark: v.optional(words),
    packs: v.optional(v.record(name, name)),
    nodes: v.array(nodeSchema),
    links: v.array(linkSchema),
    rail: v.pipe(v.array(name), v.description('Nodes on the rail, in order: sliders and readings.')),
  }),
  v.title('Skewback graph'),
  v.description('A graph of Skewback, a parametric geometry engine for three-hinged arches.'),
);

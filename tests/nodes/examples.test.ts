import { describe, expect, it } from 'vitest';
import { builtIn } from '../../nodes/index.ts';
import { BANDS, type NodeType, resolve, Session, scalarsIn } from '../../src/graph/index.ts';
import { evaluate, finish } from '../../src/tape/index.ts';
import { graphOf } from '../support/graphs.ts';
import {
  slopeGap,
  statedFigures,
  type TracedExample,
  traceExample,
  traceSurroundings,
  unitGap,
} from '../support/laws.ts';
import { randomFrom } from '../support/random.ts';
import { NOT_OUR_WORDS } from '../support/words.ts';

const alone = builtIn.nodes.filter(({ example }) => example.around === undefined);
const within = builtIn.nodes.filter(({ example }) => example.around !== undefined);
const named = (nodes: readonly NodeType[]) => nodes.map((node) => [node.type, node] as const);

/** Rounding of a few hundred operations on figures of a building. */
const ROUNDING = 1e-12;

function holdsLaws(traced: TracedExample): void {
  it('is the same in other units', () => {
    const random = randomFrom(17);
    for (let i = 0; i < 5; i++) {
      const unit = (): number => 10 ** random(-1, 1);
      expect(unitGap(traced, [unit(), unit(), unit()])).toBeLessThan(1e-9);
    }
  });

  it('has the slopes that differences show', () => {
    // The error of differences: first order in steps of 1e-6 where the mean does not serve, and rounding.
    expect(slopeGap(traced)).toBeLessThan(5e-5);
  });
}

describe.each(named(builtIn.nodes))('%s', (_, node) => {
  it('has a title, one line of help, a band, and an example that states a figure', () => {
    expect(node.title).toMatch(/^\p{Lu}[^!]*$/u);
    expect(node.help).toMatch(/^\p{Lu}[^\n!]*\.$/u);
    expect(BANDS).toContain(node.band);
    expect(Object.keys(node.example.gives).length).toBeGreaterThan(0);
    for (const output of Object.keys(node.example.gives)) expect(Object.keys(node.outputs)).toContain(output);
    const parts = [node.inputs, node.settings, node.outputs].flatMap((specs) => Object.values(specs));
    for (const { title } of parts) {
      expect(title).toMatch(/^\p{Lu}[^!.]*$/u);
      expect(title).not.toMatch(NOT_OUR_WORDS);
    }
    expect(`${node.title}. ${node.help}`).not.toMatch(NOT_OUR_WORDS);
    expect(node.name).toMatch(/^[a-z]+(-[a-z]+)*$/);
  });
});

describe.each(named(alone))('the example of %s', (_, node) => {
  const traced = traceExample(node);
  holdsLaws(traced);

  it('comes out as it says', () => {
    for (const output of Object.keys(node.example.gives)) {
      const value = traced.outputs[output];
      const stated = statedFigures(node, output);
      const found =
        typeof value === 'number'
          ? [value]
          : [...evaluate(finish(traced.trace, scalarsIn(value)), traced.values)];
      expect(found).toHaveLength(stated.length);
      for (const [i, figure] of found.entries()) {
        const size = Math.max(1, ...stated.map(Math.abs));
        expect(Math.abs(figure - (stated[i] as number))).toBeLessThanOrEqual(ROUNDING * size);
      }
    }
  });
});

describe.each(named(within))('the example of %s, in its surroundings', (_, node) => {
  holdsLaws(traceSurroundings(node));

  it('comes out as it says', () => {
    const { nodes = [], links = [] } = node.example.around ?? {};
    const document = { ...graphOf([...nodes, { id: 'this', type: node.type }]), links };
    const session = new Session(document, builtIn);
    expect(session.queries).toEqual([]);
    for (const output of Object.keys(node.example.gives)) {
      const value = session.value('this', output) as number;
      const [wanted = Number.NaN] = statedFigures(node, output);
      expect(Math.abs(value - wanted)).toBeLessThanOrEqual(ROUNDING * Math.max(1, Math.abs(wanted)));
    }
  });
});

describe('a kind that draws', () => {
  it.each(named(alone))('%s draws its example by finite figures', (_, node) => {
    const { outputs, trace, values } = traceExample(node);
    for (const [name, { kind, many }] of Object.entries(node.outputs)) {
      if (kind.draw === undefined) continue;
      const scalars = scalarsIn(outputs[name]);
      const figures = evaluate(finish(trace, scalars), values);
      const byIndex = new Map(scalars.map((scalar, i) => [scalar.index, figures[i] as number]));
      const plain = resolve(outputs[name], (scalar) => byIndex.get(scalar.index) ?? Number.NaN);
      const marks = (many ? (plain as unknown[]) : [plain]).flatMap((one) => kind.draw?.(one as never) ?? []);
      const drawn = many ? (plain as unknown[]).length : 1;
      expect(marks.length).toBeGreaterThanOrEqual(drawn);
      expect(JSON.stringify(marks)).not.toContain('null');
    }
  });
});

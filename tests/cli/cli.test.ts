import { spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { main } from '../../src/cli/main.ts';
import { sliders } from '../../src/graph/index.ts';
import { graphOf, openReady } from '../support/graphs.ts';

const ROOT = join(import.meta.dirname, '../..');
const BARN = join(ROOT, 'graphs/riding-barn.skewback.json');

function call(...args: string[]) {
  let printed = '';
  const errors: string[] = [];
  const status = main(args, { print: (text) => (printed += text), error: (line) => errors.push(line) });
  return { status, printed, errors };
}

function fileOf(content: unknown): string {
  const file = join(mkdtempSync(join(tmpdir(), 'skewback-')), 'graph.skewback.json');
  writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content));
  return file;
}

const barnWithout = (id: string) => {
  const { document } = openReady('riding-barn');
  return fileOf({ ...document, nodes: document.nodes.filter((node) => node.id !== id) });
};

describe('skewback evaluate', () => {
  it('prints the readings, with their limits', () => {
    const { status, printed, errors } = call('evaluate', BARN);
    expect(status).toBe(0);
    expect(errors).toEqual([]);
    expect(printed.split('\n')[0]).toBe('Left knee moment: −135.2\u00a0kN·m, at least −320.0\u00a0kN·m: met');
  });

  it('prints them in US customary units', () => {
    expect(call('evaluate', BARN, '--units', 'US').printed).toContain('Length of the axis: 98.52\u00a0ft');
  });

  it('sets sliders by name or id, whatever the case', () => {
    const plain = JSON.parse(call('evaluate', BARN, '--json').printed);
    const byName = call('evaluate', BARN, '--json', '--set', 'bay SPACING = 12 m', '--set', 'wind=0 kN/m²');
    const byId = call(
      'evaluate',
      BARN,
      '--json',
      '--set',
      'bay=12 m',
      '--set',
      'Wind on the left column=0 psf',
    );
    expect(byName.printed).toBe(byId.printed);
    // Without wind the moments are in proportion to the bay spacing.
    const still = JSON.parse(call('evaluate', BARN, '--json', '--set', 'wind=0 kN/m²').printed);
    expect(JSON.parse(byName.printed).readings[0].value / still.readings[0].value).toBeCloseTo(2, 10);
    expect(still.readings[0].value).not.toBe(plain.readings[0].value);
    expect(byName.errors).toEqual(['Bay spacing is set beyond the upper bound of its slider, 8.000\u00a0m']);
    expect(byName.status).toBe(0);
  });

  it('prints JSON in SI units', () => {
    const { printed } = call('evaluate', BARN, '--json');
    const { format, version, readings, queries, pull } = JSON.parse(printed);
    expect({ format, version, queries, pull }).toEqual({
      format: 'skewback-readings',
      version: 1,
      queries: [],
      pull: undefined,
    });
    // By hand: H = 270/7.749 − 11.540 = 23.302 kN at the left, and M = −4.5 H − 2.25 · 13.5 kN·m.
    expect(readings[0]).toEqual({
      name: 'Left knee moment',
      value: expect.closeTo(-135_234.9, 1),
      unit: 'N·m',
      text: '−135.2\u00a0kN·m',
      limit: { rule: 'at least', value: -320_000, unit: 'N·m', text: '−320.0\u00a0kN·m' },
      meets: true,
    });
    expect(readings[3]).toEqual({
      name: 'Length of the axis',
      value: expect.closeTo(30.0292, 3),
      unit: 'm',
      text: '30.03\u00a0m',
    });
  });

  it('adds the pull of every slider on a reading', () => {
    const { pull } = JSON.parse(call('evaluate', BARN, '--json', '--pull', 'left KNEE moment').printed);
    expect(Object.keys(pull)).toEqual([
      'Span',
      'Eaves',
      'Pitch',
      'Bay spacing',
      'Roof and snow on plan',
      'Wind on the left column',
    ]);
    const at = (span: string): number =>
      JSON.parse(call('evaluate', BARN, '--json', '--set', `span=${span}`).printed).readings[0].value;
    expect(pull.Span.unit).toBe('N·m/m');
    expect(pull.Pitch.unit).toBe('N·m/rad');
    expect(pull['Roof and snow on plan'].unit).toBe('N·m/(N/m²)');
    expect(pull.Span.value / ((at('20.001 m') - at('19.999 m')) / 0.002)).toBeCloseTo(1, 6);
    const { printed } = call('evaluate', BARN, '--pull', 'thrust, right springing');
    expect(printed).toContain('Pull on Thrust, right springing\n  Span: ');
    expect(printed).toMatch(/ {2}Pitch: [\d.]+ kN\/°\n/);
  });

  it.each(['Left knee moment', 'Right knee moment', 'Thrust, right springing', 'Length of the axis'])(
    'adds pulls on %s that moving each slider shows',
    (reading) => {
      const { pull } = JSON.parse(call('evaluate', BARN, '--json', '--pull', reading).printed);
      const at = (id: string, value: number, unit: string): number => {
        const { printed } = call('evaluate', BARN, '--json', '--set', `${id}=${value} ${unit}`);
        const found = JSON.parse(printed).readings.find(({ name }: { name: string }) => name === reading);
        return found.value;
      };
      const session = openReady('riding-barn');
      for (const { id, name, measure } of sliders(session)) {
        const value = session.value(id, 'value') as number;
        const step = 1e-4 * Math.max(Math.abs(value), 0.1);
        const [above, below] = [
          at(id, value + step, measure.coherent),
          at(id, value - step, measure.coherent),
        ];
        const slope = (above - below) / (2 * step);
        // Central differences: second order in a step of 1e-4, and the reading's rounding over the step.
        const tolerance = 1e-6 * Math.abs(slope) + (1e-12 * Math.abs(above)) / step;
        expect(Math.abs(pull[name].value - slope), name).toBeLessThanOrEqual(tolerance);
      }
    },
  );

  it('keeps the shape of its JSON, member by member', () => {
    const { printed } = call('evaluate', BARN, '--json', '--pull', 'thrust, right springing');
    const found = JSON.parse(printed);
    expect(Object.keys(found)).toEqual(['format', 'version', 'readings', 'queries', 'pull']);
    for (const reading of found.readings) {
      const { limit, meets, ...rest } = reading;
      expect(rest).toEqual({
        name: expect.any(String),
        value: expect.any(Number),
        unit: expect.stringMatching(/^(N·m|N|m)$/),
        text: expect.stringMatching(/^−?[\d.]+\u00a0\S+$/),
      });
      expect(limit === undefined).toBe(meets === undefined);
      if (limit !== undefined) {
        expect(Object.keys(limit)).toEqual(['rule', 'value', 'unit', 'text']);
        expect(typeof meets).toBe('boolean');
      }
    }
    for (const pull of Object.values(found.pull)) {
      expect(pull).toEqual({ value: expect.any(Number), unit: expect.stringMatching(/^N\/\S+$/) });
    }
    // Values do not follow the units that texts are printed in.
    const us = JSON.parse(call('evaluate', BARN, '--json', '--units', 'US').printed);
    expect(us.readings.map(({ value }: { value: number }) => value)).toEqual(
      found.readings.map(({ value }: { value: number }) => value),
    );
    expect(us.readings[3].text).toBe('98.52\u00a0ft');
  });

  it('tells sliders of one name apart by their ids', () => {
    const file = fileOf(
      graphOf(
        [
          { id: 'a', type: 'quantities/length' },
          { id: 'b', type: 'quantities/length' },
          { id: 'n', type: 'quantities/count' },
          { id: 'f', type: 'quantities/formula', settings: { formula: 'a * b' } },
          { id: 'r', type: 'quantities/reading' },
        ],
        ['a.value > f.a', 'b.value > f.b', 'f.result > r.value'],
        ['a', 'b', 'n', 'r'],
      ),
    );
    const { pull } = JSON.parse(call('evaluate', file, '--json', '--pull', 'r', '--set', 'b=5 m').printed);
    expect(pull).toEqual({
      'Length (a)': { value: 5, unit: 'm²/m' },
      'Length (b)': { value: 3, unit: 'm²/m' },
      Count: { value: null, unit: 'm²' },
    });
    expect(call('evaluate', file, '--pull', 'r').printed).toContain('  Length (a): 3.000 m²/m\n');
    expect(call('evaluate', file, '--set', 'length=5 m')).toMatchObject({
      status: 2,
      errors: ['2 are called "length": use an id (a, b)'],
    });
  });

  it('does not pretend to set a slider whose value a link brings', () => {
    const file = fileOf(
      graphOf(
        [
          { id: 'a', type: 'quantities/length' },
          { id: 'b', type: 'quantities/length', name: 'Rise' },
          { id: 'r', type: 'quantities/reading' },
        ],
        ['a.value > b.value', 'b.value > r.value'],
        ['b', 'r'],
      ),
    );
    expect(call('evaluate', file, '--set', 'rise=9 m')).toEqual({
      status: 2,
      printed: '',
      errors: ['--set Rise: a link brings its value: set what the link comes from'],
    });
    expect(call('evaluate', file, '--pull', 'r').printed).toBe(
      'Reading: 3.000\u00a0m\nPull on Reading\n  Rise: none\n',
    );
  });

  it('prints names from a file on one line, and nothing that would move a terminal’s cursor', () => {
    const name = 'Knee\n\u001b[2JThrust: 0 kN\u009b1m';
    const file = fileOf(
      graphOf(
        [
          { id: 'a', type: 'quantities/length', name, settings: { upper: '1 m' } },
          { id: 'r', type: 'quantities/reading', name },
          { id: 's', type: 'quantities/reading', name: `${name}2` },
          { id: 'gone\u001b[2J', type: 'towers/spire', name },
        ],
        ['a.value > r.value'],
        ['a'],
      ),
    );
    for (const args of [
      ['evaluate', file, '--pull', 'r', '--set', 'a=2 m'],
      ['evaluate', file, '--set', `${name}x=2 m`],
      ['evaluate', file, '--pull', 'x'],
      ['evaluate', file, '--set', 'a=2'],
      ['check', file],
    ]) {
      const { printed, errors } = call(...args);
      for (const line of [...printed.split('\n'), ...errors]) expect(line).not.toMatch(/[\p{Cc}\p{Zl}]/u);
      expect(printed.split('\n').filter((line) => line.startsWith('\u001b'))).toEqual([]);
    }
    expect(call('evaluate', file).printed.split('\n')).toHaveLength(3);
  });

  it('ends with 0 where a query stands in no reading’s way, and says it on standard error', () => {
    const { document } = openReady('riding-barn');
    const file = fileOf({ ...document, nodes: [...document.nodes, { id: 'x', type: 'setting-out/chord' }] });
    const { status, errors } = call('evaluate', file);
    expect(status).toBe(0);
    expect(errors).toEqual([
      'Chord (x): Input "From" has nothing linked to it: link a point',
      'Chord (x): Input "To" has nothing linked to it: link a point',
    ]);
    expect(call('check', file).status).toBe(3);
  });

  it('ends with 3 where what is set leaves a reading without a figure', () => {
    const { status, printed, errors } = call('evaluate', BARN, '--set', 'eaves=0 m', '--set', 'pitch=0°');
    expect(status).toBe(3);
    expect(printed).toContain('Left knee moment: waits for a query');
    expect(errors.slice(0, 2)).toEqual([
      'Eaves is set beyond the lower bound of its slider, 3.000\u00a0m',
      'Pitch is set beyond the lower bound of its slider, 5.000°',
    ]);
    expect(errors.join('\n')).toMatch(/Moment at the left knee \(m-left\): /);
  });

  it('takes the last where one slider is set twice, and a figure in any unit', () => {
    const value = (...set: string[]): number =>
      JSON.parse(call('evaluate', BARN, '--json', ...set.flatMap((one) => ['--set', one])).printed)
        .readings[0].value;
    expect(value('span=22 m', 'span=24 m')).toBe(value('SPAN = 24 m'));
    expect(value('span=22 m')).toBeCloseTo(value('span=2200cm'), 6);
    expect(value('span=80 ft')).toBeCloseTo(value('span=24.384 m'), 6);
  });

  it('says that a graph has no readings', () => {
    const file = fileOf(graphOf([{ id: 'a', type: 'quantities/length' }], [], ['a']));
    expect(call('evaluate', file)).toMatchObject({ status: 0, printed: 'The graph has no readings.\n' });
    expect(call('evaluate', file, '--pull', 'x').errors).toEqual(['no reading is called "x"; there is none']);
  });

  it('ends with 3 where a query stands in the way of a reading, and says it on standard error', () => {
    const file = barnWithout('k2');
    const { status, printed, errors } = call('evaluate', file);
    expect(status).toBe(3);
    expect(printed).toContain('Left knee moment: waits for a query\n');
    expect(errors.join('\n')).toContain('linked to a node "k2" that the graph does not have');
    const { readings, queries } = JSON.parse(call('evaluate', file, '--json').printed);
    expect(readings[0]).toMatchObject({ value: null, unit: 'N·m', text: 'waits for a query' });
    // What concerns no one node comes first, with no node named.
    expect(queries[0]).toEqual({ node: null, text: expect.stringContaining('k2') });
    expect(queries).toContainEqual({ node: 'right-rafter', text: expect.stringContaining('k2') });
  });

  it.each([
    [
      ['evaluate', BARN, '--set', 'height=3 m'],
      'no slider of the rail is called "height"; there are: Span, Eaves',
    ],
    [['evaluate', BARN, '--set', 'span=3 kN'], '--set Span: "3 kN" is a force where a length is wanted'],
    [['evaluate', BARN, '--set', 'span=30'], '--set Span: "30" has no unit where a length is wanted'],
    [['evaluate', BARN, '--set', 'span'], '--set takes NAME=QUANTITY'],
    [['evaluate', BARN, '--pull', 'weight'], 'no reading is called "weight"; there are: Left knee moment'],
    [['evaluate', BARN, '--units', 'metric'], '--units is SI or US, not "metric"'],
    [['evaluate', BARN, '--colour'], "Unknown option '--colour'"],
    [['evaluate'], 'name a graph file'],
    [['evaluate', BARN, BARN], 'one file at a time'],
    [['evaluate', 'nowhere.skewback.json'], 'nowhere.skewback.json: there is no such file'],
    [['evaluate', ROOT], 'EISDIR'],
    [['evaluate', fileOf('no json')], 'the file is not JSON'],
    [['evaluate', fileOf({ format: 'other' })], 'the file is no graph'],
    [['draw', BARN], 'there is no call "draw": use nodes, check or evaluate'],
    [['constructor'], 'there is no call "constructor"'],
  ])('%j ends with 2 and one line', (args, words) => {
    const { status, printed, errors } = call(...(args as string[]));
    expect(status).toBe(2);
    expect(printed).toBe('');
    expect(errors).toHaveLength(1);
    expect(errors[0]).toContain(words);
    expect(errors[0]).not.toContain('\n');
  });
});

describe('skewback check', () => {
  it('says that nothing is wrong', () => {
    const { status, printed } = call('check', BARN);
    expect(status).toBe(0);
    expect(printed).toMatch(/^45 nodes, 83 links, \d+ operations: no query\n$/);
  });

  it('lists the queries, with the name of the node', () => {
    const { status, printed } = call('check', barnWithout('k2'));
    expect(status).toBe(3);
    expect(printed).toContain('Right rafter (right-rafter): Input "To" is linked to a node "k2"');
    expect(printed).toMatch(/: \d queries\n$/);
  });
});

describe('skewback nodes', () => {
  it('lists every node for people', () => {
    const { status, printed } = call('nodes');
    expect(status).toBe(0);
    expect(printed).toContain('setting-out/circles-meet: Intersection of two circles');
    expect(printed).toContain('  input   reference: Reference (point, or none)');
    expect(printed).toContain('  setting branch: Which point (nearest, left, right; nearest)');
    expect(printed).toContain('  input   loads: Loads (any number of load)');
  });

  it('lists every node for programs', () => {
    const { nodes } = JSON.parse(call('nodes', '--json').printed);
    const point = nodes.find(({ type }: { type: string }) => type === 'setting-out/point');
    expect(point).toMatchObject({
      title: 'Point',
      band: 'setting-out',
      inputs: [
        { name: 'across', kind: 'length', links: 'one', default: '0 m' },
        { name: 'up', kind: 'length', links: 'one', default: '0 m' },
      ],
      outputs: [{ name: 'point', kind: 'point', list: false }],
    });
  });
});

describe('skewback', () => {
  it('helps, and says what its results are for', () => {
    expect(call('help')).toMatchObject({ status: 0, errors: [] });
    expect(call().status).toBe(2);
    expect(call('--help').printed).toContain('checked by a licensed engineer');
  });

  const program = (args: readonly string[], input = '') =>
    spawnSync('npx', ['skewback', ...args], { cwd: ROOT, encoding: 'utf8', input });

  it('runs as a program', () => {
    const { status, stdout, stderr } = program(['evaluate', 'graphs/ferry-hall.skewback.json', '--json']);
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(JSON.parse(stdout)).toEqual(
      JSON.parse(call('evaluate', join(ROOT, 'graphs/ferry-hall.skewback.json'), '--json').printed),
    );
  });

  it('ends as a program with 2 and one line where what comes by standard input can’t be used', () => {
    const { status, stdout, stderr } = program(['check', '-'], '{"format":\n\n half');
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
    expect(stderr).toMatch(/^skewback: -: the file is not JSON: [^\n]+\n$/);
  });
});

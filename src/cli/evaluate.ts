import { type Reading, readings, type Session, type Slider, sliders } from '../graph/index.ts';
import { measures, printQuantity, QuantityError, readMeasure, type System } from '../quantity/index.ts';
import { queryText } from '../tape/index.ts';
import { CallError, type Output, oneLine, openGraph, queryLine, readArguments, readSystem } from './call.ts';

/** `skewback evaluate FILE`: a graph's readings. Exit status 3 where a query stands in the way of one. */
export function evaluate(args: readonly string[], out: Output): number {
  const { values, positionals } = readArguments(args, {
    set: { type: 'string', multiple: true, default: [] },
    pull: { type: 'string' },
    units: { type: 'string', default: 'SI' },
    json: { type: 'boolean', default: false },
  });
  const system = readSystem(values.units);
  const session = openGraph(positionals);
  for (const assignment of values.set) setSlider(session, assignment, out, system);
  const found = readings(session);
  const pulled =
    values.pull === undefined ? undefined : pullOn(session, byName(found, values.pull, 'reading'));
  if (values.json) out.print(`${JSON.stringify(asJson(session, found, pulled, system), null, 2)}\n`);
  else printReadings(session, found, pulled, system, out);
  return found.some(({ value }) => value === undefined) ? 3 : 0;
}

/** How strongly the sliders move a reading. */
interface Pulled {
  readonly reading: Reading;
  readonly pulls: readonly Pull[];
}

interface Pull {
  readonly slider: Slider;
  /** In SI units; undefined where the slope is unbounded, or the slider counts. */
  readonly value: number | undefined;
  readonly unit: string;
}

function setSlider(session: Session, assignment: string, out: Output, system: System): void {
  const at = assignment.indexOf('=');
  if (at < 1) throw new CallError(`--set takes NAME=QUANTITY, for example span="32 m", not "${assignment}"`);
  const slider = byName(sliders(session), assignment.slice(0, at), 'slider of the rail');
  if (session.document.links.some(({ to }) => to[0] === slider.id && to[1] === 'value')) {
    throw new CallError(`--set ${slider.name}: a link brings its value: set what the link comes from`);
  }
  const text = assignment.slice(at + 1).trim();
  let value: number;
  try {
    value = readMeasure(text, slider.measure).value;
  } catch (error) {
    if (error instanceof QuantityError) throw new CallError(`--set ${slider.name}: ${error.message}`);
    throw error;
  }
  const { lower = Number.NEGATIVE_INFINITY, upper = Number.POSITIVE_INFINITY } = slider;
  if (value < lower || value > upper) {
    const bound = value < lower ? lower : upper;
    const which = value < lower ? 'lower' : 'upper';
    const shown = printQuantity(bound, slider.measure, system);
    out.error(oneLine(`${slider.name} is set beyond the ${which} bound of its slider, ${shown}`));
  }
  session.edit({ edit: 'set-value', id: slider.id, input: 'value', text });
}

/** The one that is called by its name or its id, whatever the case of its letters. */
function byName<T extends { readonly name: string; readonly id: string }>(
  list: readonly T[],
  wanted: string,
  what: string,
): T {
  const key = wanted.trim().toLowerCase();
  const named = list.filter(({ name, id }) => name.toLowerCase() === key || id.toLowerCase() === key);
  const [first, second] = named;
  if (first === undefined) {
    const known = list.map(({ name }) => name).join(', ');
    throw new CallError(
      `no ${what} is called "${wanted}"; there ${list.length === 0 ? 'is none' : `are: ${known}`}`,
    );
  }
  if (second !== undefined) {
    throw new CallError(
      `${named.length} are called "${wanted}": use an id (${named.map(({ id }) => id).join(', ')})`,
    );
  }
  return first;
}

function pullOn(session: Session, reading: Reading): Pulled {
  const { live } = session;
  const all = sliders(session).map((slider) => ({ slider, place: live.placeOf(slider.id, 'value') }));
  const places = all.flatMap(({ place }) => (place === undefined ? [] : [place]));
  const slopes = live.pull(reading.id, 'value', places);
  const pulls = all.map(({ slider, place }) => ({
    slider,
    value: place === undefined ? undefined : slopes?.[places.indexOf(place)],
    unit: ratioOf(reading.measure.coherent, slider.measure.coherent),
  }));
  return { reading, pulls };
}

function pullText(reading: Reading, { slider, value }: Pull, system: System): string {
  if (value === undefined) return 'none';
  const [above, below] = [reading.measure.units[system], slider.measure.units[system]];
  const shown = printQuantity((value * below.factor) / above.factor, measures.number, system);
  return `${shown} ${ratioOf(above.symbol || '1', below.symbol || '1')}`;
}

/** The unit of one quantity for each of another: "N·m/m"; a plain number has the unit 1. */
function ratioOf(above: string, below: string): string {
  if (below === '1') return above;
  return `${above}/${/[·/]/.test(below) ? `(${below})` : below}`;
}

function asJson(session: Session, found: readonly Reading[], pulled: Pulled | undefined, system: System) {
  return {
    format: 'skewback-readings',
    version: 1,
    readings: found.map((reading) => ({
      name: reading.name,
      ...quantityJson(reading.value, reading, system),
      ...(reading.limit === undefined
        ? {}
        : { limit: { rule: reading.limit.rule, ...quantityJson(reading.limit.value, reading, system) } }),
      ...(reading.meets === undefined ? {} : { meets: reading.meets }),
    })),
    queries: session.queries.map((query) => ({ node: query.owner ?? null, text: queryText(query, system) })),
    ...(pulled === undefined
      ? {}
      : {
          pull: Object.fromEntries(
            pulled.pulls.map(({ slider, value, unit }) => [
              keyOf(slider, pulled.pulls),
              { value: value ?? null, unit },
            ]),
          ),
        }),
  };
}

/** A slider's name, with its id where another has the same. */
function keyOf({ id, name }: Slider, pulls: readonly Pull[]): string {
  const shared = pulls.some(({ slider }) => slider.id !== id && slider.name === name);
  return shared ? `${name} (${id})` : name;
}

function quantityJson(value: number | undefined, { measure }: Reading, system: System) {
  return {
    value: value ?? null,
    unit: measure.coherent,
    text: value === undefined ? 'waits for a query' : printQuantity(value, measure, system),
  };
}

function printReadings(
  session: Session,
  found: readonly Reading[],
  pulled: Pulled | undefined,
  system: System,
  out: Output,
): void {
  if (found.length === 0) out.print('The graph has no readings.\n');
  for (const reading of found) {
    const { name, value, measure, limit, meets } = reading;
    const shown = value === undefined ? 'waits for a query' : printQuantity(value, measure, system);
    const bound =
      limit?.value === undefined ? '' : `, ${limit.rule} ${printQuantity(limit.value, measure, system)}`;
    const verdict = meets === undefined ? '' : meets ? ': met' : ': not met';
    out.print(`${oneLine(name)}: ${shown}${bound}${verdict}\n`);
  }
  if (pulled !== undefined) {
    out.print(`Pull on ${oneLine(pulled.reading.name)}\n`);
    for (const pull of pulled.pulls) {
      const name = oneLine(keyOf(pull.slider, pulled.pulls));
      out.print(`  ${name}: ${pullText(pulled.reading, pull, system)}\n`);
    }
  }
  for (const query of session.queries) out.error(queryLine(session, query, system));
}

import { type Measure, measureOf, measures } from '../quantity/index.ts';
import type { GraphDocument, NodeRecord } from './document.ts';
import type { Session } from './session.ts';
import { nodeName, readSettings } from './traceGraph.ts';

/** A slider on the rail: the typed figure `value` of a node, and its bounds in SI units. */
export interface Slider {
  readonly id: string;
  readonly name: string;
  readonly measure: Measure;
  /** As it is written: "32 m". */
  readonly text: string;
  readonly lower: number | undefined;
  readonly upper: number | undefined;
  readonly step: number | undefined;
}

/** A reading: a result, with its limit where it has one. */
export interface Reading {
  readonly id: string;
  readonly name: string;
  readonly measure: Measure;
  /** In SI units; undefined where the reading or what it reads is at fault. */
  readonly value: number | undefined;
  readonly limit?: { readonly rule: string; readonly value: number | undefined };
  /** Whether the limit is met; undefined where there is none, or no value. */
  readonly meets: boolean | undefined;
}

/** The sliders of a graph's rail, in its order. */
export function sliders(session: Session): Slider[] {
  return onRail(session.document)
    .filter((record) => session.library.find(record.type)?.rail === 'slider')
    .map((record) => slider(session, record));
}

/** The readings of a graph: those on the rail in its order, then the others. */
export function readings(session: Session): Reading[] {
  const { document, library } = session;
  const first = onRail(document);
  const others = document.nodes.filter((record) => !first.includes(record));
  return [...first, ...others]
    .filter((record) => library.find(record.type)?.rail === 'reading')
    .map((record) => reading(session, record));
}

function onRail(document: GraphDocument): NodeRecord[] {
  const order = new Map(document.rail.map((id, i) => [id, i]));
  return document.nodes
    .filter(({ id }) => order.has(id))
    .sort((a, b) => (order.get(a.id) ?? 0) - (order.get(b.id) ?? 0));
}

function slider(session: Session, record: NodeRecord): Slider {
  const type = session.library.find(record.type);
  const spec = type?.inputs.value;
  const settings = settingsOf(session, record);
  const bound = (name: string) => (typeof settings[name] === 'number' ? settings[name] : undefined);
  return {
    id: record.id,
    name: nodeName(record, session.library),
    measure: spec?.kind.measure ?? measures.number,
    text: record.values?.value ?? spec?.default ?? '',
    lower: bound('lower'),
    upper: bound('upper'),
    step: bound('step'),
  };
}

function reading(session: Session, record: NodeRecord): Reading {
  const settings = settingsOf(session, record);
  const value = number(session.value(record.id, 'value'));
  const margin = number(session.value(record.id, 'margin'));
  const rule = String(settings.rule ?? 'none');
  const limited = rule !== 'none';
  return {
    id: record.id,
    name: nodeName(record, session.library),
    measure: measureFor(session, record),
    value,
    ...(limited ? { limit: { rule, value: number(session.value(record.id, 'limit')) } } : {}),
    meets: limited && margin !== undefined ? margin >= 0 : undefined,
  };
}

/** The measure of what is linked to a reading: its kind tells an angle from a plain number. */
function measureFor(session: Session, record: NodeRecord): Measure {
  const { live } = session;
  const link = session.document.links.find(({ to }) => to[0] === record.id && to[1] === 'value');
  const source = link === undefined ? undefined : live.traced.nodes.get(link.from[0]);
  const specs = source?.type?.outputs ?? {};
  const spec = link !== undefined && Object.hasOwn(specs, link.from[1]) ? specs[link.from[1]] : undefined;
  const scalar = live.scalarOf(record.id, 'value');
  return spec?.kind.measure ?? (scalar === undefined ? measures.number : measureOf(scalar.dimension));
}

/** The settings of a node, or none where they can't be read, which its query says. */
function settingsOf(session: Session, record: NodeRecord): Readonly<Record<string, unknown>> {
  const type = session.library.find(record.type);
  if (type === undefined) return {};
  try {
    return readSettings(type, record);
  } catch {
    return {};
  }
}

function number(value: unknown): number | undefined {
  return typeof value === 'number' ? value : undefined;
}

import { QuantityError, readMeasure, readQuantity } from '../quantity/index.ts';
import type { Query } from '../tape/index.ts';
import type { Library } from './define.ts';
import { type GraphDocument, nodesById } from './document.ts';
import { apply, changesOnlyValues, type Edit } from './edit.ts';
import { LiveGraph, type NodeState } from './live.ts';
import type { TypedFigure } from './traceGraph.ts';

interface Step {
  readonly inverse: Edit;
  readonly gesture: string | undefined;
}

/**
 * A document that is open: every edit is followed at once by its figures, and can be undone without limit. A
 * change of typed figures only runs the tape; any other change traces the document again.
 */
export class Session {
  readonly library: Library;
  private current: GraphDocument;
  private living: LiveGraph;
  private undoable: Step[] = [];
  private redoable: Step[] = [];
  private readonly listeners = new Set<() => void>();

  constructor(document: GraphDocument, library: Library) {
    this.library = library;
    this.current = document;
    this.living = new LiveGraph(document, library);
  }

  get document(): GraphDocument {
    return this.current;
  }

  /** The document traced and run. It is another object after the document was traced again. */
  get live(): LiveGraph {
    return this.living;
  }

  get queries(): readonly Query[] {
    return this.living.queries;
  }

  get canUndo(): boolean {
    return this.undoable.length > 0;
  }

  get canRedo(): boolean {
    return this.redoable.length > 0;
  }

  state(id: string): NodeState {
    return this.living.state(id);
  }

  /** See `LiveGraph.value`. */
  value(id: string, output: string): unknown {
    return this.living.value(id, output);
  }

  /**
   * Applies an edit.
   *
   * @param gesture edits with the same gesture, one after the other, are undone in one step: a slider's drag.
   * @throws EditError where the edit does not fit; nothing has changed then.
   */
  edit(edit: Edit, gesture?: string): void {
    const { document, inverse } = apply(this.current, edit);
    const last = this.undoable.at(-1);
    if (gesture !== undefined && last?.gesture === gesture) {
      this.undoable[this.undoable.length - 1] = {
        inverse: joined(inverse, last.inverse),
        gesture,
      };
    } else {
      this.undoable.push({ inverse, gesture });
    }
    this.redoable = [];
    this.follow(document, edit);
  }

  /** Takes the last step back. Does nothing where there is none. */
  undo(): void {
    this.turnBack(this.undoable, this.redoable);
  }

  /** Does again what was taken back last. */
  redo(): void {
    this.turnBack(this.redoable, this.undoable);
  }

  /** Calls `listener` after every change, until the function that it returns is called. */
  subscribe(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  private turnBack(from: Step[], to: Step[]): void {
    const step = from.at(-1);
    if (step === undefined) return;
    const { document, inverse } = apply(this.current, step.inverse);
    from.pop();
    to.push({ inverse, gesture: undefined });
    this.follow(document, step.inverse);
  }

  private follow(document: GraphDocument, edit: Edit): void {
    this.current = document;
    const values = changesOnlyValues(edit) ? this.newValues(edit) : undefined;
    if (values === undefined) this.living = new LiveGraph(document, this.library);
    else this.living.set(values);
    for (const listener of this.listeners) listener();
  }

  /** The figures that an edit of values gives the tape; undefined where the tape has no place for one of them. */
  private newValues(edit: Edit): ReadonlyMap<number, number> | undefined {
    const values = new Map<number, number>();
    const edits = edit.edit === 'several' ? edit.edits : [edit];
    for (const one of edits) {
      if (one.edit === 'several') {
        const inner = this.newValues(one);
        if (inner === undefined) return undefined;
        for (const [place, value] of inner) values.set(place, value);
        continue;
      }
      if (one.edit !== 'set-value') return undefined;
      const place = this.living.placeOf(one.id, one.input);
      const figure = place === undefined ? undefined : this.living.traced.figures[place];
      const written = nodesById(this.current).get(one.id)?.values?.[one.input];
      if (place === undefined || figure === undefined || written === undefined) return undefined;
      const value = readFigure(written, figure);
      if (value === undefined) return undefined;
      values.set(place, value);
    }
    return values;
  }
}

/**
 * What takes back a later edit and then an earlier one. A slider's drag comes to thousands of edits of one figure:
 * the earliest takes all of them back.
 */
function joined(later: Edit, earlier: Edit): Edit {
  const edits = earlier.edit === 'several' ? earlier.edits : [earlier];
  const onlyFigures = edits.every(({ edit }) => edit === 'set-value' || edit === 'change-node');
  if (later.edit === 'set-value' && onlyFigures) {
    const covered = edits.some((one) =>
      one.edit === 'set-value'
        ? one.id === later.id && one.input === later.input
        : one.edit === 'change-node' && one.node.id === later.id,
    );
    if (covered) return earlier;
  }
  return { edit: 'several', edits: [...(later.edit === 'several' ? later.edits : [later]), ...edits] };
}

/** A typed figure's new value, where it is one of the same dimension. */
function readFigure(written: string, figure: TypedFigure): number | undefined {
  try {
    const { value, unit } =
      figure.measure === undefined ? readQuantity(written) : readMeasure(written, figure.measure);
    return unit.dimension === figure.scalar.dimension ? value : undefined;
  } catch (error) {
    if (error instanceof QuantityError) return undefined;
    throw error;
  }
}

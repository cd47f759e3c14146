import { ClassicPreset, NodeEditor } from 'rete';
import { AreaPlugin, type RenderSignal } from 'rete-area-plugin';
import { ConnectionPlugin, type SocketData } from 'rete-connection-plugin';
import type { Store } from '../store/store.ts';
import { LinkDrag } from './linking.ts';
import type { Schemes } from './schemes.ts';

type Port = { readonly nodeId: string; readonly side: 'input' | 'output'; readonly key: string };
type Ports = RenderSignal<'socket', Port>;

export interface Place {
  readonly x: number;
  readonly y: number;
}

/** What the skeleton asks its board to do. */
export interface SkeletonEvents {
  /** Fill the element of a node. Called once for each. */
  mount(id: string, element: HTMLElement): void;
  /** The view has been moved or zoomed. */
  viewed(zoom: number): void;
  picked(id: string): void;
  /** A node is being dragged to a place. */
  dragging(id: string, place: Place): void;
  /** A node has been let go of. */
  dragged(id: string): void;
  /** The link that is being drawn: from a port to the pointer; undefined when it ends. */
  drawing(from: SocketData | undefined, to: Place | undefined): void;
}

const [LEAST_ZOOM, MOST_ZOOM] = [0.1, 2.5];

/** Pan, zoom, dragging of nodes and drawing of links, on rete; what is shown is ours. */
export class Skeleton {
  private readonly area: AreaPlugin<Schemes, Ports>;
  private readonly editor = new NodeEditor<Schemes>();
  private readonly connection = new ConnectionPlugin<Schemes>();
  private readonly events: SkeletonEvents;
  private held: SocketData | undefined;
  /** True while changes of the document are carried over, which are no gestures. */
  private following = false;

  constructor(container: HTMLElement, store: () => Store, events: SkeletonEvents) {
    this.events = events;
    this.area = new AreaPlugin<Schemes, Ports>(container);
    this.editor.use(this.area);
    this.area.use(this.connection);
    const drag = new LinkDrag(store, (socket) => {
      this.held = socket;
      events.drawing(socket, undefined);
    });
    this.connection.addPreset(() => drag);
    this.listen();
  }

  get zoom(): number {
    return this.area.area.transform.k;
  }

  /** The pointer, or the middle of what is seen, in board units. */
  placeAt(clientX: number, clientY: number): Place {
    const box = this.area.container.getBoundingClientRect();
    const { x, y, k } = this.area.area.transform;
    return { x: (clientX - box.left - x) / k, y: (clientY - box.top - y) / k };
  }

  /** The element that moves with the view: what lies beneath the nodes is put into it. */
  get holder(): HTMLElement {
    return this.area.area.content.holder;
  }

  async add(id: string, place: Place): Promise<void> {
    const node = new ClassicPreset.Node(id);
    node.id = id;
    await this.editor.addNode(node);
    await this.move(id, place);
  }

  async remove(id: string): Promise<void> {
    await this.editor.removeNode(id);
  }

  async move(id: string, place: Place): Promise<void> {
    const position = this.area.nodeViews.get(id)?.position;
    if (position === undefined || (position.x === place.x && position.y === place.y)) return;
    this.following = true;
    try {
      await this.area.translate(id, place);
    } finally {
      this.following = false;
    }
  }

  /** Makes a port of a slip one that links can be drawn from and to. */
  port(element: HTMLElement, port: Port): void {
    void this.area.emit({ type: 'render', data: { type: 'socket', element, ...port } });
  }

  forget(element: HTMLElement): void {
    void this.area.emit({ type: 'unmount', data: { element } });
  }

  /** Lets go of the link that is being drawn. */
  drop(): void {
    this.connection.drop();
  }

  /** Shows a part of the board, given in board units, as large as it will go. */
  async show(left: number, top: number, right: number, bottom: number): Promise<void> {
    const { clientWidth, clientHeight } = this.area.container;
    if (clientWidth === 0 || clientHeight === 0) return;
    const margin = 24;
    const fit = Math.min((clientWidth - margin) / (right - left), (clientHeight - margin) / (bottom - top));
    const zoom = Math.max(LEAST_ZOOM, Math.min(1, fit));
    await this.area.area.zoom(zoom, 0, 0);
    await this.area.area.translate(
      (clientWidth - (left + right) * zoom) / 2,
      (clientHeight - (top + bottom) * zoom) / 2,
    );
  }

  async zoomBy(factor: number): Promise<void> {
    const { clientWidth, clientHeight } = this.area.container;
    const { x, y, k } = this.area.area.transform;
    const zoom = Math.max(LEAST_ZOOM, Math.min(MOST_ZOOM, k * factor));
    const step = zoom / k - 1;
    await this.area.area.zoom(zoom, (x - clientWidth / 2) * step, (y - clientHeight / 2) * step);
  }

  async pan(dx: number, dy: number): Promise<void> {
    const { x, y } = this.area.area.transform;
    await this.area.area.translate(x + dx, y + dy);
  }

  destroy(): void {
    this.area.destroy();
  }

  private listen(): void {
    const { events } = this;
    this.area.addPipe((context) => {
      switch (context.type) {
        case 'render':
          if (context.data.type === 'node') events.mount(context.data.payload.id, context.data.element);
          else if (context.data.type === 'connection') {
            const { end, start } = context.data;
            events.drawing(this.held, end ?? start);
          }
          break;
        case 'nodepicked':
          events.picked(context.data.id);
          break;
        case 'nodetranslated':
          if (!this.following) events.dragging(context.data.id, context.data.position);
          break;
        case 'nodedragged':
          events.dragged(context.data.id);
          break;
        case 'translated':
        case 'zoomed':
          events.viewed(this.zoom);
          break;
        case 'zoom': {
          // A double click is for adding a node, not for zooming.
          if (context.data.source === 'dblclick') return undefined;
          const { zoom } = context.data;
          if (zoom < LEAST_ZOOM || zoom > MOST_ZOOM) return undefined;
          break;
        }
      }
      return context;
    });
  }
}

import { Flow, type SocketData } from 'rete-connection-plugin';
import type { Link, LinkEnd } from '../../src/graph/index.ts';
import type { Store } from '../store/store.ts';
import { fits } from './fits.ts';
import type { Schemes } from './schemes.ts';

/**
 * What dragging from a port does: a link is drawn from it and is made where it ends at a port that fits. Dragging
 * from an input that is linked takes its last link up again.
 */
// biome-ignore lint/suspicious/noExplicitAny: the skeleton leaves the signals of a flow open.
export class LinkDrag extends Flow<Schemes, any[]> {
  private readonly store: () => Store;
  private readonly changed: (from: SocketData | undefined) => void;
  private picked: SocketData | undefined;

  constructor(store: () => Store, changed: (from: SocketData | undefined) => void) {
    super();
    this.store = store;
    this.changed = changed;
  }

  override async pick({ socket, event }: { socket: SocketData; event: 'up' | 'down' }): Promise<void> {
    if (event === 'down') this.take(socket);
    else this.end(socket);
  }

  override getPickedSocket(): SocketData | undefined {
    return this.picked;
  }

  override drop(): void {
    this.hold(undefined);
  }

  private take(socket: SocketData): void {
    const store = this.store();
    const links = socket.side === 'input' ? store.linksInto(socket.nodeId, socket.key) : [];
    const last = links.at(-1);
    if (last === undefined) {
      this.hold(socket);
      return;
    }
    store.removeLink(last);
    this.hold({ ...socket, side: 'output', nodeId: last.from[0], key: last.from[1] });
  }

  private end(socket: SocketData): void {
    const { picked } = this;
    this.hold(undefined);
    if (picked === undefined || picked.side === socket.side) return;
    const [source, target] = picked.side === 'output' ? [picked, socket] : [socket, picked];
    const from: LinkEnd = [source.nodeId, source.key];
    const to: LinkEnd = [target.nodeId, target.key];
    const link: Link = { from, to };
    const store = this.store();
    const known = store
      .linksInto(...to)
      .some((other) => other.from[0] === from[0] && other.from[1] === from[1]);
    if (!known && fits(store, from, to)) store.addLink(link);
  }

  private hold(socket: SocketData | undefined): void {
    this.picked = socket;
    this.changed(socket);
  }
}

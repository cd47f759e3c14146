import { css, html, LitElement, nothing, render, svg, type TemplateResult } from 'lit';
import type { SocketData } from 'rete-connection-plugin';
import { type LinkEnd, nodeName, nodesById } from '../../src/graph/index.ts';
import { queryText } from '../../src/tape/index.ts';
import { controls } from '../look/controls.ts';
import type { Store } from '../store/store.ts';
import { Watch } from '../store/watch.ts';
import './chooser.ts';
import type { Choice } from './chooser.ts';
import { cloudAbout, linesOf } from './cloud.ts';
import { fits, outputsFor } from './fits.ts';
import { drawLinks, leader } from './links.ts';
import { placeOf, portPlace, rowsOf, SLIP, slipHeight } from './rows.ts';
import { type Place, Skeleton } from './skeleton.ts';
import './slip.ts';
import type { Slip } from './slip.ts';

type Asking =
  | { readonly for: 'node'; readonly at: Place }
  | { readonly for: 'link'; readonly to: LinkEnd }
  | undefined;

/** Where nodes are laid out and linked. */
export class Board extends LitElement {
  static override properties = { store: { attribute: false }, asking: { state: true } };

  declare store: Store;
  declare asking: Asking;

  static override styles = [
    controls,
    css`
      :host {
        display: block;
        position: relative;
        overflow: hidden;
        background: var(--ground);
      }
      .area {
        position: absolute;
        inset: 0;
        touch-action: none;
      }
      .empty {
        position: absolute;
        inset: 0;
        display: grid;
        place-content: center;
        text-align: center;
        color: var(--ink-soft);
        pointer-events: none;
      }
      .tools {
        position: absolute;
        left: 8px;
        top: 8px;
        display: flex;
        gap: 4px;
      }
      svg.links {
        position: absolute;
        overflow: visible;
        width: 1px;
        height: 1px;
        pointer-events: none;
      }
      .link {
        fill: none;
        stroke: var(--ink-soft);
        stroke-width: 1;
      }
      .link.geometry {
        stroke-dasharray: 14 3 2 3;
      }
      .link.structure {
        stroke-width: 2.5;
      }
      .link.virtual {
        stroke-dasharray: 7 4;
      }
      .link.results {
        stroke-width: 4;
      }
      .link.inner {
        stroke: var(--ground);
        stroke-width: 2;
      }
      .link.near {
        stroke: var(--ink);
      }
      .link.drawing {
        stroke: var(--moved);
        stroke-width: 2;
      }
      .cloud {
        fill: none;
        stroke: var(--over);
        stroke-width: 2;
      }
      .cloud-text {
        fill: var(--over);
        font-size: 12px;
      }
    `,
  ];

  private skeleton: Skeleton | undefined;
  private readonly slips = new Map<string, Slip>();
  private readonly drag = new Map<string, Place>();
  private drawn: { from: SocketData; to: Place } | undefined;
  private svg: SVGSVGElement | undefined;
  private opened = -1;

  constructor() {
    super();
    this.asking = undefined;
    new Watch(this, () => this.store);
    this.addEventListener('choose-link', (event) => {
      const { node, input } = (event as CustomEvent<{ node: string; input: string }>).detail;
      this.asking = { for: 'link', to: [node, input] };
    });
  }

  override render(): TemplateResult {
    const empty = this.store.document.nodes.length === 0;
    return html`
      <div class="area" tabindex="0" aria-label="Board" @dblclick=${this.doubled} @keydown=${this.key}></div>
      ${empty ? html`<p class="empty">The board is empty. Double-click it, or press N, to take a node from the stock.</p>` : nothing}
      <div class="tools">
        <button @click=${() => this.askForNode()} title="Take a node from the stock (N)">Add node</button>
        <button @click=${() => this.showAll()} title="Show the whole board (F)">Show all</button>
        <button @click=${() => void this.skeleton?.zoomBy(1.25)} aria-label="Larger">+</button>
        <button @click=${() => void this.skeleton?.zoomBy(0.8)} aria-label="Smaller">−</button>
      </div>
      ${this.asking === undefined ? nothing : this.chooser(this.asking)}
    `;
  }

  override firstUpdated(): void {
    const container = this.renderRoot.querySelector<HTMLElement>('.area');
    if (container === null) return;
    this.skeleton = new Skeleton(container, () => this.store, {
      mount: (id, element) => this.mount(id, element),
      viewed: () => {},
      picked: (id) => {
        if (!this.store.selection.has(id)) this.store.select([id]);
      },
      dragging: (id, place) => {
        this.drag.set(id, place);
        this.follow(id, place);
      },
      dragged: (id) => this.letGo(id),
      drawing: (from, to) => {
        this.offer(from);
        this.drawn = from !== undefined && to !== undefined ? { from, to } : undefined;
        this.drawLines();
      },
    });
    this.svg = document.createElementNS('http://www.w3.org/2000/svg', 'svg');
    this.svg.classList.add('links');
    this.svg.setAttribute('aria-hidden', 'true');
    this.skeleton.holder.prepend(this.svg);
    container.addEventListener('pointerdown', (event) => {
      if (event.target === container || event.target === this.skeleton?.holder) this.store.select([]);
    });
    window.addEventListener('pointercancel', () => this.skeleton?.drop());
  }

  override updated(): void {
    void this.sync();
  }

  /** Carries the document over to the skeleton. */
  private async sync(): Promise<void> {
    const { skeleton, store } = this;
    if (skeleton === undefined) return;
    const known = nodesById(store.document);
    for (const id of [...this.slips.keys()]) {
      if (known.has(id)) continue;
      this.slips.delete(id);
      await skeleton.remove(id);
    }
    for (const { id, place } of store.document.nodes) {
      const [x, y] = place ?? [0, 0];
      if (this.slips.has(id)) await skeleton.move(id, { x, y });
      else await skeleton.add(id, { x, y });
    }
    for (const [id, slip] of this.slips) {
      slip.requestUpdate();
      void this.joinPorts(id, slip);
    }
    this.drawLines();
    if (this.opened !== store.opened) {
      this.opened = store.opened;
      await this.showAll();
    }
  }

  private mount(id: string, element: HTMLElement): void {
    let slip = this.slips.get(id);
    if (slip === undefined) {
      slip = document.createElement('sk-slip') as Slip;
      slip.store = this.store;
      slip.node = id;
      slip.tabIndex = 0;
      this.slips.set(id, slip);
      slip.addEventListener('focus', () => this.store.select([id]));
    }
    if (slip.parentElement !== element) element.append(slip);
    void this.joinPorts(id, slip);
  }

  private async joinPorts(id: string, slip: Slip): Promise<void> {
    await slip.updateComplete;
    for (const port of slip.renderRoot.querySelectorAll<HTMLElement>('.port')) {
      if (port.dataset.joined !== undefined) continue;
      port.dataset.joined = '';
      const side = port.dataset.side === 'output' ? 'output' : 'input';
      this.skeleton?.port(port, { nodeId: id, side, key: port.dataset.name ?? '' });
    }
  }

  /** While nodes are dragged the others of the selection go along. */
  private follow(id: string, place: Place): void {
    const own = nodesById(this.store.document).get(id)?.place ?? [0, 0];
    const [dx, dy] = [place.x - own[0], place.y - own[1]];
    for (const other of this.store.selection) {
      if (other === id) continue;
      const [x, y] = nodesById(this.store.document).get(other)?.place ?? [0, 0];
      this.drag.set(other, { x: x + dx, y: y + dy });
      void this.skeleton?.move(other, { x: x + dx, y: y + dy });
    }
    this.drawLines();
  }

  private letGo(id: string): void {
    if (!this.drag.has(id)) return;
    const known = nodesById(this.store.document);
    const edits = [...this.drag].flatMap(([moved, { x, y }]) => {
      const node = known.get(moved);
      return node === undefined
        ? []
        : [
            {
              edit: 'change-node' as const,
              node: { ...node, place: [Math.round(x), Math.round(y)] as const },
            },
          ];
    });
    this.drag.clear();
    this.store.edit({ edit: 'several', edits });
  }

  /** Shows which ports would take the link that is being drawn. */
  private offer(from: SocketData | undefined): void {
    for (const [id, slip] of this.slips) {
      const offers = from === undefined ? undefined : this.fitting(from, id);
      if (offers === undefined && slip.offers === undefined) continue;
      slip.offers = offers;
      slip.requestUpdate();
    }
  }

  private fitting(from: SocketData, id: string): ReadonlySet<string> {
    const own: LinkEnd = [from.nodeId, from.key];
    const ports = rowsOf(this.store, id).flatMap((row) => {
      if (from.side === 'output' && row.row === 'input' && fits(this.store, own, [id, row.name]))
        return [`in ${row.name}`];
      if (from.side === 'input' && row.row === 'output' && fits(this.store, [id, row.name], own))
        return [`out ${row.name}`];
      return [];
    });
    if (id === from.nodeId) ports.push(`${from.side === 'output' ? 'out' : 'in'} ${from.key}`);
    return new Set(ports);
  }

  private drawLines(): void {
    if (this.svg === undefined) return;
    const drawing = this.drawn === undefined ? nothing : this.drawnLink(this.drawn);
    render(svg`${drawLinks(this.store, this.drag)}${drawing}${this.clouds()}`, this.svg);
  }

  private drawnLink({ from, to }: { from: SocketData; to: Place }) {
    const start = portPlace(this.store, from.nodeId, from.side, from.key);
    if (start === undefined) return nothing;
    const end = [to.x, to.y] as const;
    const path = from.side === 'output' ? leader(start, end) : leader(end, start);
    return svg`<path class="link drawing" d=${path} />`;
  }

  /** Nodes with a query, marked as a checker would. */
  private clouds() {
    const { store } = this;
    const known = nodesById(store.document);
    const seen = new Map<string, number>();
    return store.session.queries.flatMap((query) => {
      const { owner } = query;
      if (owner === undefined || !known.has(owner)) return [];
      const [x, y] = placeOf(store, owner);
      const height = slipHeight(rowsOf(store, owner).length);
      const before = seen.get(owner) ?? 0;
      const lines = linesOf(queryText(query, store.system), 44);
      seen.set(owner, before + lines.length);
      const cloud =
        before === 0 ? svg`<path class="cloud" d=${cloudAbout(x, y, SLIP.width, height)} />` : nothing;
      return [
        svg`${cloud}${lines.map(
          (line, i) =>
            svg`<text class="cloud-text" x=${x} y=${y + height + 28 + (before + i) * 15}>${line}</text>`,
        )}`,
      ];
    });
  }

  private chooser(asking: Exclude<Asking, undefined>): TemplateResult {
    const closed = () => {
      this.asking = undefined;
      this.renderRoot.querySelector<HTMLElement>('.area')?.focus();
    };
    if (asking.for === 'node') {
      return html`<sk-chooser
        heading="Take a node from the stock"
        .choices=${this.stock()}
        @chosen=${(event: CustomEvent<string>) => {
          const { x, y } = asking.at;
          const id = this.store.addNode(event.detail, [x, y]);
          queueMicrotask(() => this.slips.get(id)?.focus());
        }}
        @closed=${closed}
      ></sk-chooser>`;
    }
    return html`<sk-chooser
      heading=${this.linkHeading(asking.to)}
      empty="No node gives what this input takes: add one from the stock."
      .choices=${this.linkChoices(asking.to)}
      @chosen=${(event: CustomEvent<string>) => this.chosenLink(asking.to, event.detail)}
      @closed=${closed}
    ></sk-chooser>`;
  }

  private stock(): Choice[] {
    const { packs } = this.store.session.library;
    return packs.flatMap((pack) =>
      pack.nodes.map(({ type, title, help }) => ({ id: type, title, group: pack.name, help })),
    );
  }

  private linkHeading([id, input]: LinkEnd): string {
    const node = this.store.session.live.traced.nodes.get(id);
    return `Link to ${node?.inputs[input]?.title ?? input}`;
  }

  /** What can be linked to an input, and the links that it has, to be taken off. */
  private linkChoices(to: LinkEnd): Choice[] {
    const { store } = this;
    const { library } = store.session;
    const known = nodesById(store.document);
    const title = ([id, port]: LinkEnd): string => {
      const record = known.get(id);
      const output = record === undefined ? undefined : library.find(record.type)?.outputs[port];
      const name = record === undefined ? id : nodeName(record, library);
      return output === undefined || output.title === name ? name : `${name}: ${output.title}`;
    };
    const links = store.linksInto(...to);
    const has = links.map(({ from }) => JSON.stringify(from));
    return [
      ...links.map(({ from }, i) => ({
        id: JSON.stringify({ off: i }),
        title: `Take off ${title(from)}`,
        group: 'Linked now',
        help: links.length > 1 ? `Link ${i + 1} of ${links.length}` : '',
      })),
      ...outputsFor(store, to)
        .filter((from) => !has.includes(JSON.stringify(from)))
        .map((from) => ({ id: JSON.stringify(from), title: title(from), group: 'Link', help: '' })),
    ];
  }

  private chosenLink(to: LinkEnd, chosen: string): void {
    const choice = JSON.parse(chosen) as LinkEnd | { readonly off: number };
    if ('off' in choice) {
      const link = this.store.linksInto(...to)[choice.off];
      if (link !== undefined) this.store.removeLink(link);
    } else this.store.addLink({ from: choice, to });
  }

  private askForNode(at?: Place): void {
    const box = this.getBoundingClientRect();
    const middle = this.skeleton?.placeAt(box.left + box.width / 2, box.top + box.height / 2);
    this.asking = { for: 'node', at: at ?? middle ?? { x: 0, y: 0 } };
  }

  private doubled(event: MouseEvent): void {
    if (
      event
        .composedPath()
        .some((element) => element instanceof HTMLElement && element.localName === 'sk-slip')
    )
      return;
    this.askForNode(this.skeleton?.placeAt(event.clientX, event.clientY));
  }

  /** Shows every node. */
  private async showAll(): Promise<void> {
    const { store, skeleton } = this;
    const boxes = store.document.nodes.map(({ id }) => {
      const [x, y] = placeOf(store, id);
      return [x, y, x + SLIP.width, y + slipHeight(rowsOf(store, id).length)] as const;
    });
    if (boxes.length === 0) return;
    const edge = (k: 0 | 1 | 2 | 3, pick: (...all: number[]) => number) =>
      pick(...boxes.map((box) => box[k]));
    await skeleton?.show(edge(0, Math.min), edge(1, Math.min), edge(2, Math.max), edge(3, Math.max));
  }

  private key(event: KeyboardEvent): void {
    const path = event.composedPath();
    const typing = path.some((part) => part instanceof HTMLInputElement || part instanceof HTMLSelectElement);
    if (typing || event.ctrlKey || event.metaKey || event.altKey) return;
    const { store, skeleton } = this;
    const step = event.shiftKey ? 50 : 10;
    const arrows: Record<string, readonly [number, number]> = {
      ArrowLeft: [-step, 0],
      ArrowRight: [step, 0],
      ArrowUp: [0, -step],
      ArrowDown: [0, step],
    };
    const arrow = arrows[event.key];
    if (arrow !== undefined) {
      event.preventDefault();
      if (store.selection.size > 0) this.nudge(arrow);
      else void skeleton?.pan(-arrow[0] * 4, -arrow[1] * 4);
      return;
    }
    const actions: Record<string, () => void> = {
      n: () => this.askForNode(),
      f: () => void this.showAll(),
      '+': () => void skeleton?.zoomBy(1.25),
      '-': () => void skeleton?.zoomBy(0.8),
      Delete: () => store.removeSelected(),
      Backspace: () => store.removeSelected(),
      Escape: () => {
        skeleton?.drop();
        store.select([]);
      },
    };
    const action = actions[event.key.length === 1 ? event.key.toLowerCase() : event.key];
    if (action === undefined) return;
    event.preventDefault();
    action();
  }

  private nudge([dx, dy]: readonly [number, number]): void {
    const known = nodesById(this.store.document);
    const edits = [...this.store.selection].flatMap((id) => {
      const node = known.get(id);
      const [x, y] = placeOf(this.store, id);
      return node === undefined
        ? []
        : [{ edit: 'change-node' as const, node: { ...node, place: [x + dx, y + dy] as const } }];
    });
    this.store.edit({ edit: 'several', edits }, 'nudge');
  }
}

customElements.define('sk-board', Board);

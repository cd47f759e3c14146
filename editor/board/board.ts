import { html, LitElement, nothing, render, svg, type TemplateResult } from 'lit';
import type { SocketData } from 'rete-connection-plugin';
import { type LinkEnd, nodesById } from '../../src/graph/index.ts';
import { queryText } from '../../src/tape/index.ts';
import { controls } from '../look/controls.ts';
import type { Store } from '../store/store.ts';
import { Watch } from '../store/watch.ts';
import { align, moveTo, nudge, spread, tidy } from './arrange.ts';
import { RubberBand } from './band.ts';
import { chooseLink, linkChoices, nodeChoices, stockChoices } from './choices.ts';
import './chooser.ts';
import { cloudAbout, linesOf } from './cloud.ts';
import { fits } from './fits.ts';
import { drawLinks, leader } from './links.ts';
import { copySelection, paste } from './part.ts';
import { placeOf, portPlace, rowsOf, SLIP, slipHeight } from './rows.ts';
import { type Place, Skeleton } from './skeleton.ts';
import './slip.ts';
import type { Slip } from './slip.ts';
import { boardStyles } from './styles.ts';

type Asking =
  | { readonly for: 'node'; readonly at: Place }
  | { readonly for: 'link'; readonly to: LinkEnd }
  | { readonly for: 'find' }
  | undefined;

/** The zoom below which a slip's rows can't be read. */
const READABLE = 0.42;

/** How far beside what is seen slips are kept up to date, in board units: a drag must not uncover blank paper. */
const MARGIN = 200;

/** Where nodes are laid out and linked. */
export class Board extends LitElement {
  static override properties = { store: { attribute: false }, asking: { state: true } };

  declare store: Store;
  declare asking: Asking;

  static override styles = [controls, boardStyles];

  private skeleton: Skeleton | undefined;
  private readonly slips = new Map<string, Slip>();
  private readonly drag = new Map<string, Place>();
  private drawn: { from: SocketData; to: Place } | undefined;
  private svg: SVGSVGElement | undefined;
  private opened = -1;
  private looking = false;

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
        <button @click=${() => this.tidyAll()} title="Put every node into its band (T)">Tidy</button>
        <button @click=${() => (this.asking = { for: 'find' })} title="Find a node (Ctrl F)">Find</button>
        ${this.selectionTools()}
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
      viewed: () => this.look(),
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
    new RubberBand(container, (...box) => this.selectWithin(...box));
    container.addEventListener('wheel', (event) => this.wheel(event), { capture: true, passive: false });
    for (const name of ['copy', 'cut', 'paste'] as const) {
      this.addEventListener(name, (event) => this.clip(event as ClipboardEvent));
    }
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
    this.cull(true);
    this.drawLines();
    if (this.opened !== store.opened) {
      this.opened = store.opened;
      await this.showAll();
    }
  }

  /** After the view has moved: once for all that moves it within a frame. */
  private look(): void {
    if (this.looking) return;
    this.looking = true;
    requestAnimationFrame(() => {
      this.looking = false;
      this.cull(false);
    });
  }

  /** Slips that are not seen are not kept up to date, and those that are far away show their titles alone. */
  private cull(changed: boolean): void {
    const { store, skeleton } = this;
    const box = this.getBoundingClientRect();
    const from = skeleton?.placeAt(box.left, box.top);
    const to = skeleton?.placeAt(box.right, box.bottom);
    if (skeleton === undefined || from === undefined || to === undefined) return;
    const small = skeleton.zoom < READABLE;
    for (const [id, slip] of this.slips) {
      const [x, y] = placeOf(store, id);
      const height = slipHeight(rowsOf(store, id).length);
      const seen =
        x < to.x + MARGIN &&
        x + SLIP.width > from.x - MARGIN &&
        y < to.y + MARGIN &&
        y + height > from.y - MARGIN;
      const appears = seen && slip.hidden;
      slip.hidden = !seen;
      if (!seen) continue;
      const resized = slip.small !== small;
      slip.small = small;
      if (changed || appears) slip.requestUpdate();
      if (changed || appears || resized) void this.joinPorts(id, slip);
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
    const places = new Map([...this.drag].map(([moved, { x, y }]) => [moved, [x, y] as const]));
    this.drag.clear();
    moveTo(this.store, places);
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

  private selectionTools(): TemplateResult | typeof nothing {
    const { selection } = this.store;
    if (selection.size === 0) return nothing;
    return html`
      <button @click=${() => spread(this.store, 'sources')} title="Select what these read from, however far back (U)">
        Upstream
      </button>
      <button @click=${() => spread(this.store, 'readers')} title="Select what reads from these, however far on (D)">
        Downstream
      </button>
      <button @click=${() => this.duplicate()} title="A copy of these beside them (Ctrl D)">Duplicate</button>
      ${
        selection.size < 2
          ? nothing
          : html`<button @click=${() => align(this.store)} title="Put these beneath each other">Align</button>`
      }
      <button @click=${() => this.store.removeSelected()} title="Take these off the board (Delete)">Remove</button>
    `;
  }

  private selectWithin(left: number, top: number, right: number, bottom: number): void {
    const { store, skeleton } = this;
    const from = skeleton?.placeAt(left, top);
    const to = skeleton?.placeAt(right, bottom);
    if (from === undefined || to === undefined) return;
    const inside = store.document.nodes.filter(({ id }) => {
      const [x, y] = placeOf(store, id);
      const height = slipHeight(rowsOf(store, id).length);
      return x < to.x && x + SLIP.width > from.x && y < to.y && y + height > from.y;
    });
    store.select(inside.map(({ id }) => id));
  }

  /** A trackpad's two fingers move the board; a mouse's wheel and a pinch, which the skeleton sees to, zoom it. */
  private wheel(event: WheelEvent): void {
    const byFingers = event.deltaX !== 0 || Math.abs(event.deltaY) < 40;
    if (event.ctrlKey || event.deltaMode !== 0 || !byFingers) return;
    event.preventDefault();
    event.stopPropagation();
    void this.skeleton?.pan(-event.deltaX, -event.deltaY);
  }

  private clip(event: ClipboardEvent): void {
    if (isTyping(event)) return;
    if (event.type === 'paste') {
      const text = event.clipboardData?.getData('text/plain') ?? '';
      if (paste(this.store, text)) event.preventDefault();
      return;
    }
    const text = copySelection(this.store);
    if (text === undefined) return;
    event.clipboardData?.setData('text/plain', text);
    event.preventDefault();
    if (event.type === 'cut') this.store.removeSelected();
  }

  private duplicate(): void {
    const text = copySelection(this.store);
    if (text !== undefined) paste(this.store, text);
  }

  private chooser(asking: Exclude<Asking, undefined>): TemplateResult {
    const closed = () => {
      this.asking = undefined;
      this.renderRoot.querySelector<HTMLElement>('.area')?.focus();
    };
    if (asking.for === 'node') {
      return html`<sk-chooser
        heading="Take a node from the stock"
        .choices=${stockChoices(this.store)}
        @chosen=${(event: CustomEvent<string>) => {
          const { x, y } = asking.at;
          const id = this.store.addNode(event.detail, [x, y]);
          queueMicrotask(() => this.slips.get(id)?.focus());
        }}
        @closed=${closed}
      ></sk-chooser>`;
    }
    if (asking.for === 'find') {
      return html`<sk-chooser
        heading="Find a node"
        empty="The board is empty."
        .choices=${nodeChoices(this.store)}
        @chosen=${(event: CustomEvent<string>) => void this.reveal(event.detail)}
        @closed=${closed}
      ></sk-chooser>`;
    }
    return html`<sk-chooser
      heading="Link to ${this.inputTitle(asking.to)}"
      empty="No node gives what this input takes: add one from the stock."
      .choices=${linkChoices(this.store, asking.to)}
      @chosen=${(event: CustomEvent<string>) => chooseLink(this.store, asking.to, event.detail)}
      @closed=${closed}
    ></sk-chooser>`;
  }

  private inputTitle([id, input]: LinkEnd): string {
    return this.store.session.live.traced.nodes.get(id)?.inputs[input]?.title ?? input;
  }

  private tidyAll(): void {
    tidy(this.store);
    void this.updateComplete.then(() => this.showAll());
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

  /** Selects a node and brings it to the middle. */
  async reveal(id: string): Promise<void> {
    this.store.select([id]);
    const [x, y] = placeOf(this.store, id);
    const height = slipHeight(rowsOf(this.store, id).length);
    await this.skeleton?.show(x - 300, y - 120, x + SLIP.width + 300, y + height + 120);
    this.slips.get(id)?.focus({ preventScroll: true });
  }

  /** Shows every node. */
  private async showAll(): Promise<void> {
    const { store, skeleton } = this;
    const boxes = store.document.nodes.map(({ id }) => {
      const [x, y] = placeOf(store, id);
      return [x, y, x + SLIP.width, y + slipHeight(rowsOf(store, id).length)] as const;
    });
    if (boxes.length === 0) {
      await skeleton?.show(0, 0, SLIP.width, SLIP.row);
      return;
    }
    const edge = (k: 0 | 1 | 2 | 3, pick: (...all: number[]) => number) =>
      pick(...boxes.map((box) => box[k]));
    await skeleton?.show(edge(0, Math.min), edge(1, Math.min), edge(2, Math.max), edge(3, Math.max));
  }

  private key(event: KeyboardEvent): void {
    const { store, skeleton } = this;
    if (event.ctrlKey || event.metaKey) {
      const commands: Record<string, () => void> = {
        d: () => this.duplicate(),
        f: () => {
          this.asking = { for: 'find' };
        },
        a: () => store.select(store.document.nodes.map(({ id }) => id)),
      };
      const command = isTyping(event) ? undefined : commands[event.key.toLowerCase()];
      if (command !== undefined) {
        event.preventDefault();
        command();
      }
      return;
    }
    if (isTyping(event) || event.altKey) return;
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
      if (store.selection.size > 0) nudge(store, arrow);
      else void skeleton?.pan(-arrow[0] * 4, -arrow[1] * 4);
      return;
    }
    const actions: Record<string, () => void> = {
      n: () => this.askForNode(),
      f: () => void this.showAll(),
      t: () => this.tidyAll(),
      u: () => spread(this.store, 'sources'),
      d: () => spread(this.store, 'readers'),
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
}

/** Whether an event comes from a field that is being typed into. */
function isTyping(event: Event): boolean {
  return event
    .composedPath()
    .some((part) => part instanceof HTMLInputElement || part instanceof HTMLSelectElement);
}

customElements.define('sk-board', Board);

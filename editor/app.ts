import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import {
  emptyDocument,
  FileError,
  type GraphDocument,
  nodeName,
  nodesById,
  readGraph,
  writeGraph,
} from '../src/graph/index.ts';
import { queryText } from '../src/tape/index.ts';
import './board/board.ts';
import type { Board } from './board/board.ts';
import './elevation/elevation.ts';
import { chooseFile, type FileHandle, saveFile } from './files/disk.ts';
import { KeptWork } from './files/kept.ts';
import { readyGraphs } from './files/ready.ts';
import './hall/hall.ts';
import { controls } from './look/controls.ts';
import './rail/rail.ts';
import { Store } from './store/store.ts';

type Part = 'elevation' | 'hall' | 'board';

/** The window: elevation and hall above, the board beneath, the rail along the foot. */
export class App extends LitElement {
  static override properties = {
    large: { state: true },
    message: { state: true },
    queriesOpen: { state: true },
  };

  declare large: Part | undefined;
  declare message: string;
  declare queriesOpen: boolean;

  static override styles = [
    controls,
    css`
      :host {
        display: grid;
        height: 100%;
        grid-template: auto 46fr 54fr minmax(96px, auto) / 62fr 38fr;
        grid-template-areas: 'bar bar' 'elevation hall' 'board board' 'rail rail';
        gap: 1px;
        background: var(--rule);
      }
      header {
        grid-area: bar;
        display: flex;
        flex-wrap: wrap;
        align-items: center;
        gap: 4px 6px;
        padding: 4px 10px;
        background: var(--paper);
      }
      header .title {
        font-weight: 600;
        flex: 1;
        min-width: 160px;
        border-color: transparent;
      }
      .part {
        position: relative;
        min-width: 0;
        min-height: 0;
      }
      .part > :first-child {
        position: absolute;
        inset: 0;
      }
      .enlarge {
        position: absolute;
        right: 8px;
        bottom: 8px;
      }
      .elevation {
        grid-area: elevation;
      }
      .hall {
        grid-area: hall;
      }
      .board {
        grid-area: board;
      }
      sk-rail {
        grid-area: rail;
        max-height: 210px;
      }
      :host([large]) {
        grid-template: auto 1fr / 1fr;
        grid-template-areas: 'bar' 'large';
      }
      :host([large]) .part {
        grid-area: large;
      }
      [hidden] {
        display: none;
      }
      .queries {
        position: absolute;
        right: 10px;
        top: 44px;
        z-index: 5;
        width: min(460px, 92vw);
        max-height: 60vh;
        overflow: auto;
        background: var(--paper);
        border: 1px solid var(--ink);
        padding: 8px;
      }
      .queries button {
        display: block;
        width: 100%;
        text-align: left;
        margin-top: 4px;
      }
      .message {
        position: absolute;
        left: 50%;
        bottom: 20px;
        transform: translateX(-50%);
        z-index: 6;
        background: var(--paper);
        border: 1px solid var(--over);
        padding: 8px 14px;
        max-width: 80vw;
      }
      .count {
        color: var(--over);
      }
      @media (max-width: 900px) {
        :host {
          grid-template: auto 34fr 24fr 42fr minmax(96px, auto) / 1fr;
          grid-template-areas: 'bar' 'elevation' 'hall' 'board' 'rail';
        }
      }
    `,
  ];

  private readonly store = new Store(emptyDocument('New graph'));
  private readonly kept = new KeptWork();
  private readonly windowName: string;
  private handle: FileHandle;
  private saved = '';

  constructor() {
    super();
    this.large = undefined;
    this.message = '';
    this.queriesOpen = false;
    // Session storage is this window's own and outlives a reload or a crash of the page.
    this.windowName = sessionStorage.getItem('window') ?? crypto.randomUUID();
    sessionStorage.setItem('window', this.windowName);
    this.store.look = matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
    this.store.subscribe(() => {
      document.documentElement.dataset.look = this.store.look;
      this.requestUpdate();
      void this.keep();
    });
    document.documentElement.dataset.look = this.store.look;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    window.addEventListener('keydown', (event) => this.key(event));
    this.addEventListener('dragover', (event) => event.preventDefault());
    this.addEventListener('drop', (event) => void this.dropped(event));
    void this.start();
  }

  override render(): TemplateResult {
    const { store } = this;
    const { document, session } = store;
    this.toggleAttribute('large', this.large !== undefined);
    return html`
      <header>
        <input
          class="title"
          aria-label="Title of the graph"
          .value=${document.title}
          @change=${(event: Event) =>
            store.edit({
              edit: 'set-member',
              member: 'title',
              value: (event.target as HTMLInputElement).value,
            })}
        />
        <button @click=${() => this.fresh()}>New</button>
        <select aria-label="Ready graphs" @change=${(event: Event) => void this.openReady(event.target as HTMLSelectElement)}>
          <option value="">Ready graphs…</option>
          ${readyGraphs.map(({ name }) => html`<option value=${name}>${name.replaceAll('-', ' ')}</option>`)}
        </select>
        <button @click=${() => void this.openFile()}>Open</button>
        <button @click=${() => void this.save()}>Save</button>
        <button ?disabled=${!session.canUndo} @click=${() => store.undo()}>Undo</button>
        <button ?disabled=${!session.canRedo} @click=${() => store.redo()}>Redo</button>
        <select
          aria-label="Units"
          @change=${(event: Event) => {
            store.system = (event.target as HTMLSelectElement).value === 'US' ? 'US' : 'SI';
          }}
        >
          <option value="SI" ?selected=${store.system === 'SI'}>SI units</option>
          <option value="US" ?selected=${store.system === 'US'}>US customary</option>
        </select>
        <button
          @click=${() => {
            store.look = store.look === 'dark' ? 'light' : 'dark';
          }}
        >
          ${store.look === 'dark' ? 'Light' : 'Dark'}
        </button>
        <button aria-expanded=${this.queriesOpen} @click=${() => (this.queriesOpen = !this.queriesOpen)}>
          ${session.queries.length === 0 ? 'No queries' : html`<span class="count">☁ ${session.queries.length} ${session.queries.length === 1 ? 'query' : 'queries'}</span>`}
        </button>
      </header>
      ${this.panel('elevation', html`<sk-elevation .store=${store}></sk-elevation>`)}
      ${this.panel('hall', html`<sk-hall .store=${store}></sk-hall>`)}
      ${this.panel('board', html`<sk-board .store=${store}></sk-board>`)}
      <sk-rail .store=${store} ?hidden=${this.large !== undefined}></sk-rail>
      ${this.queriesOpen ? this.queries() : nothing}
      ${
        this.message === ''
          ? nothing
          : html`<div class="message" role="alert">
            ${this.message} <button @click=${() => (this.message = '')}>Close</button>
          </div>`
      }
    `;
  }

  private panel(name: Part, content: TemplateResult): TemplateResult {
    const large = this.large === name;
    const hidden = this.large !== undefined && !large;
    return html`<section class="part ${name}" aria-label=${name} ?hidden=${hidden}>
      ${content}
      <button
        class="enlarge"
        aria-pressed=${large}
        title=${large ? 'Back to all parts' : `Show the ${name} alone`}
        @click=${() => (this.large = large ? undefined : name)}
      >
        ${large ? 'Back' : 'Enlarge'}
      </button>
    </section>`;
  }

  private queries(): TemplateResult {
    const { session, system } = this.store;
    const known = nodesById(session.document);
    return html`<div class="queries" role="dialog" aria-label="Queries">
      <h2>Queries</h2>
      ${session.queries.length === 0 ? html`<p>Nothing is queried in this graph.</p>` : nothing}
      ${session.queries.map((query) => {
        const record = query.owner === undefined ? undefined : known.get(query.owner);
        const where = record === undefined ? 'Graph' : nodeName(record, session.library);
        return html`<button @click=${() => query.owner !== undefined && void this.reveal(query.owner)}>
          <strong>${where}</strong>: ${queryText(query, system)}
        </button>`;
      })}
    </div>`;
  }

  private async reveal(id: string): Promise<void> {
    if (this.large !== undefined && this.large !== 'board') this.large = undefined;
    await this.updateComplete;
    await this.renderRoot.querySelector<Board>('sk-board')?.reveal(id);
  }

  /** Opens what this window had when it was closed or crashed, or else a ready arch. */
  private async start(): Promise<void> {
    const own = await this.kept.of(this.windowName);
    if (own !== undefined) {
      this.read(own.text);
      return;
    }
    const first = readyGraphs.find(({ name }) => name === 'market-hall') ?? readyGraphs[0];
    if (first !== undefined) this.read(await first.text());
  }

  private async keep(): Promise<void> {
    const { document } = this.store;
    const text = writeGraph(document);
    if (text === this.saved) return;
    this.saved = text;
    await this.kept.keep({ window: this.windowName, title: document.title, text, at: Date.now() });
  }

  /** Shows a graph from its text; says why where it is none, and keeps the present one. */
  private read(text: string): boolean {
    try {
      this.show(readGraph(text));
      return true;
    } catch (error) {
      if (!(error instanceof FileError)) throw error;
      this.message = `This file can't be opened: ${error.message}.`;
      return false;
    }
  }

  private show(document: GraphDocument): void {
    this.handle = undefined;
    this.store.show(document);
  }

  private fresh(): void {
    this.show(emptyDocument('New graph'));
  }

  private async openReady(list: HTMLSelectElement): Promise<void> {
    const chosen = readyGraphs.find(({ name }) => name === list.value);
    list.value = '';
    if (chosen !== undefined) this.read(await chosen.text());
  }

  private async openFile(): Promise<void> {
    const chosen = await chooseFile();
    if (chosen !== undefined && this.read(await chosen.file.text())) this.handle = chosen.handle;
  }

  private async dropped(event: DragEvent): Promise<void> {
    event.preventDefault();
    const file = event.dataTransfer?.files[0];
    if (file !== undefined) this.read(await file.text());
  }

  private async save(): Promise<void> {
    const done = await saveFile(this.store.document, this.handle);
    if (done !== undefined) this.handle = done.handle;
  }

  private key(event: KeyboardEvent): void {
    if (!(event.ctrlKey || event.metaKey)) return;
    const typing = event.composedPath()[0] instanceof HTMLInputElement;
    const key = event.key.toLowerCase();
    const actions: Record<string, () => void> = {
      s: () => void this.save(),
      o: () => void this.openFile(),
      ...(typing
        ? {}
        : {
            z: () => (event.shiftKey ? this.store.redo() : this.store.undo()),
            y: () => this.store.redo(),
          }),
    };
    const action = actions[key];
    if (action === undefined) return;
    event.preventDefault();
    action();
  }
}

customElements.define('sk-app', App);

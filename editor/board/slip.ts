import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { nodeName, nodesById, type SettingSpec } from '../../src/graph/index.ts';
import { controls } from '../look/controls.ts';
import { shownOutput } from '../store/figures.ts';
import type { Store } from '../store/store.ts';
import { type Row, rowsOf, slipHeight } from './rows.ts';

/** A node on the board: a slip of paper with its title and a line for each input, setting and output. */
export class Slip extends LitElement {
  static override properties = {
    store: { attribute: false },
    node: {},
    small: { type: Boolean, reflect: true },
  };

  declare store: Store;
  declare node: string;
  /** Whether the slip is seen from so far that its title alone can be read. */
  declare small: boolean;

  static override styles = [
    controls,
    css`
      :host {
        display: block;
        width: 240px;
        background: var(--paper);
        border: 1px solid var(--ink-soft);
        font-size: 12px;
        cursor: grab;
        user-select: none;
        padding-bottom: 4px;
      }
      :host([hidden]) {
        display: none;
      }
      :host([small]) {
        overflow: hidden;
        padding: 8px;
        font-size: 34px;
        line-height: 1.05;
        font-weight: 600;
      }
      :host([selected]) {
        outline: 2px solid var(--moved);
      }
      :host([waits]) {
        border-style: dashed;
      }
      header {
        height: 29px;
        display: flex;
        align-items: center;
        gap: 4px;
        padding: 0 4px 0 10px;
        border-bottom: 1px solid var(--rule);
        font-weight: 600;
      }
      header input {
        flex: 1;
        min-width: 0;
        font-weight: 600;
        border-color: transparent;
        background: none;
        min-height: 22px;
        padding: 0 2px;
      }
      header button {
        min-height: 22px;
        padding: 0 6px;
        font-weight: 400;
      }
      .row {
        height: 24px;
        display: flex;
        align-items: center;
        gap: 4px;
        padding: 0 10px;
        position: relative;
      }
      .row > span:first-of-type {
        overflow: hidden;
        text-overflow: ellipsis;
        white-space: nowrap;
        flex: 1 1 40%;
      }
      .figure {
        text-align: right;
        white-space: nowrap;
        overflow: hidden;
        text-overflow: ellipsis;
        flex: 0 1 auto;
        max-width: 60%;
      }
      .output {
        color: var(--ink);
      }
      .output .figure {
        font-weight: 600;
      }
      .row input,
      .row select {
        width: 50%;
        min-height: 20px;
        padding: 0 4px;
        text-align: right;
      }
      .row input[type='checkbox'] {
        width: auto;
      }
      .row button {
        min-height: 20px;
        padding: 0 6px;
        color: var(--ink-soft);
        max-width: 60%;
        overflow: hidden;
        text-overflow: ellipsis;
        white-space: nowrap;
      }
      .port {
        position: absolute;
        width: 18px;
        height: 24px;
        top: 0;
        cursor: crosshair;
      }
      .port::after {
        content: '';
        position: absolute;
        left: 5px;
        top: 8px;
        width: 8px;
        height: 8px;
        border: 1px solid var(--ink);
        border-radius: 50%;
        background: var(--paper);
      }
      .port.linked::after {
        background: var(--ink);
      }
      .port.in {
        left: -9px;
      }
      .port.out {
        right: -9px;
      }
      :host([offers]) .port {
        opacity: 0.25;
      }
      :host([offers]) .port.fits {
        opacity: 1;
      }
      :host([offers]) .port.fits::after {
        border-color: var(--moved);
        border-width: 2px;
      }
    `,
  ];

  /** Which ports would take the link that is being drawn: "in name" and "out name". */
  offers: ReadonlySet<string> | undefined;

  override render(): TemplateResult | typeof nothing {
    const { store, node } = this;
    const record = nodesById(store.document).get(node);
    if (record === undefined) return nothing;
    const { session } = store;
    const state = session.state(node);
    this.toggleAttribute('selected', store.selection.has(node));
    this.toggleAttribute('waits', state !== 'ready');
    this.toggleAttribute('offers', this.offers !== undefined);
    const type = session.library.find(record.type);
    const name = nodeName(record, session.library);
    if (this.small) return html`${name}`;
    const onRail = store.document.rail.includes(node);
    return html`
      <header title=${type?.help ?? ''}>
        <input
          aria-label="Name of ${name}"
          .value=${name}
          @change=${(event: Event) => this.rename((event.target as HTMLInputElement).value)}
        />
        ${
          type?.rail === undefined
            ? nothing
            : html`<button
              class="quiet"
              aria-pressed=${onRail}
              title=${onRail ? 'Take off the rail' : 'Put on the rail'}
              @click=${() => store.toggleRail(node)}
            >
              rail
            </button>`
        }
      </header>
      ${rowsOf(store, node).map((row) => this.row(row))}
    `;
  }

  override updated(): void {
    // The links are drawn by the model's measures, whether the rows are there or not.
    this.style.height = this.small ? `${slipHeight(rowsOf(this.store, this.node).length)}px` : '';
  }

  private row(row: Row): TemplateResult {
    if (row.row === 'setting') return this.setting(row.name, row.spec);
    const { store, node } = this;
    if (row.row === 'output') {
      const linked = store.document.links.some(({ from }) => from[0] === node && from[1] === row.name);
      return html`<div class="row output">
        <span>${row.spec.title}</span>
        <span class="figure">${shownOutput(store, node, row.name)}</span>
        ${this.port('out', row.name, linked, `Output ${row.spec.title}`)}
      </div>`;
    }
    const links = store.linksInto(node, row.name);
    return html`<div class="row">
      ${this.port('in', row.name, links.length > 0, `Input ${row.spec.title}`)}
      <span>${row.spec.title}</span>
      ${links.length > 0 ? this.linked(row.name) : this.typed(row)}
    </div>`;
  }

  private port(side: 'in' | 'out', name: string, linked: boolean, title: string): TemplateResult {
    const fits = this.offers?.has(`${side} ${name}`) ?? false;
    return html`<div
      class="port ${side} ${linked ? 'linked' : ''} ${fits ? 'fits' : ''}"
      data-side=${side === 'in' ? 'input' : 'output'}
      data-name=${name}
      title=${title}
    ></div>`;
  }

  /** What an input's links bring: a button that opens the list of its links. */
  private linked(name: string): TemplateResult {
    const { store, node } = this;
    const links = store.linksInto(node, name);
    const [first] = links;
    const source = first === undefined ? undefined : nodesById(store.document).get(first.from[0]);
    const shown = source === undefined ? '?' : nodeName(source, store.session.library);
    return html`<button class="quiet" @click=${() => this.ask(name)} title="Change the link">
      ${links.length > 1 ? `${links.length} links` : shown}
    </button>`;
  }

  private typed({ name, spec }: Row & { row: 'input' }): TemplateResult {
    const { store, node } = this;
    if (spec.kind.typed === undefined) {
      return html`<button class="quiet" @click=${() => this.ask(name)}>
        ${spec.arity === 'optional' ? 'none' : `link ${spec.kind.called}`}
      </button>`;
    }
    const record = nodesById(store.document).get(node);
    const value = record?.values?.[name] ?? spec.default ?? '';
    return html`<input
      aria-label=${spec.title}
      .value=${value}
      @pointerdown=${(event: Event) => event.stopPropagation()}
      @change=${(event: Event) => {
        const text = (event.target as HTMLInputElement).value.trim();
        store.edit({ edit: 'set-value', id: node, input: name, text: text === '' ? undefined : text });
      }}
    />`;
  }

  private setting(name: string, spec: SettingSpec<unknown>): TemplateResult {
    const { store, node } = this;
    const record = nodesById(store.document).get(node);
    const written = record?.settings?.[name] ?? spec.default ?? '';
    const set = (value: string | boolean | undefined) =>
      store.edit({ edit: 'set-setting', id: node, setting: name, value });
    const stop = (event: Event) => event.stopPropagation();
    const { form } = spec;
    const control =
      form.form === 'choice'
        ? html`<select
            aria-label=${spec.title}
            @pointerdown=${stop}
            @change=${(event: Event) => set((event.target as HTMLSelectElement).value)}
          >
            ${Object.entries(form.options).map(
              ([option, title]) =>
                html`<option value=${option} ?selected=${option === written}>${title}</option>`,
            )}
          </select>`
        : form.form === 'flag'
          ? html`<input
              type="checkbox"
              aria-label=${spec.title}
              .checked=${written === true}
              @pointerdown=${stop}
              @change=${(event: Event) => set((event.target as HTMLInputElement).checked)}
            />`
          : html`<input
              aria-label=${spec.title}
              .value=${String(written)}
              @pointerdown=${stop}
              @change=${(event: Event) => {
                const text = (event.target as HTMLInputElement).value.trim();
                set(text === '' && form.form === 'quantity' ? undefined : text);
              }}
            />`;
    return html`<div class="row"><span>${spec.title}</span>${control}</div>`;
  }

  private rename(text: string): void {
    const record = nodesById(this.store.document).get(this.node);
    if (record === undefined) return;
    const { name: _, ...rest } = record;
    const title = this.store.session.library.find(record.type)?.title;
    const named = text.trim() === '' || text.trim() === title ? rest : { ...record, name: text.trim() };
    this.store.edit({ edit: 'change-node', node: named as typeof record });
  }

  /** Asks the board to let the user choose what is linked to an input. */
  private ask(input: string): void {
    this.dispatchEvent(
      new CustomEvent('choose-link', { detail: { node: this.node, input }, bubbles: true, composed: true }),
    );
  }
}

customElements.define('sk-slip', Slip);

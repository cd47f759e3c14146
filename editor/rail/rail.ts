import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { type Reading, readings, type Slider, sliders } from '../../src/graph/index.ts';
import { printQuantity, QuantityError, readMeasure, writeQuantity } from '../../src/quantity/index.ts';
import { controls } from '../look/controls.ts';
import type { Store } from '../store/store.ts';
import { Watch } from '../store/watch.ts';

/** The strip of sliders and readings that a meeting works from. */
export class Rail extends LitElement {
  static override properties = { store: { attribute: false } };

  declare store: Store;

  static override styles = [
    controls,
    css`
      :host {
        display: grid;
        grid-template-columns: 1fr auto;
        background: var(--paper);
        overflow: auto;
      }
      .sliders {
        display: grid;
        grid-template-columns: repeat(auto-fill, minmax(230px, 1fr));
        align-content: start;
        gap: 4px 14px;
        padding: 8px 12px;
      }
      .slider {
        display: grid;
        grid-template-columns: 1fr 92px;
        align-items: center;
        gap: 0 8px;
      }
      .slider label {
        grid-column: 1;
        font-size: 12px;
        overflow: hidden;
        text-overflow: ellipsis;
        white-space: nowrap;
      }
      .slider input[type='range'] {
        grid-column: 1;
        width: 100%;
        min-height: 18px;
        padding: 0;
        accent-color: var(--moved);
      }
      .slider input[type='text'] {
        grid-column: 2;
        grid-row: 1 / span 2;
        text-align: right;
        width: 100%;
      }
      .readings {
        border-left: 1px solid var(--rule);
        padding: 8px 12px;
        margin: 0;
        display: grid;
        grid-template-columns: auto auto auto;
        gap: 2px 12px;
        align-content: start;
        min-width: 300px;
      }
      .one {
        display: contents;
      }
      .value {
        text-align: right;
        font-weight: 600;
      }
      .limit {
        color: var(--ink-soft);
        font-size: 12px;
      }
      .unmet {
        color: var(--over);
      }
      .met {
        color: var(--met);
      }
      .empty {
        color: var(--ink-soft);
        padding: 12px;
        margin: 0;
      }
      @media (max-width: 900px) {
        :host {
          grid-template-columns: 1fr;
        }
        .readings {
          border-left: 0;
          border-top: 1px solid var(--rule);
        }
      }
    `,
  ];

  private gesture = 0;

  constructor() {
    super();
    new Watch(this, () => this.store);
  }

  override render(): TemplateResult {
    const { session } = this.store;
    const onRail = new Set(session.document.rail);
    const shown = sliders(session);
    const read = readings(session).filter(({ id }) => onRail.has(id));
    if (shown.length + read.length === 0) {
      return html`<p class="empty">The rail is empty. Press “rail” on a quantity or a reading on the board to put it here.</p>`;
    }
    return html`
      <div class="sliders">${shown.map((slider) => this.slider(slider))}</div>
      <div class="readings" role="list" aria-label="Readings">${read.map((reading) => this.reading(reading))}</div>
    `;
  }

  private slider(slider: Slider): TemplateResult {
    const { id, name, lower, upper, text } = slider;
    const value = this.store.session.value(id, 'value');
    const bounded = lower !== undefined && upper !== undefined && typeof value === 'number';
    return html`<div class="slider">
      <label for="exact-${id}" title=${name}>${name}</label>
      ${
        bounded
          ? html`<input
            type="range"
            aria-label=${name}
            aria-valuetext=${text}
            .min=${String(lower)}
            .max=${String(upper)}
            .step=${String(slider.step ?? (upper - lower) / 200)}
            .value=${String(value)}
            @pointerdown=${() => (this.gesture += 1)}
            @input=${(event: Event) => this.slide(slider, Number((event.target as HTMLInputElement).value))}
            @wheel=${(event: WheelEvent) => this.wheel(slider, value, event)}
          />`
          : html`<span></span>`
      }
      <input
        type="text"
        id="exact-${id}"
        aria-label="${name}, exact"
        .value=${text}
        @change=${(event: Event) => this.type(slider, event.target as HTMLInputElement)}
      />
    </div>`;
  }

  private reading({ id, name, measure, value, limit, meets }: Reading): TemplateResult {
    const { system } = this.store;
    const shown = value === undefined ? 'waits' : printQuantity(value, measure, system);
    const bound =
      limit?.value === undefined ? '' : `${limit.rule} ${printQuantity(limit.value, measure, system)}`;
    const verdict =
      meets === undefined
        ? nothing
        : meets
          ? html`<span class="met">✓ met</span>`
          : html`<span class="unmet">✕ not met</span>`;
    return html`<span role="listitem" class="one" data-reading=${id}>
      <span>${name}</span>
      <span class="value ${meets === false ? 'unmet' : ''}">${shown}</span>
      <span class="limit">${bound} ${verdict}</span>
    </span>`;
  }

  /** Writes a slider's value in the unit that it was typed in. */
  private slide({ id, measure, text }: Slider, value: number): void {
    let unit = measure.units[this.store.system];
    try {
      ({ unit } = readMeasure(text, measure));
    } catch (error) {
      if (!(error instanceof QuantityError)) throw error;
    }
    this.set(id, writeQuantity(value, unit), `slide ${id} ${this.gesture}`);
  }

  private wheel(slider: Slider, value: number, event: WheelEvent): void {
    const { lower = 0, upper = 0, step = (upper - lower) / 200 } = slider;
    event.preventDefault();
    this.slide(slider, Math.max(lower, Math.min(upper, value - Math.sign(event.deltaY) * step)));
  }

  private type({ id, measure }: Slider, field: HTMLInputElement): void {
    let text = field.value.trim();
    try {
      // A figure alone is in the unit of the window.
      const { value, unit } = readMeasure(text, measure, this.store.system);
      if (/^[-+−]?[\d.]+(e[-+]?\d+)?$/i.test(text)) text = writeQuantity(value, unit);
    } catch (error) {
      // What can't be read is kept as it was typed, and the node says why.
      if (!(error instanceof QuantityError)) throw error;
    }
    this.gesture += 1;
    this.set(id, text);
  }

  private set(id: string, text: string, gesture?: string): void {
    this.store.edit({ edit: 'set-value', id, input: 'value', text }, gesture);
  }
}

customElements.define('sk-rail', Rail);

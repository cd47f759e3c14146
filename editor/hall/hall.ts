import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { type Mark, sceneOf } from '../../src/graph/index.ts';
import { controls } from '../look/controls.ts';
import type { Store } from '../store/store.ts';
import { Watch } from '../store/watch.ts';
import type { HallView, Side } from './view.ts';

type HallMark = Mark & { mark: 'hall' };

const SIDES: readonly (readonly [Side, string])[] = [
  ['corner', 'Corner'],
  ['front', 'Front'],
  ['back', 'Back'],
  ['left', 'Left'],
  ['right', 'Right'],
  ['inside', 'Inside'],
];

/** The three-dimensional view: the arch repeated along its bay spacing. */
export class Hall extends LitElement {
  static override properties = { store: { attribute: false }, trouble: { state: true } };

  declare store: Store;
  declare trouble: string;

  static override styles = [
    controls,
    css`
      :host {
        display: block;
        position: relative;
        overflow: hidden;
        background: var(--sky);
      }
      canvas {
        position: absolute;
        inset: 0;
        width: 100%;
        height: 100%;
      }
      .empty {
        position: absolute;
        inset: 0;
        display: grid;
        place-content: center;
        text-align: center;
        padding: 20px;
        color: var(--ink-soft);
      }
      .tools {
        position: absolute;
        left: 8px;
        bottom: 8px;
        display: flex;
        flex-wrap: wrap;
        gap: 4px;
      }
    `,
  ];

  private view: HallView | undefined;
  private shown = '';
  private opened = -1;
  private readonly resize = new ResizeObserver(([entry]) => {
    const { width = 0, height = 0 } = entry?.contentRect ?? {};
    this.view?.resize(width, height);
  });

  constructor() {
    super();
    this.trouble = '';
    new Watch(this, () => this.store);
  }

  override render(): TemplateResult {
    const hall = this.hall();
    const empty =
      this.trouble !== ''
        ? this.trouble
        : hall === undefined
          ? 'Link an arch to a hall node, with a number of bays and their spacing, to see it here.'
          : '';
    return html`
      <canvas role="img" aria-label=${hall === undefined ? 'Hall: nothing to show yet' : `Hall of ${hall.bays} bays`}></canvas>
      ${empty === '' ? nothing : html`<p class="empty">${empty}</p>`}
      <div class="tools">
        ${SIDES.map(([side, title]) => html`<button ?disabled=${hall === undefined} @click=${() => this.look(side)}>${title}</button>`)}
      </div>
    `;
  }

  override async firstUpdated(): Promise<void> {
    const canvas = this.renderRoot.querySelector('canvas');
    if (canvas === null) return;
    if (document.createElement('canvas').getContext('webgl2') === null) {
      this.trouble =
        'This browser has no WebGL: the hall is not shown. The elevation is complete without it.';
      return;
    }
    const { HallView: View } = await import('./view.ts');
    this.view = new View(canvas);
    this.view.resize(this.clientWidth, this.clientHeight);
    this.resize.observe(this);
    this.requestUpdate();
  }

  override updated(): void {
    const { view } = this;
    if (view === undefined) return;
    const hall = this.hall();
    const key = JSON.stringify([hall, this.store.look]);
    if (key !== this.shown) {
      this.shown = key;
      const style = getComputedStyle(this);
      const colour = (name: string) => style.getPropertyValue(name).trim();
      view.show(
        hall,
        { member: '#b98a55', ground: colour('--rule'), line: colour('--ink-soft'), person: colour('--ink') },
        colour('--sky'),
      );
    }
    if (this.opened !== this.store.opened && hall !== undefined) {
      this.opened = this.store.opened;
      view.look(hall, 'corner');
    }
  }

  override disconnectedCallback(): void {
    this.resize.disconnect();
    this.view?.destroy();
    this.view = undefined;
    super.disconnectedCallback();
  }

  private look(side: Side): void {
    const hall = this.hall();
    if (hall !== undefined) this.view?.look(hall, side);
  }

  private hall(): HallMark | undefined {
    return sceneOf(this.store.session)
      .flatMap(({ marks }) => marks)
      .find((mark): mark is HallMark => mark.mark === 'hall');
  }
}

customElements.define('sk-hall', Hall);

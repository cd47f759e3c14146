import { css, html, LitElement, nothing, type SVGTemplateResult, svg, type TemplateResult } from 'lit';
import { type Mark, sceneOf, type XY } from '../../src/graph/index.ts';
import { measures, printQuantity } from '../../src/quantity/index.ts';
import { controls } from '../look/controls.ts';
import type { Store } from '../store/store.ts';
import { Watch } from '../store/watch.ts';
import { dimensionsOf } from './dimensions.ts';
import { type Frame, frameOf } from './frame.ts';
import { drawMark, type Scale } from './marks.ts';

/** The two-dimensional drawing of the arch. */
export class Elevation extends LitElement {
  static override properties = {
    store: { attribute: false },
    circles: { state: true },
    mechanism: { state: true },
    frame: { state: true },
    size: { state: true },
  };

  declare store: Store;
  declare circles: boolean;
  declare mechanism: boolean;
  declare frame: Frame | undefined;
  declare size: readonly [width: number, height: number];

  static override styles = [
    controls,
    css`
      :host {
        display: block;
        position: relative;
        overflow: hidden;
        background: var(--paper);
      }
      svg {
        position: absolute;
        inset: 0;
        width: 100%;
        height: 100%;
        touch-action: none;
        cursor: grab;
      }
      path,
      circle,
      rect {
        fill: none;
        stroke: var(--ink);
        stroke-width: 1;
        vector-effect: non-scaling-stroke;
      }
      .setting-out {
        stroke: var(--ink-soft);
        stroke-dasharray: 14 3 2 3;
      }
      .point {
        stroke: var(--ink-soft);
      }
      .construction {
        stroke: var(--moved);
        stroke-dasharray: 2 3;
      }
      .axis {
        stroke-width: 3;
      }
      .hinge,
      .knee {
        fill: var(--paper);
        stroke-width: 1.5;
      }
      .moved,
      .moved-hinge {
        stroke: var(--moved);
        stroke-dasharray: 8 5;
        stroke-width: 1.5;
      }
      .moved-hinge {
        fill: var(--paper);
        stroke-dasharray: none;
      }
      .load {
        stroke-width: 1.5;
      }
      .reaction {
        stroke-width: 2.5;
        stroke: var(--ink-soft);
      }
      .tie {
        stroke: var(--ink-soft);
      }
      .hatch {
        stroke: var(--ink-soft);
      }
      .moments {
        stroke-width: 1.5;
      }
      .dimension {
        stroke: var(--ink-soft);
      }
      text {
        fill: var(--ink);
        font-size: 12px;
        /* A rim of paper keeps figures readable upon lines. */
        paint-order: stroke;
        stroke: var(--paper);
        stroke-width: 4px;
      }
      .force-text,
      .dimension-text {
        fill: var(--ink-soft);
      }
      .item {
        cursor: pointer;
      }
      .item.selected path:not(.hatch),
      .item.selected circle {
        stroke: var(--moved);
      }
      .tools {
        position: absolute;
        right: 8px;
        top: 8px;
        display: flex;
        gap: 4px;
      }
      .empty {
        position: absolute;
        inset: 0;
        display: grid;
        place-content: center;
        color: var(--ink-soft);
      }
    `,
  ];

  private grip: { x: number; y: number; frame: Frame } | undefined;
  private readonly resize = new ResizeObserver(([entry]) => {
    const { width = 0, height = 0 } = entry?.contentRect ?? {};
    this.size = [width, height];
  });
  private opened = -1;

  constructor() {
    super();
    this.circles = false;
    this.mechanism = true;
    this.frame = undefined;
    this.size = [0, 0];
    new Watch(this, () => this.store);
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.resize.observe(this);
  }

  override disconnectedCallback(): void {
    this.resize.disconnect();
    super.disconnectedCallback();
  }

  override willUpdate(): void {
    // Another graph is shown whole; a view that was chosen stays while sliders move.
    if (this.opened !== this.store.opened) {
      this.opened = this.store.opened;
      this.frame = undefined;
    }
  }

  override render(): TemplateResult {
    const items = sceneOf(this.store.session);
    const marks = items.flatMap((item) => item.marks);
    const scale = this.scale(marks);
    const axis = marks.find((mark): mark is Mark & { mark: 'axis' } => mark.mark === 'axis');
    const metres = (value: number) => printQuantity(value, measures.length, this.store.system);
    const order = ['moments', 'line', 'curve', 'circle', 'mechanism', 'axis', 'point', 'load', 'reaction'];
    const drawn = items
      .flatMap(({ node, marks: own }) => own.map((mark) => ({ node, mark })))
      .filter(({ mark }) => this.mechanism || mark.mark !== 'mechanism')
      .toSorted((a, b) => order.indexOf(a.mark.mark) - order.indexOf(b.mark.mark));
    return html`
      <svg
        role="img"
        aria-label=${axis === undefined ? 'Elevation: nothing to draw yet' : 'Elevation of the arch'}
        @wheel=${this.wheel}
        @pointerdown=${this.down}
        @pointermove=${this.move}
        @pointerup=${this.up}
        @pointercancel=${this.up}
      >
        ${drawn.map(({ node, mark }) => this.item(node, mark, scale))}
        ${axis === undefined ? nothing : dimensionsOf(axis, scale.place, metres)}
      </svg>
      ${marks.length === 0 ? html`<p class="empty">Points, chords and the arch are drawn here as soon as the board has them.</p>` : nothing}
      <div class="tools">
        <button aria-pressed=${this.mechanism} @click=${() => (this.mechanism = !this.mechanism)}>Mechanism</button>
        <button aria-pressed=${this.circles} @click=${() => (this.circles = !this.circles)}>Circles</button>
        <button @click=${() => (this.frame = undefined)}>Show all</button>
      </div>
    `;
  }

  private item(node: string, mark: Mark, scale: Scale): SVGTemplateResult {
    const selected = this.store.selection.has(node) ? 'selected' : '';
    return svg`<g class="item ${selected}" data-node=${node} @click=${() => this.store.select([node])}>${drawMark(mark, scale)}</g>`;
  }

  private view(marks: readonly Mark[]): Frame {
    return this.frame ?? frameOf(marks);
  }

  private scale(marks: readonly Mark[]): Scale {
    const [width, height] = this.size;
    const frame = this.view(marks);
    const metre = Math.min(width / (frame.right - frame.left), height / (frame.top - frame.bottom)) || 1;
    const [midX, midY] = [(frame.left + frame.right) / 2, (frame.bottom + frame.top) / 2];
    const forces = marks.flatMap((mark) =>
      mark.mark === 'load' || mark.mark === 'reaction' ? [Math.hypot(mark.force.x, mark.force.y)] : [],
    );
    const values = marks.flatMap((mark) => (mark.mark === 'moments' ? mark.values.map(Math.abs) : []));
    const { system } = this.store;
    return {
      metre,
      force: 56 / Math.max(...forces, 1),
      moment: 70 / Math.max(...values, 1),
      place: ({ x, y }: XY) => [width / 2 + (x - midX) * metre, height / 2 - (y - midY) * metre],
      forceText: (newtons) => printQuantity(newtons, measures.force, system, { digits: 3 }),
      momentText: (value) => printQuantity(value, measures.moment, system),
      circles: this.circles,
    };
  }

  private wheel(event: WheelEvent): void {
    event.preventDefault();
    const marks = sceneOf(this.store.session).flatMap((item) => item.marks);
    const frame = this.view(marks);
    const { metre } = this.scale(marks);
    const [width, height] = this.size;
    const box = this.getBoundingClientRect();
    const at = {
      x: (frame.left + frame.right) / 2 + (event.clientX - box.left - width / 2) / metre,
      y: (frame.bottom + frame.top) / 2 - (event.clientY - box.top - height / 2) / metre,
    };
    const factor = Math.exp(Math.max(-60, Math.min(60, event.deltaY)) * 0.003);
    const about = (edge: number, centre: number) => centre + (edge - centre) * factor;
    this.frame = {
      left: about(frame.left, at.x),
      right: about(frame.right, at.x),
      bottom: about(frame.bottom, at.y),
      top: about(frame.top, at.y),
    };
  }

  private down(event: PointerEvent): void {
    if (event.button !== 0) return;
    const frame = this.view(sceneOf(this.store.session).flatMap((item) => item.marks));
    this.grip = { x: event.clientX, y: event.clientY, frame };
  }

  private move(event: PointerEvent): void {
    const { grip } = this;
    if (grip === undefined) return;
    if (Math.hypot(event.clientX - grip.x, event.clientY - grip.y) < 4) return;
    const { metre } = this.scale(sceneOf(this.store.session).flatMap((item) => item.marks));
    const [dx, dy] = [(event.clientX - grip.x) / metre, (event.clientY - grip.y) / metre];
    const { left, right, bottom, top } = grip.frame;
    this.frame = { left: left - dx, right: right - dx, bottom: bottom + dy, top: top + dy };
  }

  private up(): void {
    this.grip = undefined;
  }
}

customElements.define('sk-elevation', Elevation);

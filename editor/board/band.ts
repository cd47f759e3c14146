/** A rectangle that is drawn over the board to select what lies in it. */
export class RubberBand {
  private readonly area: HTMLElement;
  private readonly done: (left: number, top: number, right: number, bottom: number) => void;
  private readonly frame = document.createElement('div');
  private start: readonly [number, number] | undefined;

  /** @param done is given the rectangle in the window's pixels. */
  constructor(area: HTMLElement, done: RubberBand['done']) {
    this.area = area;
    this.done = done;
    this.frame.className = 'rubber';
    // Before the skeleton hears of it: with shift held the empty board is not moved but selected on.
    area.addEventListener('pointerdown', (event) => this.down(event), { capture: true });
    area.addEventListener('pointermove', (event) => this.move(event));
    area.addEventListener('pointerup', (event) => this.up(event));
    area.addEventListener('pointercancel', () => this.end());
  }

  private down(event: PointerEvent): void {
    if (!event.shiftKey || event.button !== 0) return;
    const onSlip = event
      .composedPath()
      .some((part) => part instanceof HTMLElement && part.localName === 'sk-slip');
    if (onSlip) return;
    event.stopPropagation();
    event.preventDefault();
    this.start = [event.clientX, event.clientY];
    this.area.setPointerCapture(event.pointerId);
    this.area.append(this.frame);
    this.move(event);
  }

  private move(event: PointerEvent): void {
    if (this.start === undefined) return;
    const box = this.area.getBoundingClientRect();
    const { style } = this.frame;
    style.left = `${Math.min(this.start[0], event.clientX) - box.left}px`;
    style.top = `${Math.min(this.start[1], event.clientY) - box.top}px`;
    style.width = `${Math.abs(event.clientX - this.start[0])}px`;
    style.height = `${Math.abs(event.clientY - this.start[1])}px`;
  }

  private up(event: PointerEvent): void {
    if (this.start === undefined) return;
    const [x, y] = this.start;
    const [u, v] = [event.clientX, event.clientY];
    this.end();
    this.done(Math.min(x, u), Math.min(y, v), Math.max(x, u), Math.max(y, v));
  }

  private end(): void {
    this.start = undefined;
    this.frame.remove();
  }
}

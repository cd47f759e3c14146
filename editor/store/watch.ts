import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Store } from './store.ts';

/** Renders a component again after every change of the store, while it is on the page. */
export class Watch implements ReactiveController {
  private readonly host: ReactiveControllerHost;
  private readonly store: () => Store;
  private stop: (() => void) | undefined;

  constructor(host: ReactiveControllerHost, store: () => Store) {
    this.host = host;
    this.store = store;
    host.addController(this);
  }

  hostConnected(): void {
    this.stop = this.store().subscribe(() => this.host.requestUpdate());
  }

  hostDisconnected(): void {
    this.stop?.();
  }
}

import { type DBSchema, type IDBPDatabase, openDB } from 'idb';

/** The work of one window, as it is kept in the browser after every edit. */
export interface Kept {
  /** Of the window that it was kept by. */
  readonly window: string;
  readonly title: string;
  readonly text: string;
  /** Milliseconds since 1970. */
  readonly at: number;
}

interface Schema extends DBSchema {
  work: { key: string; value: Kept; indexes: { at: number } };
}

/** How many windows' work is kept. */
const MOST_KEPT = 20;

/** The browser's own store, in which every window keeps its work under its own name: none overwrites another's. */
export class KeptWork {
  private readonly database: Promise<IDBPDatabase<Schema>>;

  constructor() {
    this.database = openDB<Schema>('skewback', 1, {
      upgrade(database) {
        database.createObjectStore('work', { keyPath: 'window' }).createIndex('at', 'at');
      },
    });
  }

  async keep(work: Kept): Promise<void> {
    const database = await this.database;
    await database.put('work', work);
    const keys = await database.getAllKeysFromIndex('work', 'at');
    for (const key of keys.slice(0, Math.max(0, keys.length - MOST_KEPT))) await database.delete('work', key);
  }

  async of(window: string): Promise<Kept | undefined> {
    return (await this.database).get('work', window);
  }

  /** The work of all windows, the latest first. */
  async all(): Promise<Kept[]> {
    return (await (await this.database).getAllFromIndex('work', 'at')).reverse();
  }
}

import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { PendingChange } from './pending-change';

/** Where changes are kept until the server has them. */
export interface PendingStore {
  /** What is kept of one owner, oldest first. */
  list(owner: string): Promise<readonly PendingChange[]>;
  /** Resolves when it is on the device. */
  put(change: PendingChange): Promise<void>;
  remove(id: string): Promise<void>;
}

interface DeskDatabase extends DBSchema {
  pending: { key: string; value: PendingChange; indexes: { owner: string } };
}

/**
 * The browser's own database, opened when it is first needed.
 *
 * @param name of the database; tests give each its own
 */
export class DevicePendingStore implements PendingStore {
  private opened: Promise<IDBPDatabase<DeskDatabase>> | null = null;

  constructor(private readonly name = 'stillstroke-desk') {}

  async list(owner: string): Promise<readonly PendingChange[]> {
    const all = await (await this.database()).getAllFromIndex('pending', 'owner', owner);
    return all.sort((a, b) => a.order - b.order);
  }

  async put(change: PendingChange): Promise<void> {
    // Written through to the disk, not only handed to the system: a crash must not take it.
    const writing = (await this.database()).transaction('pending', 'readwrite', { durability: 'strict' });
    await Promise.all([writing.store.put(change), writing.done]);
  }

  async remove(id: string): Promise<void> {
    await (await this.database()).delete('pending', id);
  }

  private database(): Promise<IDBPDatabase<DeskDatabase>> {
    this.opened ??= openDB<DeskDatabase>(this.name, 1, {
      upgrade: (database) => {
        database.createObjectStore('pending', { keyPath: 'id' }).createIndex('owner', 'owner');
      },
      // A newer version of the page, in another tab, must not wait for this one.
      blocking: (_current, _blocked, event) => (event.target as IDBDatabase).close(),
      terminated: () => (this.opened = null),
    });
    return this.opened;
  }
}

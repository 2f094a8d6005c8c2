import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { FindingFields } from './finding-fields';

/** A change of a finding that the server does not have yet. */
export interface PendingEdit {
  readonly id: string;
  /** Who wrote it, and in which review. */
  readonly owner: string;
  readonly findingId: string;
  /** The version of the finding it was made on. */
  readonly version: number;
  /** The changed fields as they were then. */
  readonly before: Partial<FindingFields>;
  readonly after: Partial<FindingFields>;
  /** Milliseconds since 1970. */
  readonly at: number;
}

/** Where changes are kept until the server has them. */
export interface DraftStore {
  /** What is kept of one owner, newest first. */
  list(owner: string): Promise<readonly PendingEdit[]>;
  put(edit: PendingEdit): Promise<void>;
  remove(id: string): Promise<void>;
}

interface ReviewDatabase extends DBSchema {
  edits: { key: string; value: PendingEdit; indexes: { owner: string } };
}

/** The browser's own database, opened when it is first needed. */
export class DeviceDraftStore implements DraftStore {
  private opened: Promise<IDBPDatabase<ReviewDatabase>> | null = null;

  constructor(private readonly name = 'stillstroke-reviews') {}

  async list(owner: string): Promise<readonly PendingEdit[]> {
    const all = await (await this.database()).getAllFromIndex('edits', 'owner', owner);
    return all.sort((a, b) => b.at - a.at);
  }

  async put(edit: PendingEdit): Promise<void> {
    // Written through to the disk, not only handed to the system: a crash must not take it.
    const writing = (await this.database()).transaction('edits', 'readwrite', { durability: 'strict' });
    await Promise.all([writing.store.put(edit), writing.done]);
  }

  async remove(id: string): Promise<void> {
    await (await this.database()).delete('edits', id);
  }

  private database(): Promise<IDBPDatabase<ReviewDatabase>> {
    this.opened ??= openDB<ReviewDatabase>(this.name, 1, {
      upgrade: (database) => {
        database.createObjectStore('edits', { keyPath: 'id' }).createIndex('owner', 'owner');
      },
      // A newer version of the page, in another tab, must not wait for this one.
      blocking: (_current, _blocked, event) => (event.target as IDBDatabase).close(),
      terminated: () => (this.opened = null),
    });
    return this.opened;
  }
}

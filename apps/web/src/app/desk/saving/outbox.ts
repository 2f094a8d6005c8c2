import { computed, signal } from '@angular/core';
import { thingOf, type DeskChange } from '../state/desk-change';
import { folded, isDraft, isNothing, isParked, wantedOf, type PendingChange } from './pending-change';
import type { PendingStore } from './pending-store';
import type { SaveState, StopReason } from './save-state';
import type { SendResult, Theirs } from './send-change';

export interface OutboxParts {
  readonly owner: string;
  readonly store: PendingStore;
  readonly send: (change: PendingChange) => Promise<SendResult>;
  /** Whether the device has a network; asked anew each time. */
  readonly online: () => boolean;
  /** Calls back once after some milliseconds; answers how to call it off. */
  readonly later: (ms: number, callback: () => void) => () => void;
  readonly newId: () => string;
}

/** A change that waits for the coach. */
export interface Held {
  readonly change: PendingChange;
  /** What somebody else made of it meanwhile; null where the server refused it for another reason. */
  readonly theirs: Theirs | null;
  readonly words: string;
}

const FIRST_WAIT_MS = 1000;
const LONGEST_WAIT_MS = 30_000;

/**
 * Sends changes one at a time, in the order they were made, and forgets each only when the server has acknowledged it.
 * Every change is on the device before it is sent. Changes of one mark that were not sent yet become one; strokes depend
 * on each other, so theirs are folded only into the latest. A conflict or refusal holds back that thing alone.
 */
export class Outbox {
  private readonly queue = signal<readonly PendingChange[]>([]);
  private readonly heldBack = signal<ReadonlyMap<string, Held>>(new Map());
  private readonly stop = signal<StopReason | null>(null);
  private readonly failures = signal(0);
  private readonly offline = signal(false);
  private readonly deviceKeeps = signal(true);
  private readonly versions = new Map<string, number>();
  private readonly writes = new Map<string, Promise<void>>();
  private sending: string | null = null;
  private callOff: (() => void) | null = null;
  private lastOrder = 0;
  private closed = false;

  /** False when the browser lets nothing be kept: changes live only as long as the page. */
  readonly kept = this.deviceKeeps.asReadonly();
  /** Conflicts and refusals, for the coach to decide. */
  readonly held = computed(() =>
    [...this.heldBack().values()].map((held): Held => {
      const newest = this.queue().findLast(({ thing }) => thing === held.change.thing);
      return { ...held, change: newest ?? held.change };
    }),
  );
  readonly state = computed<SaveState>(() => this.stateNow());

  constructor(private readonly parts: OutboxParts) {}

  /** Versions as loaded from the server, by thing. */
  knows(versions: ReadonlyMap<string, number>): void {
    for (const [thing, version] of versions) this.versions.set(thing, version);
  }

  /** Changes of an earlier visit that are still to be sent. Answers them, oldest first; `start` sends them. */
  async recover(): Promise<readonly PendingChange[]> {
    try {
      const kept = await this.parts.store.list(this.parts.owner);
      this.queue.set(kept);
      this.lastOrder = kept.at(-1)?.order ?? 0;
    } catch {
      this.deviceKeeps.set(false);
    }
    return this.queue();
  }

  start(): void {
    this.pump();
  }

  add(changes: readonly DeskChange[]): void {
    for (const change of changes) this.addOne(change);
    this.pump();
  }

  /** The network is back, or the person asks: try at once. */
  retryNow(): void {
    this.callOff?.();
    this.callOff = null;
    if (this.stop() !== 'gone') this.stop.set(null);
    this.pump();
  }

  /** Sends the coach's own again, over the version that is there now. */
  keepMine(thing: string): void {
    const held = this.heldBack().get(thing);
    if (!held) return;
    if (held.theirs) this.rebase(thing, held.theirs.version);
    this.release(thing);
    this.pump();
  }

  /** Gives up the coach's own changes of a thing; `version` is that of what stands instead. */
  giveUp(thing: string, version: number): void {
    for (const change of this.queue().filter((one) => one.thing === thing)) this.forget(change);
    this.versions.set(thing, version);
    this.release(thing);
    this.pump();
  }

  /** Stops sending; what is kept stays on the device. */
  close(): void {
    this.closed = true;
    this.callOff?.();
  }

  private addOne(change: DeskChange): void {
    const thing = thingOf(change);
    const wanted = wantedOf(change);
    const earlier = this.foldsInto(thing, change.kind);
    const base = earlier?.base ?? this.baseOf(thing, change.kind);
    const next: PendingChange = {
      id: earlier?.id ?? this.parts.newId(),
      owner: this.parts.owner,
      order: earlier?.order ?? this.nextOrder(),
      thing,
      wanted: earlier ? folded(earlier.wanted, wanted) : wanted,
      base,
      tried: false,
    };
    this.dropParked(thing, next.id);
    this.releaseRefused(change.kind);
    const others = this.queue().filter(({ thing: one }) => one === thing);
    // Made and unmade before the server heard of it.
    if (isNothing(next.wanted) && base === 0 && others.every(({ id }) => id === next.id)) this.forget(next);
    else this.keep(next);
  }

  private foldsInto(thing: string, kind: DeskChange['kind']): PendingChange | undefined {
    const queue = this.queue();
    const last =
      kind === 'stroke'
        ? queue.filter(({ wanted }) => wanted.kind === 'stroke').at(-1)
        : queue.filter((one) => one.thing === thing).at(-1);
    const open = last?.thing === thing && last.id !== this.sending;
    // One that the coach is asked about is answered by what the coach makes of it now.
    return open && (!last.tried || this.heldBack().has(thing)) ? last : undefined;
  }

  private baseOf(thing: string, kind: DeskChange['kind']): number {
    if (kind === 'plumb' || kind === 'facts') return 1;
    return this.queue().findLast((one) => one.thing === thing)?.base ?? this.versions.get(thing) ?? 0;
  }

  private nextOrder(): number {
    return (this.lastOrder = Math.max(this.lastOrder + 1, Date.now()));
  }

  private dropParked(thing: string, except: string): void {
    for (const one of this.queue()) {
      if (one.thing === thing && one.id !== except && isParked(one)) this.forget(one);
    }
  }

  private keep(change: PendingChange): void {
    this.queue.update((queue) =>
      queue.some(({ id }) => id === change.id)
        ? queue.map((one) => (one.id === change.id ? change : one))
        : [...queue, change],
    );
    const written = this.parts.store.put(change).catch(() => this.deviceKeeps.set(false));
    this.writes.set(change.id, written);
  }

  private forget({ id }: PendingChange): void {
    this.queue.update((queue) => queue.filter((one) => one.id !== id));
    this.writes.delete(id);
    void this.parts.store.remove(id).catch(() => this.deviceKeeps.set(false));
  }

  private rebase(thing: string, base: number): void {
    this.versions.set(thing, base);
    for (const one of this.queue()) if (one.thing === thing && one.base !== base) this.keep({ ...one, base });
  }

  private release(thing: string): void {
    this.heldBack.update((held) => new Map([...held].filter(([one]) => one !== thing)));
  }

  /** A refusal may rest on other things of the same kind (strokes that lie over each other): a change tries again. */
  private releaseRefused(kind: DeskChange['kind']): void {
    for (const { change, theirs } of this.heldBack().values()) {
      if (theirs === null && change.wanted.kind === kind) this.release(change.thing);
    }
  }

  private pump(): void {
    if (this.closed || this.sending !== null || this.stop() !== null || this.callOff !== null) return;
    const next = this.queue().find((one) => !isParked(one) && !this.heldBack().has(one.thing));
    if (!next) return;
    this.sending = next.id;
    void this.sendOne(next).then(() => {
      this.sending = null;
      this.pump();
    });
  }

  private async sendOne(change: PendingChange): Promise<void> {
    const sent = { ...change, tried: true };
    this.keep(sent);
    await this.writes.get(sent.id);
    if (this.closed) return;
    this.offline.set(!this.parts.online());
    this.take(sent, await this.parts.send(sent));
  }

  private take(change: PendingChange, result: SendResult): void {
    if (result.kind !== 'later') this.failures.set(0);
    switch (result.kind) {
      case 'done':
        this.acknowledged(change, result.version);
        break;
      case 'conflict':
        this.hold({ change, theirs: result.theirs, words: 'Somebody else changed this meanwhile.' });
        break;
      case 'refused':
        this.hold({ change, theirs: null, words: result.words });
        break;
      case 'later':
        this.waitAWhile();
        break;
      case 'stopped':
        this.stop.set(result.why);
    }
  }

  private acknowledged(change: PendingChange, version: number): void {
    const onlyDraft = isDraft(change.wanted);
    // The finished one is gone from the server; the unfinished one stays on the device.
    if (onlyDraft) this.keep({ ...change, base: 0, tried: false });
    else this.forget(change);
    const versioned = ['mark', 'stroke', 'scale'].includes(change.wanted.kind);
    if (versioned) this.rebase(change.thing, version);
  }

  private hold(held: Held): void {
    this.heldBack.update((all) => new Map(all).set(held.change.thing, held));
  }

  private waitAWhile(): void {
    this.offline.set(!this.parts.online());
    this.failures.update((count) => count + 1);
    const wait = Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** (this.failures() - 1));
    this.callOff = this.parts.later(wait, () => {
      this.callOff = null;
      this.pump();
    });
  }

  private stateNow(): SaveState {
    const [drafts, open] = [
      this.queue().filter(isParked).length,
      this.queue().filter((one) => !isParked(one)),
    ];
    const count = open.length;
    const why = this.stop();
    if (why !== null && count > 0) return { kind: 'stopped', count, why };
    const held = [...this.heldBack().values()];
    const conflicts = held.filter(({ theirs }) => theirs !== null).length;
    if (conflicts > 0) return { kind: 'conflict', count: conflicts };
    const refusal = held[0];
    if (refusal) return { kind: 'refused', count: held.length, words: refusal.words };
    if (count === 0) return { kind: 'saved', drafts };
    if (this.failures() > 0) return { kind: 'waiting', count, offline: this.offline() };
    return { kind: 'saving', count };
  }
}

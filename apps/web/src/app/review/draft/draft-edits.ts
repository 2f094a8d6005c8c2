import { computed, signal } from '@angular/core';
import type { Finding } from '@stillstroke/contract/reviews';
import type { DraftStore, PendingEdit } from './draft-store';
import { fieldsOf, namesOf, only, sameField, type FieldName, type FindingFields } from './finding-fields';

/** What came of sending a change. */
export type EditResult =
  | { readonly kind: 'done'; readonly finding: Finding }
  /** Somebody else changed the finding; null when it is no longer there. */
  | { readonly kind: 'conflict'; readonly finding: Finding | null }
  | { readonly kind: 'refused'; readonly words: string }
  /** Not reached, or not now: send it again. */
  | { readonly kind: 'later' }
  | { readonly kind: 'stopped'; readonly why: StopReason };

export type StopReason = 'signed-out' | 'forbidden' | 'sent' | 'gone';

export interface DraftEditsParts {
  readonly owner: string;
  readonly store: DraftStore;
  readonly send: (edit: PendingEdit) => Promise<EditResult>;
  /** The server has this now. */
  readonly saved: (finding: Finding) => void;
  readonly online: () => boolean;
  /** Calls back once after some milliseconds; answers how to call it off. */
  readonly later: (ms: number, callback: () => void) => () => void;
  readonly newId: () => string;
  readonly now: () => number;
}

/** A change that waits for the writer. */
export interface HeldEdit {
  readonly edit: PendingEdit;
  /** What somebody else made of the finding meanwhile; null where it is gone or the server refused the change. */
  readonly theirs: Finding | null;
  /** The fields in which both differ. */
  readonly fields: readonly FieldName[];
  readonly words: string;
}

export type DraftSaveState =
  | { readonly kind: 'saved' }
  | { readonly kind: 'saving' }
  | { readonly kind: 'waiting'; readonly offline: boolean }
  | { readonly kind: 'held' }
  | { readonly kind: 'stopped'; readonly why: StopReason };

/** How long after the last key a change is sent. */
const PAUSE_MS = 700;
const FIRST_WAIT_MS = 1000;
const LONGEST_WAIT_MS = 30_000;

/**
 * Saves findings as they are typed. Every change is on the device before it is sent, and stays there until the server
 * has acknowledged it. Of a finding that somebody else changed meanwhile, fields that only one of both touched are put
 * together; where both changed the same field, the writer decides.
 */
export class DraftEdits {
  private readonly edits = signal<ReadonlyMap<string, PendingEdit>>(new Map());
  private readonly heldBack = signal<ReadonlyMap<string, HeldEdit>>(new Map());
  private readonly left = signal<readonly PendingEdit[]>([]);
  private readonly stop = signal<StopReason | null>(null);
  private readonly failures = signal(0);
  private readonly offline = signal(false);
  private readonly deviceKeeps = signal(true);
  private readonly sending = signal<string | null>(null);
  private callOff: (() => void) | null = null;
  private closed = false;
  private settled: (() => void)[] = [];

  /** False when the browser lets nothing be kept: changes live only as long as the page. */
  readonly kept = this.deviceKeeps.asReadonly();
  readonly held = computed(() => [...this.heldBack().values()]);
  /** Other texts of a finding that another tab left on this device. */
  readonly spare = this.left.asReadonly();
  readonly state = computed<DraftSaveState>(() => {
    const why = this.stop();
    if (why !== null && this.edits().size > 0) return { kind: 'stopped', why };
    if (this.heldBack().size > 0) return { kind: 'held' };
    if (this.edits().size === 0) return { kind: 'saved' };
    if (this.failures() > 0) return { kind: 'waiting', offline: this.offline() };
    return { kind: 'saving' };
  });

  constructor(private readonly parts: DraftEditsParts) {}

  /** What is typed of a finding and not yet saved. */
  pendingOf(findingId: string): Partial<FindingFields> | null {
    return this.edits().get(findingId)?.after ?? null;
  }

  /** Takes in what an earlier visit or a closed tab left on the device. Of several for one finding the newest counts. */
  async recover(): Promise<void> {
    try {
      for (const found of await this.parts.store.list(this.parts.owner)) {
        const taken = this.edits().get(found.findingId);
        if (taken && namesOf(found.after).some((name) => !sameField(name, found.after, taken.after))) {
          this.left.update((spare) => [...spare, found]);
          continue;
        }
        void this.parts.store.remove(found.id).catch(() => undefined);
        // Under an id of this tab's own, so that a tab still open and this one do not write over each other.
        if (!taken) this.keep({ ...found, id: this.parts.newId() });
      }
    } catch {
      this.deviceKeeps.set(false);
    }
    this.pump();
  }

  /** @param known the finding as the server last gave it */
  edit(known: Finding, fields: Partial<FindingFields>): void {
    const there = this.edits().get(known.id);
    const names = namesOf(fields).filter((name) => there?.after[name] === undefined);
    const next: PendingEdit = {
      id: there?.id ?? this.parts.newId(),
      owner: this.parts.owner,
      findingId: known.id,
      version: there?.version ?? known.version,
      before: { ...there?.before, ...only(fieldsOf(known), names) },
      after: { ...there?.after, ...fields },
      at: this.parts.now(),
    };
    const changed = namesOf(next.after).some((name) => !sameField(name, next.after, next.before));
    const underWay = this.sending() === known.id;
    if (!changed && !underWay) this.forget(next);
    else this.keep(next);
    if (this.failures() === 0) this.pumpIn(PAUSE_MS);
  }

  /** Sends at once what waits; resolves when nothing is under way. True when the server has everything. */
  async flush(): Promise<boolean> {
    this.retryNow();
    if (this.sending() !== null) await new Promise<void>((done) => this.settled.push(done));
    return this.edits().size === 0;
  }

  retryNow(): void {
    this.callOff?.();
    this.callOff = null;
    if (this.stop() === 'signed-out') this.stop.set(null);
    this.pump();
  }

  /** Conflict: the writer's own is sent over what is there now. */
  keepMine(findingId: string): void {
    const held = this.heldBack().get(findingId);
    const edit = this.edits().get(findingId);
    if (!held || !edit) return;
    if (held.theirs) this.keep(rebased(edit, held.theirs));
    this.release(findingId);
    this.pump();
  }

  /** Conflict or refusal: the writer's own is given up. */
  giveUp(findingId: string): void {
    const edit = this.edits().get(findingId);
    if (edit) this.forget(edit);
    this.release(findingId);
    this.pump();
  }

  /** Takes a text that another tab left, as if it were typed now; null: throws it away. */
  settleSpare(spare: PendingEdit, known: Finding | null): void {
    this.left.update((all) => all.filter(({ id }) => id !== spare.id));
    void this.parts.store.remove(spare.id).catch(() => undefined);
    if (known) this.edit(known, spare.after);
  }

  /** A finding is gone for good, by the writer's own hand. */
  dropped(findingId: string): void {
    this.giveUp(findingId);
    for (const spare of this.left()) if (spare.findingId === findingId) this.settleSpare(spare, null);
  }

  /** Stops sending; what is kept stays on the device. */
  close(): void {
    this.closed = true;
    this.callOff?.();
  }

  private keep(edit: PendingEdit): void {
    this.edits.update((all) => new Map(all).set(edit.findingId, edit));
    void this.parts.store.put(edit).catch(() => this.deviceKeeps.set(false));
  }

  private forget({ id, findingId }: PendingEdit): void {
    this.edits.update((all) => new Map([...all].filter(([one]) => one !== findingId)));
    void this.parts.store.remove(id).catch(() => this.deviceKeeps.set(false));
  }

  private release(findingId: string): void {
    this.heldBack.update((all) => new Map([...all].filter(([one]) => one !== findingId)));
  }

  private pumpIn(ms: number): void {
    this.callOff?.();
    this.callOff = this.parts.later(ms, () => {
      this.callOff = null;
      this.pump();
    });
  }

  private pump(): void {
    if (this.closed || this.sending() !== null || this.stop() !== null || this.callOff !== null) {
      this.settle();
      return;
    }
    const next = [...this.edits().values()].find(({ findingId }) => !this.heldBack().has(findingId));
    if (!next) {
      this.settle();
      return;
    }
    this.sending.set(next.findingId);
    void this.parts.send(next).then((result) => {
      this.sending.set(null);
      if (!this.closed) this.take(next, result);
      this.pump();
    });
  }

  private settle(): void {
    if (this.sending() !== null) return;
    const waiting = this.settled;
    this.settled = [];
    for (const done of waiting) done();
  }

  private take(sent: PendingEdit, result: EditResult): void {
    if (result.kind !== 'later') this.failures.set(0);
    switch (result.kind) {
      case 'done':
        this.parts.saved(result.finding);
        this.afterwards(sent, result.finding);
        break;
      case 'conflict':
        this.meet(sent, result.finding);
        break;
      case 'refused':
        this.hold({ edit: sent, theirs: null, fields: namesOf(sent.after), words: result.words });
        break;
      case 'later':
        this.offline.set(!this.parts.online());
        this.failures.update((count) => count + 1);
        this.pumpIn(Math.min(LONGEST_WAIT_MS, FIRST_WAIT_MS * 2 ** (this.failures() - 1)));
        break;
      case 'stopped':
        this.stop.set(result.why);
    }
  }

  /** What was typed while the change was under way stays to be sent, on top of it. */
  private afterwards(sent: PendingEdit, finding: Finding): void {
    const now = this.edits().get(sent.findingId);
    if (!now) return;
    const next = rebased(now, finding);
    if (namesOf(next.after).length === 0) this.forget(now);
    else this.keep(next);
  }

  private meet(sent: PendingEdit, theirs: Finding | null): void {
    const edit = this.edits().get(sent.findingId) ?? sent;
    if (!theirs) {
      const words = 'Somebody took this finding out of the review meanwhile.';
      this.hold({ edit, theirs, fields: namesOf(edit.after), words });
      return;
    }
    this.parts.saved(theirs);
    const there = fieldsOf(theirs);
    const both = namesOf(edit.after).filter(
      (name) => !sameField(name, there, edit.before) && !sameField(name, there, edit.after),
    );
    if (both.length === 0) {
      const next = rebased(edit, theirs);
      if (namesOf(next.after).length === 0) this.forget(edit);
      else this.keep(next);
      return;
    }
    const who = theirs.updatedBy ?? 'Somebody';
    this.hold({ edit, theirs, fields: both, words: `${who} changed this finding meanwhile.` });
  }

  private hold(held: HeldEdit): void {
    this.heldBack.update((all) => new Map(all).set(held.edit.findingId, held));
  }
}

/** The same wish on top of what is there now; fields that are there already drop out. */
function rebased(edit: PendingEdit, there: Finding): PendingEdit {
  const now = fieldsOf(there);
  const names = namesOf(edit.after).filter((name) => !sameField(name, edit.after, now));
  const after = Object.fromEntries(names.map((name) => [name, edit.after[name]])) as Partial<FindingFields>;
  return { ...edit, version: there.version, before: only(now, names), after };
}

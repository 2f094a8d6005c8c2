import { computed, DestroyRef, DOCUMENT, effect, inject, Injectable, signal, untracked } from '@angular/core';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { getClip, getClipFrames } from '@stillstroke/contract/clips';
import { listMarks } from '@stillstroke/contract/marks';
import { getScale } from '@stillstroke/contract/scale';
import { listStrokes } from '@stillstroke/contract/strokes';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { Connection } from '../../core/connection';
import type { DeskChange } from '../state/desk-change';
import { markKey } from '../state/desk-mark';
import { DeskState } from '../state/desk-state';
import { Outbox, type Held } from './outbox';
import type { Wanted } from './pending-change';
import { DevicePendingStore, type PendingStore } from './pending-store';
import { saySaveState, type SaveState } from './save-state';
import { ChangeSender } from './send-change';

const nothingToSave: SaveState = { kind: 'saved', drafts: 0 };

/** Loads a clip's Desk with what is still kept on the device, and keeps server and device up with it. One per page. */
@Injectable()
export class DeskSaving {
  private readonly api = inject(Api);
  private readonly connection = inject(Connection);
  private readonly window = inject(DOCUMENT).defaultView;
  private readonly store: PendingStore = new DevicePendingStore();

  private readonly box = signal<Outbox | null>(null);
  private sender: ChangeSender | null = null;
  private desk: DeskState | null = null;

  readonly state = computed(() => this.box()?.state() ?? nothingToSave);
  readonly held = computed<readonly Held[]>(() => this.box()?.held() ?? []);
  readonly words = computed(() => saySaveState(this.state(), this.box()?.kept() ?? true));

  constructor() {
    effect(() => {
      const [online, box] = [this.connection.online(), this.box()];
      // Only the network coming back is a reason to try again, not what the trying itself changes.
      if (online) untracked(() => box?.retryNow());
    });
    const warn = (event: BeforeUnloadEvent) => this.warnBeforeLoss(event);
    this.window?.addEventListener('beforeunload', warn);
    inject(DestroyRef).onDestroy(() => {
      this.window?.removeEventListener('beforeunload', warn);
      this.box()?.close();
    });
  }

  /**
   * The Desk of a clip that is ready. Changes kept from an earlier visit are on it, and are sent.
   *
   * @throws HttpErrorResponse when the server refuses or cannot be reached
   */
  async open(clip: Clip, user: SignedInUser): Promise<DeskState> {
    this.box()?.close();
    const params = { id: clip.id };
    const [frames, strokes, marks, scale] = await Promise.all([
      firstValueFrom(this.api.call(getClipFrames, { params })),
      firstValueFrom(this.api.call(listStrokes, { params })),
      firstValueFrom(this.api.call(listMarks, { params })),
      firstValueFrom(this.api.call(getScale, { params })),
    ]);
    const desk = new DeskState({
      clip,
      frameTimesUs: frames.timestampsUs,
      strokes: strokes.items,
      marks: marks.items,
      scale: scale.scale,
      canEdit: user.role === 'coach' || user.role === 'admin',
    });
    this.desk = desk;
    if (!desk.canEdit) return desk;
    const sender = new ChangeSender(this.api, clip.id, (spread) => desk.takeSpread(spread));
    this.sender = sender;
    const box = this.boxFor(`${user.id}:${clip.id}`, sender);
    box.knows(
      new Map([
        ...marks.items.map((mark) => [`mark:${markKey(mark.arm, mark.frame)}`, mark.version] as const),
        ...strokes.items.map((stroke) => [`stroke:${stroke.id}`, stroke.version] as const),
        ['scale', scale.version] as const,
      ]),
    );
    for (const { wanted } of await box.recover()) desk.takeIn([changeTo(desk, wanted)]);
    desk.onChange((changes) => box.add(changes));
    this.box.set(box);
    box.start();
    return desk;
  }

  loadClip(id: string): Promise<Clip> {
    return firstValueFrom(this.api.call(getClip, { params: { id } }));
  }

  retryNow(): void {
    this.box()?.retryNow();
  }

  /** Conflict or refusal: sends the coach's own again. */
  keepMine(held: Held): void {
    this.box()?.keepMine(held.change.thing);
  }

  /** Conflict or refusal: puts what the server has on the Desk and gives the coach's own up. */
  async takeTheirs(held: Held): Promise<void> {
    const [box, desk, sender] = [this.box(), this.desk, this.sender];
    if (!box || !desk || !sender) return;
    const theirs = held.theirs ?? (await sender.fetchTheirs(held.change.wanted));
    desk.takeIn([changeTo(desk, theirs.wanted)]);
    box.giveUp(held.change.thing, theirs.version);
  }

  private boxFor(owner: string, sender: ChangeSender): Outbox {
    return new Outbox({
      owner,
      store: this.store,
      send: (change) => sender.send(change),
      online: () => this.connection.online(),
      later: (ms, callback) => {
        const handle = setTimeout(callback, ms);
        return () => clearTimeout(handle);
      },
      newId: () => crypto.randomUUID(),
    });
  }

  /** Only where the device keeps nothing would leaving lose something. */
  private warnBeforeLoss(event: BeforeUnloadEvent): void {
    const box = this.box();
    if (box && !box.kept() && box.state().kind !== 'saved') event.preventDefault();
  }
}

/** The change that makes a thing of the Desk what is wanted. */
export function changeTo(desk: DeskState, wanted: Wanted): DeskChange {
  switch (wanted.kind) {
    case 'mark': {
      const { arm, frame, mark } = wanted;
      return { kind: 'mark', arm, frame, before: desk.markAt(arm, frame), after: mark };
    }
    case 'stroke': {
      const before = desk.strokes().find(({ id }) => id === wanted.id) ?? null;
      return { kind: 'stroke', id: wanted.id, before, after: wanted.stroke };
    }
    case 'plumb':
      return { kind: 'plumb', before: desk.plumb(), after: wanted.plumb };
    case 'scale':
      return { kind: 'scale', before: desk.scale.stored(), after: wanted.scale };
    case 'distance':
      return { kind: 'distance', before: desk.setUp.distance(), after: wanted.distance };
    case 'facts': {
      const before = desk.setUp.facts();
      return { kind: 'facts', before, after: { ...before, ...wanted.facts } };
    }
  }
}

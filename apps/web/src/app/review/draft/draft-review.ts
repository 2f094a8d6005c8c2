import { computed, DestroyRef, DOCUMENT, effect, inject, Injectable, signal, untracked } from '@angular/core';
import type { SignedInUser } from '@stillstroke/contract/auth';
import {
  addFinding,
  deleteFinding,
  findingSchema,
  getReview,
  reviewSchema,
  sendReview,
  updateFinding,
  updateReview,
  type Finding,
  type FindingKind,
  type Review,
} from '@stillstroke/contract/reviews';
import { firstValueFrom, timeout, type Observable } from 'rxjs';
import { Api } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { Connection } from '../../core/connection';
import { Notices } from '../../core/notices';
import { DraftEdits, type EditResult } from './draft-edits';
import { DeviceDraftStore, type PendingEdit } from './draft-store';
import { fieldsOf, type FindingFields } from './finding-fields';
import { sayDraftState } from './say-draft-state';

const ANSWER_WITHIN_MS = 20_000;

/** A finding as it stands on the page: what the server has, with what is typed on top. */
export interface DraftFinding {
  readonly known: Finding;
  readonly fields: FindingFields;
}

/** The draft that a page works on, kept up with server and device. One per page. */
@Injectable()
export class DraftReview {
  private readonly api = inject(Api);
  private readonly connection = inject(Connection);
  private readonly notices = inject(Notices);
  private readonly document = inject(DOCUMENT);
  private readonly store = new DeviceDraftStore();

  private readonly server = signal<Review | null>(null);
  private readonly box = signal<DraftEdits | null>(null);
  private readonly working = signal(false);

  readonly review = this.server.asReadonly();
  /** An act on the whole draft is under way. */
  readonly busy = this.working.asReadonly();
  readonly findings = computed<readonly DraftFinding[]>(() => {
    const box = this.box();
    return (this.server()?.findings ?? []).map((known) => ({
      known,
      fields: { ...fieldsOf(known), ...box?.pendingOf(known.id) },
    }));
  });
  readonly state = computed(() => this.box()?.state() ?? ({ kind: 'saved' } as const));
  readonly words = computed(() => sayDraftState(this.state(), this.box()?.kept() ?? true));
  readonly held = computed(() => this.box()?.held() ?? []);
  readonly spare = computed(() => this.box()?.spare() ?? []);

  constructor() {
    const window = this.document.defaultView;
    effect(() => {
      const [online, box] = [this.connection.online(), this.box()];
      if (online) untracked(() => box?.retryNow());
    });
    const look = () => void this.lookAgain();
    const warn = (event: BeforeUnloadEvent) => {
      const box = this.box();
      if (box && !box.kept() && box.state().kind !== 'saved') event.preventDefault();
    };
    window?.addEventListener('focus', look);
    window?.addEventListener('beforeunload', warn);
    inject(DestroyRef).onDestroy(() => {
      window?.removeEventListener('focus', look);
      window?.removeEventListener('beforeunload', warn);
      // What is typed and not sent yet goes out now; it is on the device whatever becomes of it.
      void this.box()?.flush();
      this.box()?.close();
    });
  }

  /** @throws HttpErrorResponse when the server refuses or cannot be reached */
  async open(reviewId: string, user: SignedInUser): Promise<void> {
    this.box()?.close();
    this.server.set(await firstValueFrom(this.api.call(getReview, { params: { id: reviewId } })));
    const box = new DraftEdits({
      owner: `${user.id}:${reviewId}`,
      store: this.store,
      send: (edit) => this.deliver(edit),
      saved: (finding) => this.place(finding),
      online: () => this.connection.online(),
      later: (ms, callback) => {
        const handle = setTimeout(callback, ms);
        return () => clearTimeout(handle);
      },
      newId: () => crypto.randomUUID(),
      now: () => Date.now(),
    });
    await box.recover();
    this.box.set(box);
  }

  edit(findingId: string, fields: Partial<FindingFields>): void {
    const known = this.knownOf(findingId);
    if (known) this.box()?.edit(known, fields);
  }

  /** Adds a finding at the end; answers its id, null when that failed. */
  async add(kind: FindingKind): Promise<string | null> {
    const id = crypto.randomUUID();
    const done = await this.act(async (review) => {
      const params = { id: review.id };
      await this.answer(this.api.call(addFinding, { params, body: { id, kind } }));
      await this.reload();
    });
    return done ? id : null;
  }

  async remove(findingId: string): Promise<void> {
    const held = this.box()
      ?.held()
      .some(({ edit }) => edit.findingId === findingId);
    if (held !== true) await this.box()?.flush();
    await this.act(async () => {
      const version = this.knownOf(findingId)?.version ?? 0;
      await this.answer(this.api.call(deleteFinding, { params: { id: findingId }, query: { version } }));
      this.box()?.dropped(findingId);
      await this.reload();
    });
  }

  async reorder(order: readonly string[]): Promise<void> {
    const before = this.server();
    // At once, so that what was let go stays where it was put.
    this.server.update(
      (review) =>
        review && {
          ...review,
          findings: order.flatMap((id) => review.findings.find((finding) => finding.id === id) ?? []),
        },
    );
    const done = await this.act((review) => this.change(review, { order: [...order] }));
    if (!done && this.server()?.version === before?.version) this.server.set(before);
  }

  async chooseMain(findingId: string): Promise<void> {
    await this.act((review) => this.change(review, { mainFocus: findingId }));
  }

  /** Saves what is typed, then sends what is on the page. True when it was sent. */
  async send(): Promise<boolean> {
    if (!(await this.box()?.flush())) {
      this.notices.warn('Not everything is saved yet, so nothing was sent. Try again when it is.');
      return false;
    }
    return this.act(async (review) => {
      const findings = review.findings.map(({ id, version }) => ({ id, version }));
      const call = this.api.call(sendReview, {
        params: { id: review.id },
        body: { version: review.version, findings },
      });
      this.server.set(await this.answer(call));
    });
  }

  async reload(): Promise<void> {
    const review = this.server();
    if (review) this.server.set(await this.answer(this.api.call(getReview, { params: { id: review.id } })));
  }

  flush(): Promise<boolean> {
    return this.box()?.flush() ?? Promise.resolve(true);
  }

  retryNow(): void {
    this.box()?.retryNow();
  }

  keepMine(findingId: string): void {
    this.box()?.keepMine(findingId);
  }

  takeTheirs(findingId: string): void {
    this.box()?.giveUp(findingId);
    void this.lookAgain();
  }

  /** Gives up what is typed of a finding, since the finding is gone. */
  forget(findingId: string): void {
    this.box()?.dropped(findingId);
  }

  settleSpare(spare: PendingEdit, take: boolean): void {
    this.box()?.settleSpare(spare, take ? this.knownOf(spare.findingId) : null);
  }

  private change(review: Review, body: { order?: string[]; mainFocus?: string }): Promise<void> {
    const call = this.api.call(updateReview, {
      params: { id: review.id },
      body: { ...body, version: review.version },
    });
    return this.answer(call).then((changed) => this.server.set(changed));
  }

  /** Somebody may have worked on it while this page was in the background. */
  private async lookAgain(): Promise<void> {
    if (this.working() || this.state().kind !== 'saved') return;
    try {
      await this.reload();
    } catch {
      // Without an answer the page stays as it is; saving says that the server is not reached.
    }
  }

  /** Runs one act on the whole draft at a time; a refusal is said, and what is there now is shown. */
  private async act(work: (review: Review) => Promise<void>): Promise<boolean> {
    const review = this.server();
    if (!review || this.working()) return false;
    this.working.set(true);
    try {
      await work(review);
      return true;
    } catch (error) {
      const problem = problemOf(error);
      this.notices.warn(problem.detail);
      const current = reviewSchema.safeParse(problem.current);
      if (current.success) this.server.set(current.data);
      else if (problem.status === 404 || problem.status === 409) await this.reload().catch(() => undefined);
      return false;
    } finally {
      this.working.set(false);
    }
  }

  private async deliver({ findingId, version, after }: PendingEdit): Promise<EditResult> {
    try {
      const { readings, ...plain } = after;
      const body = { ...plain, ...(readings && { readings: [...readings] }), version };
      const finding = await this.answer(this.api.call(updateFinding, { params: { id: findingId }, body }));
      return { kind: 'done', finding };
    } catch (error) {
      return this.refusal(error);
    }
  }

  private async refusal(error: unknown): Promise<EditResult> {
    const problem = problemOf(error);
    const { status, code } = problem;
    if (status === 0 || status >= 500 || status === 408 || status === 429 || code === 'csrf')
      return { kind: 'later' };
    if (status === 401) return { kind: 'stopped', why: 'signed-out' };
    if (status === 403) return { kind: 'stopped', why: 'forbidden' };
    if (code === 'review-sent') return { kind: 'stopped', why: 'sent' };
    if (code === 'changed-meanwhile')
      return { kind: 'conflict', finding: findingSchema.parse(problem.current) };
    if (status !== 404) return { kind: 'refused', words: problem.detail };
    try {
      await this.reload();
      return { kind: 'conflict', finding: null };
    } catch (gone) {
      return problemOf(gone).status === 404 ? { kind: 'stopped', why: 'gone' } : { kind: 'later' };
    }
  }

  private knownOf(findingId: string): Finding | null {
    return this.server()?.findings.find(({ id }) => id === findingId) ?? null;
  }

  private place(finding: Finding): void {
    this.server.update(
      (review) =>
        review && {
          ...review,
          findings: review.findings.map((one) => (one.id === finding.id ? finding : one)),
        },
    );
  }

  /** The first answer; a line that has gone silent counts as lost. */
  private answer<T>(call: Observable<T>): Promise<T> {
    return firstValueFrom(call.pipe(timeout(ANSWER_WITHIN_MS)), { defaultValue: undefined as T });
  }
}

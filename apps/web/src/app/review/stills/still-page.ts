import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  DOCUMENT,
  effect,
  inject,
  input,
  numberAttribute,
  signal,
  untracked,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatCheckboxModule } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { addFinding, getReview, type Review } from '@stillstroke/contract/reviews';
import type { AboutStill, Still, StillLayout, StillPart } from '@stillstroke/contract/stills';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { stageColours } from '../../desk/stage/stage-colours';
import { LoadingLines } from '../../ui/loading-lines';
import { ProblemMessage } from '../../ui/problem-message';
import { sayDate } from '../../ui/say-date';
import { layoutWords } from '../finding-words';
import { composeFrames, composeStill, encodeStill } from './compose-still';
import { type DrawingKind, DrawingList } from './drawing-list';
import { DrawnThings } from './drawn-things';
import { FilmShelf } from './film-shelf';
import { PartPicker } from './part-picker';
import { StillBoard } from './still-board';
import { partLabels } from './still-layout';
import { StillServer } from './still-server';
import { suggestParts } from './suggest-parts';

/** Stands for a finding that is made when the picture is saved. */
const NEW_FINDING = 'new';

/** Where a picture for a finding is made: one exact frame or two beside each other, with what is drawn on them. */
@Component({
  selector: 'st-still-page',
  imports: [
    DrawnThings,
    LoadingLines,
    MatButtonModule,
    MatCheckboxModule,
    MatFormFieldModule,
    MatInputModule,
    MatSelectModule,
    PartPicker,
    ProblemMessage,
    RouterLink,
    StillBoard,
  ],
  providers: [FilmShelf],
  templateUrl: './still-page.html',
  styleUrl: './still-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StillPage {
  private readonly api = inject(Api);
  private readonly document = inject(DOCUMENT);
  private readonly router = inject(Router);
  private readonly server = inject(StillServer);
  protected readonly shelf = inject(FilmShelf);

  readonly reviewId = input.required<string>();
  /** From the address: the finding it is for, the frame to begin with, the still to make anew. */
  readonly finding = input<string>();
  readonly clip = input<string>();
  readonly frame = input(0, { transform: (value: unknown) => numberAttribute(value, 0) });
  readonly still = input<string>();

  protected readonly review = signal<Review | null>(null);
  protected readonly fault = signal<unknown>(null);
  protected readonly refusal = signal<string | null>(null);
  protected readonly saving = signal(false);
  protected readonly layout = signal<StillLayout>('single');
  protected readonly parts = signal<readonly StillPart[]>([]);
  protected readonly overlays = signal(true);
  protected readonly words = signal('');
  protected readonly findingId = signal<string>(NEW_FINDING);
  protected readonly tool = signal<DrawingKind | null>(null);
  protected readonly list = new DrawingList();
  protected readonly frames = signal<HTMLCanvasElement | null>(null);
  /** The frames that the picture shows at this moment. */
  private readonly shown = signal<string | null>(null);
  private replaced: Still | null = null;

  protected readonly layouts = Object.entries(layoutWords).map(([value, name]) => ({ value, name }));
  protected readonly labels = computed(() => {
    const dates = this.parts().map(({ clipId }) => sayDate(this.shelf.clip(clipId)?.date ?? '2000-01-01'));
    return partLabels(this.layout(), dates);
  });
  protected readonly findings = computed(() =>
    (this.review()?.findings ?? []).map(({ id, words }, at) => ({
      id,
      name: `Finding ${at + 1}${words ? `: ${words.slice(0, 60)}` : ''}`,
    })),
  );
  protected readonly drawing = computed(() => this.shown() !== keyOf(this.parts()));
  protected readonly marked = signal(false);

  constructor() {
    effect(() => {
      const id = this.reviewId();
      untracked(() => void this.open(id));
    });
    effect((onCleanup) => {
      const [parts, overlays, labels] = [this.parts(), this.overlays(), this.labels()];
      if (parts.length === 0) return;
      const abort = new AbortController();
      onCleanup(() => abort.abort());
      void this.compose(parts, overlays, labels, abort.signal);
    });
    inject(DestroyRef).onDestroy(() => this.shelf.close());
  }

  protected reopen(): void {
    void this.open(this.reviewId());
  }

  protected async arrange(layout: StillLayout): Promise<void> {
    const here = this.parts().at(-1);
    if (!here) return;
    this.layout.set(layout);
    const suggested = await suggestParts(layout, {
      here,
      clips: this.shelf.clips(),
      strokesOf: async (clipId) => (await this.shelf.on(clipId)).strokes,
    });
    this.parts.set(suggested);
  }

  protected choose(at: number, part: StillPart): void {
    this.parts.update((parts) => parts.map((one, index) => (index === at ? part : one)));
  }

  protected async save(): Promise<void> {
    const frames = this.frames();
    if (!frames || this.saving() || this.drawing()) return;
    this.saving.set(true);
    this.refusal.set(null);
    try {
      const picture = await encodeStill(composeStill(frames, this.list.drawings()));
      const findingId = await this.keep(picture);
      await this.router.navigate(['/reviews', this.reviewId(), 'write'], {
        fragment: `finding-${findingId}`,
      });
    } catch (error) {
      this.refusal.set(
        error instanceof Error && !('status' in error) ? error.message : problemOf(error).detail,
      );
    } finally {
      this.saving.set(false);
    }
  }

  /** Answers the finding that the picture is under. */
  private async keep(picture: Blob): Promise<string> {
    const about: AboutStill = {
      layout: this.layout(),
      parts: [...this.parts()],
      overlays: this.overlays(),
      drawings: [...this.list.drawings()],
      words: this.words().trim(),
    };
    if (this.replaced) {
      const { id, version, findingId } = this.replaced;
      await firstValueFrom(this.server.replace(id, { ...about, version }, picture));
      return findingId;
    }
    const findingId = await this.findingToFill();
    await firstValueFrom(this.server.add(findingId, about, picture));
    return findingId;
  }

  private async findingToFill(): Promise<string> {
    if (this.findingId() !== NEW_FINDING) return this.findingId();
    const id = crypto.randomUUID();
    const params = { id: this.reviewId() };
    await firstValueFrom(this.api.call(addFinding, { params, body: { id } }));
    this.findingId.set(id);
    this.review.set(await firstValueFrom(this.api.call(getReview, { params })));
    return id;
  }

  private async open(reviewId: string): Promise<void> {
    this.fault.set(null);
    try {
      const review = await firstValueFrom(this.api.call(getReview, { params: { id: reviewId } }));
      await this.shelf.open(review.athleteId);
      untracked(() => this.begin(review));
      this.review.set(review);
    } catch (error) {
      this.fault.set(error);
    }
  }

  private begin(review: Review): void {
    const stills = review.findings.flatMap((finding) => finding.stills);
    this.replaced = stills.find(({ id }) => id === this.still()) ?? null;
    const wished = this.finding();
    const last = review.findings.at(-1)?.id;
    this.findingId.set(
      review.findings.some(({ id }) => id === wished) ? (wished ?? '') : (last ?? NEW_FINDING),
    );
    if (this.replaced) {
      const { layout, parts, overlays, drawings, words, findingId } = this.replaced;
      this.findingId.set(findingId);
      this.layout.set(layout);
      this.overlays.set(overlays);
      this.words.set(words);
      this.list.load(drawings);
      if (parts.every(({ clipId }) => this.shelf.clip(clipId))) this.parts.set(parts);
      return;
    }
    const inSession = this.shelf.clips().filter(({ clip }) => clip.sessionId === review.sessionId);
    const first = inSession.find(({ clip }) => clip.strokeCount > 0) ?? inSession[0] ?? this.shelf.clips()[0];
    const clipId = this.shelf.clip(this.clip() ?? '')?.clip.id ?? first?.clip.id;
    if (clipId === undefined) return;
    this.parts.set([{ clipId, frame: this.frame() }]);
    if (this.clip() === undefined) void this.goToFirstCatch(clipId);
  }

  private async goToFirstCatch(clipId: string): Promise<void> {
    const { strokes } = await this.shelf.on(clipId);
    const frame = strokes[0]?.catch;
    if (frame !== undefined && this.parts()[0]?.frame === 0) this.parts.set([{ clipId, frame }]);
  }

  private async compose(
    parts: readonly StillPart[],
    overlays: boolean,
    labels: readonly (string | null)[],
    signal: AbortSignal,
  ): Promise<void> {
    try {
      // Words on a canvas are drawn with what fonts are there at that moment.
      const fonts = this.document.fonts.load("600 20px 'Source Sans 3'").catch(() => []);
      const pictures = await Promise.all(
        parts.map((part, at) => this.shelf.picture(part, labels[at] ?? null, signal)),
      );
      await fonts;
      if (signal.aborted) return;
      this.marked.set(pictures.some(({ marks }) => marks.length > 0));
      this.frames.set(composeFrames(pictures, overlays, stageColours(this.document.documentElement)));
      this.shown.set(keyOf(parts));
      this.refusal.set(null);
    } catch (error) {
      if (signal.aborted) return;
      this.refusal.set(error instanceof Error ? error.message : problemOf(error).detail);
    }
  }
}

const keyOf = (parts: readonly StillPart[]) => JSON.stringify(parts);

import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  input,
  output,
  signal,
  untracked,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import type { StillPart } from '@stillstroke/contract/stills';
import { viewWords } from '../../ui/clip-words';
import { sayDate } from '../../ui/say-date';
import type { FilmShelf, ShelfStroke } from './film-shelf';

/** Chooses one frame: the clip, the frame by number, or an event of a stroke. */
@Component({
  selector: 'st-part-picker',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, MatSelectModule],
  template: `
    <fieldset>
      <legend>{{ label() }}</legend>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Clip</mat-label>
        <mat-select [value]="part().clipId" (valueChange)="goTo({ clipId: $event, frame: 0 })">
          @for (choice of clips(); track choice.id) {
            <mat-option [value]="choice.id">{{ choice.name }}</mat-option>
          }
        </mat-select>
      </mat-form-field>
      <div class="frame">
        <button matButton="outlined" type="button" aria-label="One frame back" (click)="step(-1)">‹</button>
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Frame</mat-label>
          <input
            #frame
            matInput
            type="number"
            min="0"
            [max]="last()"
            [value]="part().frame"
            (change)="typed(frame)"
          />
        </mat-form-field>
        <button matButton="outlined" type="button" aria-label="One frame on" (click)="step(1)">›</button>
      </div>
      @if (strokes().length > 0) {
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Stroke</mat-label>
          <mat-select [value]="strokeId()" (valueChange)="strokeId.set($event)">
            @for (stroke of strokes(); track stroke.id) {
              <mat-option [value]="stroke.id">{{ stroke.name }}</mat-option>
            }
          </mat-select>
        </mat-form-field>
        <div class="events">
          @for (event of events(); track event.name) {
            <button matButton type="button" (click)="goTo({ clipId: part().clipId, frame: event.frame })">
              {{ event.name }}
            </button>
          }
        </div>
      }
    </fieldset>
  `,
  styles: `
    fieldset {
      display: grid;
      gap: 8px;
      margin: 0 0 12px;
      padding: 0;
      border: 0;
    }

    legend {
      margin-bottom: 6px;
      font-weight: 600;
    }

    .frame {
      display: flex;
      align-items: center;
      gap: 6px;

      mat-form-field {
        flex: 1;
        min-width: 90px;
      }
    }

    .events {
      display: flex;
      flex-wrap: wrap;
      margin-left: -8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PartPicker {
  readonly label = input.required<string>();
  readonly part = input.required<StillPart>();
  readonly shelf = input.required<FilmShelf>();
  readonly chosen = output<StillPart>();

  private readonly known = signal<readonly ShelfStroke[]>([]);
  protected readonly strokeId = signal<string | null>(null);
  protected readonly clips = computed(() =>
    this.shelf()
      .clips()
      .map(({ clip, date }) => ({
        id: clip.id,
        name: `${sayDate(date)}: ${clip.name}, ${viewWords[clip.view].toLowerCase()}`,
      })),
  );
  protected readonly last = computed(() => (this.shelf().clip(this.part().clipId)?.clip.frameCount ?? 1) - 1);
  protected readonly strokes = computed(() =>
    this.known().map((stroke, at) => ({
      ...stroke,
      name: `Stroke ${at + 1}, ${stroke.arm} arm, from frame ${stroke.entry}${stroke.breath ? ', with a breath' : ''}`,
    })),
  );
  protected readonly events = computed(() => {
    const stroke = this.known().find(({ id }) => id === this.strokeId());
    if (!stroke) return [];
    const events: readonly [string, number | null][] = [
      ['Entry', stroke.entry],
      ['Catch', stroke.catch],
      ['Vertical', stroke.vertical],
      ['Mid-pull', stroke.midPull],
      ['Exit', stroke.exit],
    ];
    return events.flatMap(([name, frame]) => (frame === null ? [] : [{ name, frame }]));
  });

  constructor() {
    effect((onCleanup) => {
      const { clipId } = this.part();
      let current = true;
      onCleanup(() => (current = false));
      this.shelf()
        .on(clipId)
        .then(({ strokes }) => current && this.take(strokes))
        .catch(() => current && this.known.set([]));
    });
  }

  protected step(by: number): void {
    this.goTo({ ...this.part(), frame: this.part().frame + by });
  }

  protected typed(field: HTMLInputElement): void {
    const frame = Math.round(field.valueAsNumber);
    if (Number.isFinite(frame)) this.goTo({ ...this.part(), frame });
    field.value = String(this.part().frame);
  }

  protected goTo({ clipId, frame }: StillPart): void {
    const last = (this.shelf().clip(clipId)?.clip.frameCount ?? 1) - 1;
    this.chosen.emit({ clipId, frame: Math.min(Math.max(frame, 0), last) });
  }

  /** The stroke one of whose events the frame is, else one that it lies in, else the first. */
  private take(strokes: readonly ShelfStroke[]): void {
    this.known.set(strokes);
    const frame = untracked(() => this.part().frame);
    const isEvent = ({ entry, catch: caught, exit, midPull, vertical }: ShelfStroke) =>
      [entry, caught, exit, midPull, vertical].includes(frame);
    const holds = ({ entry, exit, nextEntry }: ShelfStroke) => entry <= frame && frame < (nextEntry ?? exit);
    const chosen = strokes.find(({ id }) => id === untracked(() => this.strokeId()));
    if (chosen && (isEvent(chosen) || (holds(chosen) && !strokes.some(isEvent)))) return;
    const next = strokes.find(isEvent) ?? strokes.find(holds) ?? strokes[0];
    this.strokeId.set(next?.id ?? null);
  }
}

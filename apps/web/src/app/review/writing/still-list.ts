import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import type { Finding } from '@stillstroke/contract/reviews';
import { deleteStill, getStillPicture, updateStill, type Still } from '@stillstroke/contract/stills';
import { Api } from '../../core/api/api';
import { endpointUrl } from '../../core/api/endpoint-url';
import { problemOf } from '../../core/api/problem-of';
import { Notices } from '../../core/notices';
import { Ask } from '../../ui/ask/ask';
import { sayStill } from '../finding-words';

/** The pictures under a finding of a draft: their words, another picture in their place, or none. */
@Component({
  selector: 'st-still-list',
  imports: [MatButtonModule, MatFormFieldModule, MatInputModule, RouterLink],
  template: `
    <h3>Pictures</h3>
    <div class="stills">
      @for (still of stills(); track still.id) {
        <figure>
          <img [src]="still.address" [alt]="still.alt" [width]="still.width" [height]="still.height" />
          <figcaption>
            <mat-form-field appearance="outline" subscriptSizing="dynamic">
              <mat-label>Words under the picture</mat-label>
              <input
                #words
                matInput
                maxlength="300"
                [value]="still.words"
                (change)="rename(still.it, words.value)"
              />
            </mat-form-field>
            <div class="acts">
              <a
                matButton
                [routerLink]="['/reviews', reviewId(), 'still']"
                [queryParams]="{ finding: finding().id, still: still.id }"
                >Make it anew</a
              >
              <button matButton type="button" (click)="remove(still.it)">Take away</button>
            </div>
          </figcaption>
        </figure>
      }
    </div>
    <a
      matButton="outlined"
      [routerLink]="['/reviews', reviewId(), 'still']"
      [queryParams]="{ finding: finding().id }"
      >Add a picture<span class="st-visually-hidden"> to finding {{ number() }}</span></a
    >
  `,
  styles: `
    :host {
      display: block;
      margin-top: 14px;
    }

    h3 {
      margin: 0 0 6px;
      font-size: 1rem;
    }

    .stills {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(min(100%, 260px), 1fr));
      gap: 14px;
    }

    figure {
      margin: 0 0 10px;
    }

    img {
      display: block;
      width: 100%;
      height: auto;
      margin-bottom: 8px;
      border-radius: 6px;
      background: var(--st-ink);
    }

    mat-form-field {
      width: 100%;
    }

    .acts {
      display: flex;
      flex-wrap: wrap;
      margin-left: -8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StillList {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly notices = inject(Notices);

  readonly finding = input.required<Finding>();
  readonly number = input.required<number>();
  readonly reviewId = input.required<string>();
  /** Something was changed on the server. */
  readonly changed = output();

  protected readonly stills = computed(() =>
    this.finding().stills.map((still) => ({
      ...still,
      it: still,
      alt: sayStill(still),
      address: endpointUrl(getStillPicture, { id: still.id }, { version: still.version }),
    })),
  );

  protected rename({ id, version }: Still, words: string): void {
    this.api.call(updateStill, { params: { id }, body: { version, words } }).subscribe(this.after);
  }

  protected async remove({ id, version }: Still): Promise<void> {
    const sure = await this.ask.confirm({
      title: 'Take this picture out of the draft?',
      words: 'The picture goes with everything drawn on it. The film and its marks stay.',
      action: 'Take it away',
    });
    if (sure) this.api.call(deleteStill, { params: { id }, query: { version } }).subscribe(this.after);
  }

  private readonly after = {
    next: () => this.changed.emit(),
    error: (error: unknown) => {
      this.notices.warn(problemOf(error).detail);
      this.changed.emit();
    },
  };
}

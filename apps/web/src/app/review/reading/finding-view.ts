import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Finding, Question } from '@stillstroke/contract/reviews';
import { getStillPicture } from '@stillstroke/contract/stills';
import { endpointUrl } from '../../core/api/endpoint-url';
import { sayInstant } from '../../ui/say-date';
import { kindWords, sayPlusMinus, sayStill, sayValue, sayWhere } from '../finding-words';
import { Questions } from './questions';
import { ThenAndNow } from './then-and-now';

/** One finding as it is read: words, pictures, what it rests on, then and now, and what was asked about it. */
@Component({
  selector: 'st-finding-view',
  imports: [Questions, RouterLink, ThenAndNow],
  templateUrl: './finding-view.html',
  styleUrl: './finding-view.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FindingView {
  readonly finding = input.required<Finding>();
  /** What the reader may do under it. */
  readonly may = input.required<'ask' | 'answer' | 'look'>();
  /** The reader may take a picture out of a review that was sent. */
  readonly mayRemove = input(false);

  readonly said = output<Question>();
  readonly removing = output<string>();

  protected readonly where = computed(() => sayWhere(this.finding()));
  protected readonly kind = computed(() => kindWords[this.finding().kind]);
  protected readonly stills = computed(() =>
    this.finding().stills.map((still) => ({
      id: still.id,
      alt: sayStill(still),
      words: still.words,
      width: still.width,
      height: still.height,
      removed: still.removedAt === null ? null : sayInstant(still.removedAt),
      address: endpointUrl(getStillPicture, { id: still.id }, { version: still.version }),
    })),
  );
  protected readonly readings = computed(() =>
    this.finding().readings.map(({ source, stand }) => ({
      key: JSON.stringify(source),
      stand,
      words: stand.words,
      value: sayValue(stand),
      plusMinus: sayPlusMinus(stand),
      missing: stand.value === null,
      target: stand.target,
      link: stand.clipId === null ? null : ['/clips', stand.clipId],
      frame: { frame: stand.frame, ...(stand.arm && { arm: stand.arm }) },
    })),
  );
}

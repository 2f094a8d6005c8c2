import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { getClipPoster } from '@stillstroke/contract/clips';
import type { Session } from '@stillstroke/contract/sessions';
import { endpointUrl } from '../core/api/endpoint-url';
import { sayMeasuredStrokes } from '../session/session-words';
import { factsOf, sayMeasured, sayView } from '../ui/clip-words';
import { PlumbSign } from '../ui/plumb-sign';
import { RailGlance } from '../ui/rail-glance';
import { sayDate } from '../ui/say-date';

/** One session on the athlete's page: when and where, what was measured, and its clips with their facts. */
@Component({
  selector: 'st-session-card',
  imports: [PlumbSign, RailGlance, RouterLink],
  templateUrl: './session-card.html',
  styleUrl: './session-card.scss',
  host: { class: 'st-card' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SessionCard {
  readonly session = input.required<Session>();

  protected readonly when = computed(() => sayDate(this.session().date));
  protected readonly measured = computed(() => sayMeasuredStrokes(this.session().summary.strokes));
  protected readonly hasVertical = computed(() => {
    const { left, right } = this.session().summary.verticalAt;
    return left !== null || right !== null;
  });
  protected readonly clips = computed(() =>
    this.session().clips.map((clip) => ({
      id: clip.id,
      name: clip.name,
      poster: clip.hasPoster ? endpointUrl(getClipPoster, { id: clip.id }) : null,
      shows: sayView(clip),
      facts: factsOf(clip).join(' · '),
      state:
        clip.status === 'converting'
          ? 'being converted'
          : clip.status === 'failed'
            ? 'could not be converted'
            : sayMeasured(clip),
      waits: clip.status === 'ready' && clip.markedFrames === 0,
      cutOff: clip.cutOff,
    })),
  );
}

import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { RouterLink } from '@angular/router';
import type { Agreements } from '@stillstroke/contract/repeatability';
import { scaleLinear } from 'd3-scale';
import { angleNames, anglesInOrder, degrees, sayAgreement, type AngleName } from './marking-words';

const WIDTH = 640;
const HEIGHT = 240;
const INSET = { left: 52, right: 12, top: 12, bottom: 34 };

/** How two coaches agree: the sentence, then each frame's difference against its mean, with the limits. */
@Component({
  selector: 'st-agreement-card',
  imports: [MatButtonToggleModule, RouterLink],
  templateUrl: './agreement-card.html',
  styleUrl: './agreement-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AgreementCard {
  readonly pair = input.required<Agreements['items'][number]>();
  readonly clipId = input.required<string>();

  protected readonly box = `0 0 ${WIDTH} ${HEIGHT}`;
  protected readonly inset = INSET;
  protected readonly right = WIDTH - INSET.right;
  protected readonly bottom = HEIGHT - INSET.bottom;
  protected readonly angles = anglesInOrder.map((id) => ({ id, name: angleNames[id] }));
  protected readonly angle = signal<AngleName>('forearmDeg');
  protected readonly sentence = computed(() => sayAgreement(this.pair(), this.angle()));
  protected readonly rows = computed(() =>
    anglesInOrder.flatMap((id) => {
      const found = this.pair().measures?.[id];
      if (!found) return [];
      const range = ({ low, high }: { low: number; high: number }) => `${degrees(low)} to ${degrees(high)}`;
      return [
        {
          name: angleNames[id],
          bias: degrees(found.bias),
          interval: range(found.biasInterval),
          limits: range(found.limits),
          low: range(found.lowerLimitInterval),
          high: range(found.upperLimitInterval),
          marking: degrees(found.marking),
        },
      ];
    }),
  );
  protected readonly picture = computed(() => {
    const found = this.pair().measures?.[this.angle()];
    if (!found) return null;
    const means = found.points.map(({ mean }) => mean);
    const reach = [
      ...found.points.map(({ difference }) => difference),
      found.limits.low,
      found.limits.high,
      0,
    ];
    const x = scaleLinear(
      [Math.min(...means), Math.max(...means)],
      [INSET.left + 12, WIDTH - INSET.right - 12],
    );
    const y = scaleLinear(
      [Math.min(...reach), Math.max(...reach)],
      [HEIGHT - INSET.bottom - 8, INSET.top + 8],
    ).nice();
    return {
      zero: y(0),
      bias: y(found.bias),
      low: y(found.limits.low),
      high: y(found.limits.high),
      ticks: y.ticks(5).map((value) => ({ at: y(value), words: degrees(value) })),
      ends: x.domain().map((value) => degrees(value)),
      points: found.points.map(({ arm, frame, mean, difference }) => ({
        arm,
        frame,
        x: means.length > 1 && x.domain()[0] !== x.domain()[1] ? x(mean) : WIDTH / 2,
        y: y(difference),
        words: `Frame ${frame}, ${arm} arm: ${degrees(difference)} apart`,
      })),
    };
  });
}

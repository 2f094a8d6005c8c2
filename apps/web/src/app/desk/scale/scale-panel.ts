import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { Point } from '@stillstroke/contract/clip-facts';
import type { ScalePlane } from '@stillstroke/contract/scale';
import { ARM_FROM_BODY_M, ASSUMED_DISTANCE_M } from '@stillstroke/geometry/view/near-arm';
import { apparentScale } from '@stillstroke/geometry/calibration/projection';
import { fixed } from '../../ui/figure/format-figure';
import { sayReason } from '../../ui/figure/reason-words';
import { sayMetres, sayShortLength } from '../../ui/figure/say-metres';
import type { DeskState } from '../state/desk-state';
import { capital } from '../state/marking';
import { linePoints, scalePoints, type ScalePointName } from '../state/scale-points';
import { PointFields } from './point-fields';

type Length = 'metres' | 'widthM' | 'heightM' | 'uncertaintyM' | 'check';

const planeWords: Readonly<Record<ScalePlane, string>> = {
  swimmer: 'the swimmer’s plane',
  wall: 'the pool’s wall',
  floor: 'the pool’s floor',
};

/** The scale of the clip and the line that measures with it; all of it can also be typed. */
@Component({
  selector: 'st-scale-panel',
  imports: [PointFields],
  templateUrl: './scale-panel.html',
  styleUrl: './scale-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ScalePanel {
  readonly state = input.required<DeskState>();

  protected readonly planes = Object.entries(planeWords) as [ScalePlane, string][];
  protected readonly commands = computed(() => this.state().scale);
  protected readonly scale = computed(() => this.commands().scale());
  protected readonly ownPoints = computed(() => scalePoints(this.scale()));
  protected readonly linePoints = computed(() => linePoints(this.commands().line()));
  protected readonly lengths = computed<readonly { which: Length; name: string; value: number }[]>(() => {
    const scale = this.scale();
    if (!scale) return [];
    return [
      ...(scale.kind === 'length'
        ? [{ which: 'metres' as const, name: 'Length, metres', value: scale.metres }]
        : [
            { which: 'widthM' as const, name: 'Corner 1 to 2, metres', value: scale.widthM },
            { which: 'heightM' as const, name: 'Corner 2 to 3, metres', value: scale.heightM },
          ]),
      { which: 'uncertaintyM' as const, name: 'Known to ± metres', value: scale.uncertaintyM },
      ...(scale.check
        ? [{ which: 'check' as const, name: 'Second length, metres', value: scale.check.metres }]
        : []),
    ];
  });
  /** How sure a distance of the scale's own size is. */
  protected readonly sure = computed(() => {
    const own = this.commands().ownLength();
    if (!own) return '';
    if (!own.ok) return `${capital(sayReason(own.reason))}.`;
    const { metres, uncertaintyM } = own.value;
    const percent = fixed((100 * uncertaintyM) / metres, uncertaintyM / metres < 0.0195 ? 1 : 0);
    return `From how well its points can be placed: ± ${percent} % of a length like its own.`;
  });
  protected readonly checked = computed(() => {
    const check = this.commands().check();
    if (!check) return null;
    if (!check.ok) return { words: `${capital(sayReason(check.reason))}.`, agrees: null };
    const { differenceM, differencePx, agrees, uncertaintyM } = check.value;
    const by = `${sayShortLength(differenceM)} (${fixed(Math.abs(differencePx), 1)} px)`;
    const way = differenceM < 0 ? 'short' : 'long';
    const words = agrees
      ? `The second length reads ${by} too ${way}: within what placing the points may produce (± ${sayShortLength(uncertaintyM)}).`
      : `The second length reads ${by} too ${way}: more than placing the points may produce (± ${sayShortLength(uncertaintyM)}). ` +
        'Check the points, the lengths and whether both lie in one plane.';
    return { words, agrees };
  });
  protected readonly measured = computed(() => {
    const read = this.commands().measured();
    if (!read) return '';
    return read.ok ? sayMetres(read.value.metres, read.value.uncertaintyM) : capital(sayReason(read.reason));
  });
  /** What it may be used for. */
  protected readonly use = computed(() => {
    const nearer = fixed(100 * (apparentScale(ASSUMED_DISTANCE_M, ARM_FROM_BODY_M) - 1), 0);
    const only = 'For distances in this plane only; angles of the arm have no use for it.';
    return this.scale()?.plane === 'swimmer'
      ? `${only} An arm ${ARM_FROM_BODY_M} m nearer to the camera reads about ${nearer} % too long, one as far behind as much ` +
          `too short (camera ${ASSUMED_DISTANCE_M} m away): do not set left and right lengths against each other.`
      : `${only} The swimmer is nearer to the camera than the pool’s walls, so reach and depth of the hand are not read with it.`;
  });

  protected setPlane(event: Event): void {
    this.commands().setPlane((event.target as HTMLSelectElement).value as ScalePlane);
  }

  protected setMetres(which: Length, event: Event): void {
    const field = event.target as HTMLInputElement;
    this.commands().setMetres(which, field.valueAsNumber);
    // What was refused is not left standing in the field.
    field.value = String(this.lengths().find((one) => one.which === which)?.value ?? '');
  }

  protected togglePlacing(): void {
    if (this.commands().placing()) this.commands().stopPlacing();
    else this.commands().startPlacing();
  }

  protected move({ name, point }: { readonly name: ScalePointName; readonly point: Point }): void {
    this.commands().movePoint(name, point);
  }
}

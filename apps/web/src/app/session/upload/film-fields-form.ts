import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { saySlowness, strokeKindWords, travelWords, viewWords } from '../../ui/clip-words';
import { captureRateFactors, strokeKinds, travels, views, type FilmFields } from './film-fields';

/** What a film shows, as four choices. Every choice is told at once; there is nothing to send off. */
@Component({
  selector: 'st-film-fields-form',
  imports: [MatFormFieldModule, MatSelectModule],
  templateUrl: './film-fields-form.html',
  styleUrl: './film-fields-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FilmFieldsForm {
  readonly fields = input.required<FilmFields>();
  /** Of which film, for those who hear the page. */
  readonly filmName = input.required<string>();
  readonly locked = input(false);

  readonly said = output<Partial<FilmFields>>();

  protected readonly views = views.map((value) => ({ value, words: viewWords[value] }));
  protected readonly travels = travels.map((value) => ({ value, words: travelWords[value] }));
  protected readonly kinds = strokeKinds.map((value) => ({ value, words: strokeKindWords[value] }));
  /** The usual factors, and the one it has if that is none of them. */
  protected readonly factors = computed(() => {
    const has = this.fields().captureRateFactor;
    const all = captureRateFactors.includes(has) ? captureRateFactors : [...captureRateFactors, has];
    return all.map((value) => ({ value, words: saySlowness(value) }));
  });
}

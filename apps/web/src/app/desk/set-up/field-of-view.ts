import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { fieldOfViewSchema, type FieldOfView as View } from '@stillstroke/contract/clip-facts';
import { ASSUMED_FIELD_OF_VIEW } from '@stillstroke/geometry/view/port-bending';
import type { DeskState } from '../state/desk-state';

/** How much the camera sees across, for what water does at a flat port. Optional. */
@Component({
  selector: 'st-field-of-view',
  template: `
    <section aria-labelledby="field-of-view-title">
      <h3 id="field-of-view-title">Field of view <span class="quiet">optional</span></h3>
      <div class="numbers">
        <label>
          Degrees across
          <input
            type="number"
            min="5"
            max="170"
            step="any"
            [value]="view()?.deg ?? ''"
            (change)="setDeg($event)"
          />
        </label>
        <label>
          Measured in
          <select (change)="setMedium($event)">
            <option value="air" [selected]="medium() === 'air'">air</option>
            <option value="water" [selected]="medium() === 'water'">water</option>
          </select>
        </label>
      </div>
      <p class="quiet">
        From the left to the right edge of the picture, as the maker gives it. It says how much a flat port
        bends an arm away from the middle; left empty, {{ assumed.deg }}° in {{ assumed.medium }} is taken.
      </p>
    </section>
  `,
  styleUrl: './field-of-view.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FieldOfView {
  readonly state = input.required<DeskState>();

  protected readonly assumed = ASSUMED_FIELD_OF_VIEW;
  protected readonly view = computed(() => this.state().setUp.facts().fieldOfView);
  protected readonly medium = computed(() => this.view()?.medium ?? ASSUMED_FIELD_OF_VIEW.medium);

  /** An emptied field takes it back: it is assumed again. */
  protected setDeg(event: Event): void {
    const field = event.target as HTMLInputElement;
    if (field.value === '') this.set(null);
    else this.set({ deg: field.valueAsNumber, medium: this.medium() });
    field.value = String(this.view()?.deg ?? '');
  }

  protected setMedium(event: Event): void {
    const medium = (event.target as HTMLSelectElement).value as View['medium'];
    const { deg } = this.view() ?? ASSUMED_FIELD_OF_VIEW;
    this.set({ deg, medium });
  }

  private set(fieldOfView: View | null): void {
    const known = fieldOfViewSchema.nullable().safeParse(fieldOfView);
    if (known.success) this.state().setUp.setClipFacts({ fieldOfView: known.data });
    else this.state().say('Give a field of view between 5° and 170° in air, or 96° in water.');
  }
}

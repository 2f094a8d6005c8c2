import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { MethodEntry } from './method-entry';
import { SourceLine } from './source-line';

/** One entry of the catalogue on the method page; the address leads to it by its name. */
@Component({
  selector: 'st-method-entry-card',
  imports: [SourceLine],
  template: `
    @let said = entry();
    <article [attr.aria-labelledby]="id()">
      <h3 [id]="id()" tabindex="-1">{{ said.name }}</h3>
      <p>{{ said.what }}</p>
      <ol>
        @for (step of said.steps; track step) {
          <li>{{ step }}</li>
        }
      </ol>
      @if (said.written) {
        <p class="written">{{ said.written }}</p>
      }
      @if (said.symbols) {
        <ul class="symbols">
          @for (symbol of said.symbols; track symbol[0]) {
            <li>
              <span class="symbol">{{ symbol[0] }}</span> {{ symbol[1] }}
            </li>
          }
        </ul>
      }
      <dl>
        <div>
          <dt>Unit</dt>
          <dd>{{ said.unit }}</dd>
        </div>
        @if (said.sign) {
          <div>
            <dt>Sign</dt>
            <dd>{{ said.sign }}</dd>
          </div>
        }
        <div>
          <dt>± and interval</dt>
          <dd>{{ said.interval }}</dd>
        </div>
        <div>
          <dt>Cannot say</dt>
          @for (limit of said.limits; track limit) {
            <dd>{{ limit }}</dd>
          }
        </div>
        <div>
          <dt>Sources</dt>
          @for (cited of said.sources; track cited.source + cited.where) {
            <dd><st-source-line [cited]="cited" /></dd>
          }
        </div>
      </dl>
    </article>
  `,
  styleUrl: './method-entry-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MethodEntryCard {
  readonly id = input.required<string>();
  readonly entry = input.required<MethodEntry>();
}

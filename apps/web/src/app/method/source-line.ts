import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { CitedSource } from './method-entry';
import { provenanceWords, sources, type Source } from './sources';

/** One cited source in a line: who, when, where in it, and how well it is known to us. */
@Component({
  selector: 'st-source-line',
  template: `
    {{ who() }}: {{ cited().where }}
    <span class="provenance">{{ provenance() }}</span>
  `,
  styles: `
    .provenance {
      margin-left: 0.3em;
      padding: 0 6px;
      border: 1px solid var(--mat-sys-outline-variant);
      border-radius: 8px;
      color: var(--mat-sys-on-surface-variant);
      font-size: 0.8125rem;
      white-space: nowrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SourceLine {
  readonly cited = input.required<CitedSource>();

  private readonly source = computed<Source>(() => sources[this.cited().source]);
  protected readonly who = computed(() => {
    const { authors, year, title } = this.source();
    return year === null ? title : `${shortAuthors(authors)} ${year}`;
  });
  protected readonly provenance = computed(() => provenanceWords[this.source().provenance]);
}

/** `Chollet and others`, `Yanai and Hay`, from a list of names with initials. */
export function shortAuthors(authors: string): string {
  const names = authors.split(', ').map((name) => name.replace(/ [A-Z]+( Jr)?$/, ''));
  if (names.length > 2) return `${names[0]} and others`;
  return names.join(' and ');
}

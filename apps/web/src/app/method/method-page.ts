import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { entriesOf } from './catalogue';
import { MethodEntryCard } from './method-entry-card';
import { provenanceWords, sources, type Provenance, type Source } from './sources';

/** How everything is computed, what it rests on, and what it cannot say. */
@Component({
  selector: 'st-method-page',
  imports: [MethodEntryCard, RouterLink],
  templateUrl: './method-page.html',
  styleUrl: './method-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MethodPage {
  protected readonly groups = [
    { title: 'Angles on one frame', entries: entriesOf('angle') },
    { title: 'Measures of a stroke', entries: entriesOf('measure') },
    { title: 'Uncertainty, comparison, change', entries: entriesOf('statistic') },
  ];
  protected readonly published = Object.values<Source>(sources)
    .filter(({ year }) => year !== null)
    .sort((a, b) => a.authors.localeCompare(b.authors));
  protected readonly words: Readonly<Record<Provenance, string>> = provenanceWords;
}

import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import {
  addObservation,
  addSnippet,
  deleteSnippet,
  listObservations,
  listSnippets,
  updateObservation,
  updateSnippet,
} from '@stillstroke/contract/review-lists';
import { firstValueFrom, map } from 'rxjs';
import { Api } from '../../core/api/api';
import type { KeptList } from './kept-list-dialog';

/** Opens the lists that writers keep, to be changed. */
@Injectable({ providedIn: 'root' })
export class KeptLists {
  private readonly api = inject(Api);
  private readonly dialog = inject(MatDialog);

  /** Resolves when the dialog was closed. */
  observations(): Promise<unknown> {
    return this.open({
      title: 'What your club looks for beside angles',
      explains:
        'All coaches of the club choose from this list. Reviews that were sent keep the names they had.',
      addLabel: 'Something else to look for',
      long: false,
      read: () =>
        this.api
          .call(listObservations)
          .pipe(map(({ items }) => items.map(({ name, ...item }) => ({ ...item, words: name })))),
      add: (name) => this.api.call(addObservation, { body: { name } }),
      change: ({ id, version }, name) =>
        this.api.call(updateObservation, { params: { id }, body: { version, name } }),
      drop: ({ id, version, retired }) =>
        this.api.call(updateObservation, { params: { id }, body: { version, retired: !retired } }),
      dropWords: ({ retired }) => (retired ? 'Offer again' : 'Offer no longer'),
    });
  }

  texts(): Promise<unknown> {
    return this.open({
      title: 'Your texts',
      explains: 'Sentences that you use often. Nobody else sees this list.',
      addLabel: 'Another text',
      long: true,
      read: () =>
        this.api
          .call(listSnippets)
          .pipe(map(({ items }) => items.map((item) => ({ ...item, retired: false })))),
      add: (words) => this.api.call(addSnippet, { body: { words } }),
      change: ({ id, version }, words) =>
        this.api.call(updateSnippet, { params: { id }, body: { version, words } }),
      drop: ({ id, version }) => this.api.call(deleteSnippet, { params: { id }, query: { version } }),
      dropWords: () => 'Delete',
    });
  }

  private async open(list: KeptList): Promise<unknown> {
    const { KeptListDialog } = await import('./kept-list-dialog');
    return firstValueFrom(this.dialog.open(KeptListDialog, { data: list, width: '36rem' }).afterClosed());
  }
}

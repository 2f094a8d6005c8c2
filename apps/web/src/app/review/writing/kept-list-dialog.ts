import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { firstValueFrom, type Observable } from 'rxjs';
import { problemOf } from '../../core/api/problem-of';

export interface KeptItem {
  readonly id: string;
  readonly words: string;
  readonly version: number;
  /** Still there, but no longer offered. */
  readonly retired: boolean;
}

/** A short list that its owner changes: where it comes from and what can be done to it. */
export interface KeptList {
  readonly title: string;
  readonly explains: string;
  readonly addLabel: string;
  readonly long: boolean;
  readonly read: () => Observable<readonly KeptItem[]>;
  readonly add: (words: string) => Observable<unknown>;
  readonly change: (item: KeptItem, words: string) => Observable<unknown>;
  readonly drop: (item: KeptItem) => Observable<unknown>;
  readonly dropWords: (item: KeptItem) => string;
}

/** Changes a short list: the club's observations, or a coach's own texts. */
@Component({
  selector: 'st-kept-list-dialog',
  imports: [MatButtonModule, MatDialogModule, MatFormFieldModule, MatInputModule],
  template: `
    <h2 mat-dialog-title>{{ list.title }}</h2>
    <mat-dialog-content>
      <p class="st-quiet">{{ list.explains }}</p>
      @if (refusal(); as words) {
        <p class="refusal" role="alert">{{ words }}</p>
      }
      <ul>
        @for (item of items(); track item.id; let at = $index) {
          <li [class.retired]="item.retired">
            <mat-form-field appearance="outline" subscriptSizing="dynamic">
              <mat-label>{{ item.retired ? 'No longer offered' : 'Number ' + (at + 1) }}</mat-label>
              @if (list.long) {
                <textarea
                  #text
                  matInput
                  rows="2"
                  [value]="item.words"
                  (change)="change(item, text.value)"
                ></textarea>
              } @else {
                <input #text matInput [value]="item.words" (change)="change(item, text.value)" />
              }
            </mat-form-field>
            <button matButton type="button" [disabled]="busy()" (click)="run(list.drop(item))">
              {{ list.dropWords(item) }}<span class="st-visually-hidden">: {{ item.words }}</span>
            </button>
          </li>
        }
      </ul>
      <form class="add" (submit)="add(); $event.preventDefault()">
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>{{ list.addLabel }}</mat-label>
          @if (list.long) {
            <textarea #fresh matInput rows="2" [value]="typed()" (input)="typed.set(fresh.value)"></textarea>
          } @else {
            <input #fresh matInput [value]="typed()" (input)="typed.set(fresh.value)" />
          }
        </mat-form-field>
        <button matButton="outlined" type="submit" [disabled]="busy()">Add</button>
      </form>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="filled" type="button" mat-dialog-close>Done</button>
    </mat-dialog-actions>
  `,
  styles: `
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }

    li,
    .add {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 8px;
      padding: 6px 0;
    }

    mat-form-field {
      flex: 1 1 240px;
    }

    .refusal {
      color: var(--mat-sys-error);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeptListDialog {
  protected readonly list = inject<KeptList>(MAT_DIALOG_DATA);
  protected readonly items = signal<readonly KeptItem[]>([]);
  protected readonly refusal = signal<string | null>(null);
  protected readonly busy = signal(false);
  protected readonly typed = signal('');

  constructor() {
    void this.read();
  }

  protected async add(): Promise<void> {
    if (this.typed().trim() !== '' && (await this.run(this.list.add(this.typed())))) this.typed.set('');
  }

  protected change(item: KeptItem, words: string): void {
    if (words.trim() !== item.words) void this.run(this.list.change(item, words));
  }

  protected async run(work: Observable<unknown>): Promise<boolean> {
    this.busy.set(true);
    let done = true;
    try {
      await firstValueFrom(work, { defaultValue: null });
      this.refusal.set(null);
    } catch (error) {
      done = false;
      this.refusal.set(problemOf(error).detail);
    }
    await this.read();
    this.busy.set(false);
    return done;
  }

  private async read(): Promise<void> {
    try {
      this.items.set(await firstValueFrom(this.list.read()));
    } catch (error) {
      this.refusal.set(problemOf(error).detail);
    }
  }
}

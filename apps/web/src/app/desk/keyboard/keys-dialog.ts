import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { MatSlideToggle } from '@angular/material/slide-toggle';
import { keyGroups, nameKeys } from './desk-keys';
import { KeyChoice } from './key-choice';

/** Lists every key, from the same table that the keys are looked up in. */
@Component({
  selector: 'st-keys-dialog',
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle, MatSlideToggle],
  templateUrl: './keys-dialog.html',
  styleUrl: './keys-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KeysDialog {
  protected readonly choice = inject(KeyChoice);

  protected readonly groups = keyGroups.map(({ name, rows }) => ({
    name,
    rows: rows.map((row) => ({
      says: row.says,
      where: row.onStage ? 'on the stage' : '',
      presses: row.presses.map((press) => nameKeys(press)),
    })),
  }));
}

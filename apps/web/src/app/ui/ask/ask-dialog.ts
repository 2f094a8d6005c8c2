import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import type { Question } from './ask';

@Component({
  selector: 'st-ask-dialog',
  imports: [MatButtonModule, MatDialogModule, MatFormFieldModule, MatInputModule],
  template: `
    <h2 mat-dialog-title>{{ question.title }}</h2>
    <mat-dialog-content>
      <p>{{ question.words }}</p>
      @if (question.typeName; as name) {
        <mat-form-field appearance="outline" subscriptSizing="dynamic">
          <mat-label>Type “{{ name }}” to go on</mat-label>
          <input #typed matInput autocomplete="off" (input)="this.typed.set(typed.value)" />
        </mat-form-field>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" [mat-dialog-close]="false">{{ question.refuse ?? 'Cancel' }}</button>
      <button matButton="filled" type="button" [mat-dialog-close]="true" [disabled]="!agreed()">
        {{ question.action }}
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    p {
      margin: 0 0 8px;
      overflow-wrap: anywhere;
    }

    mat-form-field {
      width: 100%;
      margin-top: 8px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AskDialog {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
  protected readonly typed = signal('');
  protected readonly agreed = computed(
    () => !this.question.typeName || this.typed().trim() === this.question.typeName.trim(),
  );
}

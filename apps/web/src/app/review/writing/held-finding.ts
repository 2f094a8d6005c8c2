import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import type { HeldEdit } from '../draft/draft-edits';
import { fieldsOf, type FieldName, type FindingFields } from '../draft/finding-fields';
import { armWords, kindWords, phaseWords } from '../finding-words';

const fieldNames: Readonly<Record<FieldName, string>> = {
  kind: 'Kind',
  words: 'Words',
  arm: 'Arm',
  phase: 'Phase',
  observationId: 'Beside angles',
  readings: 'Readings',
};

/** Two people changed the same of one finding: both are shown, and the writer decides. */
@Component({
  selector: 'st-held-finding',
  imports: [MatButtonModule],
  template: `
    <p class="head">{{ held().words }}</p>
    @if (rows().length > 0) {
      <table>
        <thead>
          <tr>
            <td></td>
            <th scope="col">Yours</th>
            <th scope="col">Theirs</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.name) {
            <tr>
              <th scope="row">{{ row.name }}</th>
              <td>{{ row.mine }}</td>
              <td>{{ row.theirs }}</td>
            </tr>
          }
        </tbody>
      </table>
    }
    <div class="acts">
      @if (held().theirs) {
        <button matButton="filled" type="button" (click)="keepMine.emit()">Keep yours</button>
        <button matButton="outlined" type="button" (click)="takeTheirs.emit()">Take theirs</button>
      } @else {
        <button matButton="outlined" type="button" (click)="keepMine.emit()">Try again</button>
        <button matButton type="button" (click)="takeTheirs.emit()">Give your change up</button>
      }
    </div>
  `,
  styles: `
    :host {
      display: block;
      margin-bottom: 14px;
      padding: 12px 14px;
      border-left: 4px solid var(--st-ochre);
      border-radius: 4px;
      background: var(--st-ochre-wash);
    }

    .head {
      margin: 0;
      font-weight: 600;
    }

    table {
      width: 100%;
      margin-top: 8px;
      border-collapse: collapse;
      table-layout: fixed;
    }

    th,
    td {
      padding: 4px 8px 4px 0;
      text-align: left;
      vertical-align: top;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }

    tbody th {
      color: var(--mat-sys-on-surface-variant);
      font-weight: 400;
    }

    .acts {
      display: flex;
      flex-wrap: wrap;
      gap: 8px;
      margin-top: 10px;
    }
  `,
  host: { role: 'alert' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HeldFinding {
  readonly held = input.required<HeldEdit>();
  readonly keepMine = output();
  readonly takeTheirs = output();

  protected readonly rows = computed(() => {
    const { edit, theirs, fields } = this.held();
    if (!theirs) return [];
    const there = fieldsOf(theirs);
    return fields.map((name) => ({
      name: fieldNames[name],
      mine: sayField(name, edit.after),
      theirs: name === 'observationId' ? (theirs.observation?.name ?? 'Nothing') : sayField(name, there),
    }));
  });
}

function sayField(name: FieldName, fields: Partial<FindingFields>): string {
  switch (name) {
    case 'kind':
      return fields.kind ? kindWords[fields.kind] : '';
    case 'arm':
      return fields.arm ? armWords[fields.arm] : '';
    case 'phase':
      return fields.phase ? phaseWords[fields.phase] : '';
    case 'words':
      return fields.words ?? '';
    case 'observationId':
      return fields.observationId === null ? 'Nothing' : 'Another one';
    case 'readings':
      return `${fields.readings?.length ?? 0} readings`;
  }
}

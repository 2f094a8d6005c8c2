import { ChangeDetectionStrategy, Component } from '@angular/core';
import { exportRules, exportTables } from '@stillstroke/contract/export-dictionary';
import { jsonFields } from '@stillstroke/contract/export-json-fields';

/** Every table, column and field of what can be taken along: the same list that lies in every export. */
@Component({
  selector: 'st-data-dictionary-page',
  templateUrl: './data-dictionary-page.html',
  styleUrl: './data-dictionary-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DataDictionaryPage {
  protected readonly rules = exportRules;
  protected readonly tables = Object.values(exportTables);
  protected readonly fields = jsonFields;
}

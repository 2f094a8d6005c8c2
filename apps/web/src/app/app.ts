import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Shell } from './core/shell/shell';

@Component({
  selector: 'st-root',
  imports: [Shell],
  template: '<st-shell />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class App {}

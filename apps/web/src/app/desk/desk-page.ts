import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-desk-page',
  template: '<h1>Desk</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeskPage {}

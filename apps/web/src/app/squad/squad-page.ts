import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-squad-page',
  template: '<h1>Squad</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SquadPage {}

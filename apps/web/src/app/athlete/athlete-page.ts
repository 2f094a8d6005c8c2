import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-athlete-page',
  template: '<h1>Athlete</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AthletePage {}

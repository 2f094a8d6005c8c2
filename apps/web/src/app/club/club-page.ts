import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-club-page',
  template: '<h1>Club</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClubPage {}

import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-session-page',
  template: '<h1>Session</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SessionPage {}

import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'st-trend-page',
  template: '<h1>Trend</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrendPage {}

import { BreakpointObserver } from '@angular/cdk/layout';
import { inject, type Signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { map } from 'rxjs';

/** Whether the window is too narrow for a table; follows the window. In an injection context. */
export function injectNarrow(): Signal<boolean> {
  const state = inject(BreakpointObserver).observe('(max-width: 760px)');
  return toSignal(state.pipe(map(({ matches }) => matches)), { initialValue: false });
}

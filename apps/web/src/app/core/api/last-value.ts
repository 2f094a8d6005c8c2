import type { HttpResourceRef } from '@angular/common/http';
import { linkedSignal, type Signal } from '@angular/core';

/** The newest answer of a read, kept while the next one is on its way, so that a list does not vanish when its filter changes. */
export function lastValue<T>(resource: HttpResourceRef<T | undefined>): Signal<T | undefined> {
  return linkedSignal<T | undefined, T | undefined>({
    source: () => (resource.hasValue() ? resource.value() : undefined),
    computation: (value, previous) => value ?? previous?.value,
  });
}

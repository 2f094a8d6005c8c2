import { inject, Injectable, signal } from '@angular/core';
import { DeviceStore } from '../../core/device-store';

const place = 'desk-character-keys';

/** Whether bare letters, digits and signs are keys of the Desk: some people type them by speaking or by accident. */
@Injectable({ providedIn: 'root' })
export class KeyChoice {
  private readonly store = inject(DeviceStore);
  private readonly on = signal(this.store.read(place) !== false);

  readonly charactersOn = this.on.asReadonly();

  setCharacters(on: boolean): void {
    this.on.set(on);
    this.store.write(place, on);
  }
}

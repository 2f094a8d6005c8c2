import { DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';

/** Whether the device has a network at all; says nothing about the server behind it. */
@Injectable({ providedIn: 'root' })
export class Connection {
  private readonly window = inject(DOCUMENT).defaultView;
  private readonly state = signal(this.window?.navigator.onLine ?? true);

  readonly online = this.state.asReadonly();

  constructor() {
    const read = () => this.state.set(this.window?.navigator.onLine ?? true);
    this.window?.addEventListener('online', read);
    this.window?.addEventListener('offline', read);
    inject(DestroyRef).onDestroy(() => {
      this.window?.removeEventListener('online', read);
      this.window?.removeEventListener('offline', read);
    });
  }
}

import { DOCUMENT, inject, Injectable } from '@angular/core';

/** Small choices remembered on this device. Where the browser refuses to store, nothing is remembered and nothing breaks. */
@Injectable({ providedIn: 'root' })
export class DeviceStore {
  private readonly window = inject(DOCUMENT).defaultView;

  read(key: string): unknown {
    try {
      const text = this.window?.localStorage.getItem(`stillstroke.${key}`);
      return text ? (JSON.parse(text) as unknown) : null;
    } catch {
      // Storage is switched off, or somebody else wrote there: as good as nothing stored.
      return null;
    }
  }

  write(key: string, value: unknown): void {
    try {
      this.window?.localStorage.setItem(`stillstroke.${key}`, JSON.stringify(value));
    } catch {
      // Storage is full or switched off: the choice lasts as long as the page.
    }
  }
}

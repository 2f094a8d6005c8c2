import { Injectable } from '@angular/core';

/** Files dropped before there was a session to put them in; the session's page takes them up when it opens. */
@Injectable({ providedIn: 'root' })
export class FilmsInHand {
  private files: readonly File[] = [];

  hold(files: readonly File[]): void {
    this.files = files;
  }

  /** Hands them over once. */
  take(): readonly File[] {
    const files = this.files;
    this.files = [];
    return files;
  }
}

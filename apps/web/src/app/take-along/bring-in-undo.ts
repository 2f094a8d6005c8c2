import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { exportSession, type ExportFile } from '@stillstroke/contract/export';
import { importFile } from '@stillstroke/contract/import';
import { firstValueFrom } from 'rxjs';
import { Api } from '../core/api/api';
import { endpointUrl } from '../core/api/endpoint-url';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';

interface WayBack {
  readonly session: string;
  readonly before: ExportFile;
  readonly basis: string;
}

/** Takes back what was brought in, by bringing in what was there before, unless somebody changed it since. */
@Injectable({ providedIn: 'root' })
export class BringInUndo {
  private readonly api = inject(Api);
  private readonly http = inject(HttpClient);
  private readonly notices = inject(Notices);

  /** The session as it is, to come back to. */
  before(sessionId: string): Promise<ExportFile> {
    return firstValueFrom(this.http.get<ExportFile>(endpointUrl(exportSession, { id: sessionId })));
  }

  /** `basis`: the session as the import left it; `done` is called when it is as before. */
  offer(words: string, back: WayBack, done: () => void): void {
    this.notices.offer(words, 'Undo', () => void this.takeBack(back, done));
  }

  private async takeBack({ session, before, basis }: WayBack, done: () => void): Promise<void> {
    try {
      const body = { file: before, choice: 'match' as const, basis };
      await firstValueFrom(this.api.call(importFile, { params: { id: session }, body }));
      done();
      this.notices.say('The session is as it was before.');
    } catch (error) {
      const { code, detail } = problemOf(error);
      this.notices.warn(
        code === 'changed-meanwhile'
          ? 'Somebody changed the session since, so it cannot be taken back in one step.'
          : detail,
      );
    }
  }
}

import { inject, Injectable, signal } from '@angular/core';
import { restoreClip } from '@stillstroke/contract/clips';
import { restoreSession } from '@stillstroke/contract/sessions';
import { restoreTarget } from '@stillstroke/contract/targets';
import type { Observable } from 'rxjs';
import { Api } from './api/api';
import { problemOf } from './api/problem-of';
import { Notices } from './notices';

const restoring = { clip: restoreClip, session: restoreSession, target: restoreTarget };

export interface DeletedThing {
  readonly kind: keyof typeof restoring;
  readonly id: string;
  readonly name: string;
  /** The page it belonged to: of a clip its session, of a session or target its athlete. */
  readonly parentId: string;
  /** Instant until which the server brings it back. */
  readonly undoUntil: string;
}

/** What was deleted during this visit and can still be brought back. */
@Injectable({ providedIn: 'root' })
export class RecentlyDeleted {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);
  private readonly all = signal<readonly DeletedThing[]>([]);

  /** Those of one page whose time has not run out, newest first. Reads the clock, so ask when it is shown. */
  of(parentId: string, now: number = Date.now()): readonly DeletedThing[] {
    return this.all().filter((thing) => thing.parentId === parentId && Date.parse(thing.undoUntil) > now);
  }

  /** Notes a deletion and offers to take it back; `restored` is called when that was done, now or later. */
  note(thing: DeletedThing, restored: () => void): void {
    this.all.update((things) => [thing, ...things]);
    this.notices.offer(`Deleted ${thing.name}.`, 'Undo', () => this.restore(thing, restored));
  }

  restore(thing: DeletedThing, restored: () => void): void {
    const call: Observable<unknown> = this.api.call(restoring[thing.kind], { params: { id: thing.id } });
    call.subscribe({
      next: () => {
        this.drop(thing);
        this.notices.say(`${thing.name} is back.`);
        restored();
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        if (problem.code === 'undo-expired' || problem.code === 'not-found') this.drop(thing);
        this.notices.warn(problem.detail);
      },
    });
  }

  private drop(thing: DeletedThing): void {
    this.all.update((things) => things.filter((each) => each !== thing));
  }
}

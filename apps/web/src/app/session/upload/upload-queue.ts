import { HttpEventType, type HttpEvent } from '@angular/common/http';
import { computed, signal, type Signal, type WritableSignal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Problem } from '@stillstroke/contract/problem';
import type { Observable, Subscription } from 'rxjs';
import { problemOf } from '../../core/api/problem-of';
import { changedFields, type FilmFields } from './film-fields';

/**
 * held: chosen, and sent when the person says so; waiting: others go first; sending: bytes are under way; reading: all
 * bytes are there and the server reads the frames; saving: what was said meanwhile is put on the clip.
 */
export type UploadState =
  'held' | 'waiting' | 'sending' | 'reading' | 'saving' | 'done' | 'refused' | 'cancelled';

/** One file on its way to becoming a clip. */
export interface FilmUpload {
  readonly id: number;
  readonly file: File;
  readonly fields: WritableSignal<FilmFields>;
  readonly state: WritableSignal<UploadState>;
  /** Bytes sent so far, 0 to the size of the file. */
  readonly sentBytes: WritableSignal<number>;
  /** Why it was refused, or why what was said later could not be saved. */
  readonly problem: WritableSignal<Problem | null>;
  readonly clip: WritableSignal<Clip | null>;
}

export interface UploadServer {
  send(file: File, fields: FilmFields): Observable<HttpEvent<Clip>>;
  save(clipId: string, changes: Partial<FilmFields>): Observable<Clip>;
}

export interface QueueOptions {
  /** How many files are sent at a time; more would only slow each other down. */
  readonly atATime: number;
  /** Whether files go at once, or when `sendHeld` is called. */
  readonly startsAtOnce: boolean;
  /** Called when a clip is there, and again when what is said of it has been saved. */
  readonly arrived: (clip: Clip) => void;
}

const underWay: readonly UploadState[] = ['held', 'waiting', 'sending', 'reading', 'saving'];

/** Files of one session's upload, in the order chosen. Plain: knows no page and no HTTP client. */
export class UploadQueue {
  private readonly all = signal<readonly FilmUpload[]>([]);
  private readonly running = new Map<FilmUpload, Subscription>();
  private nextId = 1;

  readonly uploads: Signal<readonly FilmUpload[]> = this.all.asReadonly();
  /** Files that would be lost if the page were left now. */
  readonly unfinished = computed(
    () => this.all().filter((upload) => underWay.includes(upload.state())).length,
  );
  readonly held = computed(() => this.all().filter((upload) => upload.state() === 'held').length);

  constructor(
    private readonly server: UploadServer,
    private readonly options: QueueOptions,
  ) {}

  add(files: readonly File[], fields: FilmFields): void {
    const added = files.map((file): FilmUpload => ({
      id: this.nextId++,
      file,
      fields: signal(fields),
      state: signal<UploadState>(this.options.startsAtOnce ? 'waiting' : 'held'),
      sentBytes: signal(0),
      problem: signal<Problem | null>(null),
      clip: signal<Clip | null>(null),
    }));
    this.all.update((uploads) => [...uploads, ...added]);
    this.pump();
  }

  sendHeld(): void {
    for (const upload of this.all()) if (upload.state() === 'held') upload.state.set('waiting');
    this.pump();
  }

  /** Says something about a film: sent along when it has not started yet, else saved once the clip is there. */
  say(upload: FilmUpload, what: Partial<FilmFields>): void {
    upload.fields.update((fields) => ({ ...fields, ...what }));
    const clip = upload.clip();
    if (clip && upload.state() === 'done') this.save(upload, clip);
  }

  /** Stops a file; the server keeps nothing of what was sent. A clip that is there already stays. */
  cancel(upload: FilmUpload): void {
    if (upload.clip() || !underWay.includes(upload.state())) return;
    upload.state.set('cancelled');
    this.stop(upload);
  }

  /** Sends a refused or cancelled file from its beginning. */
  retry(upload: FilmUpload): void {
    if (upload.state() !== 'refused' && upload.state() !== 'cancelled') return;
    upload.problem.set(null);
    upload.sentBytes.set(0);
    upload.state.set('waiting');
    this.pump();
  }

  /** Takes a file that is not under way off the list. */
  putAway(upload: FilmUpload): void {
    if (underWay.includes(upload.state())) return;
    this.all.update((uploads) => uploads.filter((each) => each !== upload));
  }

  /** Stops everything; for when the page goes. */
  stopAll(): void {
    const open = this.all().filter((upload) => !upload.clip() && underWay.includes(upload.state()));
    // All of them first: stopping one would otherwise start the next.
    for (const upload of open) upload.state.set('cancelled');
    for (const upload of open) this.stop(upload);
  }

  private pump(): void {
    for (const upload of this.all()) {
      if (this.running.size >= this.options.atATime) return;
      if (upload.state() === 'waiting') this.start(upload);
    }
  }

  private start(upload: FilmUpload): void {
    const sent = upload.fields();
    upload.state.set('sending');
    const sending = this.server.send(upload.file, sent).subscribe({
      next: (event) => {
        this.follow(upload, event);
        if (event.type === HttpEventType.Response && event.body) this.arrive(upload, event.body);
      },
      error: (error: unknown) => {
        upload.problem.set(problemOf(error));
        upload.state.set('refused');
        this.stop(upload);
      },
    });
    // A server that answers at once has been followed to the end before there was anything to keep.
    if (upload.state() === 'sending' || upload.state() === 'reading') this.running.set(upload, sending);
  }

  private follow(upload: FilmUpload, event: HttpEvent<Clip>): void {
    if (event.type !== HttpEventType.UploadProgress) return;
    const total = event.total ?? upload.file.size;
    // The form around the file is a few hundred bytes, so the share is right and the bytes are the file's.
    const share = total > 0 ? Math.min(1, event.loaded / total) : 1;
    upload.sentBytes.set(Math.round(share * upload.file.size));
    if (share === 1) upload.state.set('reading');
  }

  private arrive(upload: FilmUpload, clip: Clip): void {
    upload.clip.set(clip);
    upload.sentBytes.set(upload.file.size);
    upload.state.set('done');
    this.options.arrived(clip);
    this.stop(upload);
    this.save(upload, clip);
  }

  /** Brings the clip to what the person says now; goes on as long as that changes meanwhile. */
  private save(upload: FilmUpload, clip: Clip): void {
    const changes = changedFields(clip, upload.fields());
    if (Object.keys(changes).length === 0) {
      upload.state.set('done');
      return;
    }
    upload.state.set('saving');
    upload.problem.set(null);
    this.server.save(clip.id, changes).subscribe({
      next: (saved) => {
        upload.clip.set(saved);
        this.options.arrived(saved);
        this.save(upload, saved);
      },
      error: (error: unknown) => {
        upload.problem.set(problemOf(error));
        upload.state.set('done');
      },
    });
  }

  private stop(upload: FilmUpload): void {
    this.running.get(upload)?.unsubscribe();
    this.running.delete(upload);
    this.pump();
  }
}

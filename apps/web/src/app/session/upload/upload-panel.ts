import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  inject,
  input,
  output,
  type OnInit,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { DeviceStore } from '../../core/device-store';
import { PlumbSign } from '../../ui/plumb-sign';
import { DropFilms } from '../drop-films';
import { FilmsInHand } from '../films-in-hand';
import { usualFields, type FilmFields } from './film-fields';
import { FilmServer } from './film-server';
import { UploadQueue, type FilmUpload } from './upload-queue';
import { UploadRow } from './upload-row';

const rememberedKey = 'film-fields';

/** Takes films into a session: chosen or dropped, several at once, each with its progress and what it shows. */
@Component({
  selector: 'st-upload-panel',
  imports: [DropFilms, MatButtonModule, PlumbSign, UploadRow],
  templateUrl: './upload-panel.html',
  styleUrl: './upload-panel.scss',
  host: { '(window:beforeunload)': 'warnBeforeClosing($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadPanel implements OnInit {
  private readonly server = inject(FilmServer);
  private readonly store = inject(DeviceStore);
  private readonly inHand = inject(FilmsInHand);
  private readonly destroyed = inject(DestroyRef);

  readonly sessionId = input.required<string>();
  /** Clips of the session so far; the next film is assumed to be like the newest. */
  readonly clips = input.required<readonly Clip[]>();
  /** Whether this person may still change a clip once it is there. */
  readonly canSayLater = input(true);

  /** A clip is there, or has been changed. */
  readonly arrived = output<Clip>();

  /** Made once the inputs are there; a session's page does not change its session. */
  protected queue: UploadQueue | null = null;
  private lastSaid: FilmFields | null = null;

  /** Files that would be lost if the page were left now. */
  unfinished(): number {
    return this.queue?.unfinished() ?? 0;
  }

  ngOnInit(): void {
    const queue = new UploadQueue(this.server.of(this.sessionId()), {
      atATime: 2,
      startsAtOnce: this.canSayLater(),
      arrived: (clip) => this.arrived.emit(clip),
    });
    this.queue = queue;
    this.destroyed.onDestroy(() => queue.stopAll());
    this.take(this.inHand.take());
  }

  protected take(files: readonly File[]): void {
    if (files.length === 0) return;
    const fields = this.lastSaid ?? usualFields(this.clips(), this.store.read(rememberedKey));
    this.queue?.add(files, fields);
  }

  protected takeChosen(field: HTMLInputElement): void {
    this.take([...(field.files ?? [])]);
    // The same file may be chosen again after it was cancelled.
    field.value = '';
  }

  protected say(upload: FilmUpload, what: Partial<FilmFields>): void {
    this.queue?.say(upload, what);
    this.lastSaid = upload.fields();
    this.store.write(rememberedKey, this.lastSaid);
  }

  protected warnBeforeClosing(event: BeforeUnloadEvent): void {
    if (this.unfinished() > 0) event.preventDefault();
  }
}

import { Directive, output, signal } from '@angular/core';

/** Takes files dropped onto its element; `over` says that some hang above it. Several at once; folders are left out. */
@Directive({
  selector: '[stDropFilms]',
  host: {
    '(dragenter)': 'hang($event)',
    '(dragover)': 'hang($event)',
    '(dragleave)': 'leave($event)',
    '(drop)': 'take($event)',
    '[class.over]': 'over()',
  },
})
export class DropFilms {
  readonly stDropFilms = output<readonly File[]>();

  protected readonly over = signal(false);

  protected hang(event: DragEvent): void {
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    event.dataTransfer.dropEffect = 'copy';
    this.over.set(true);
  }

  protected leave(event: DragEvent): void {
    const to = event.relatedTarget;
    const inside =
      event.currentTarget instanceof Node && to instanceof Node && event.currentTarget.contains(to);
    if (!inside) this.over.set(false);
  }

  protected take(event: DragEvent): void {
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    this.over.set(false);
    const files = [...event.dataTransfer.items]
      .filter((item) => item.kind === 'file' && !item.webkitGetAsEntry()?.isDirectory)
      .flatMap((item) => item.getAsFile() ?? []);
    if (files.length > 0) this.stDropFilms.emit(files);
  }
}

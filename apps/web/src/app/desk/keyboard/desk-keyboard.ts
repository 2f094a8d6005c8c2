import { DestroyRef, DOCUMENT, inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { runCommand, type CommandParts } from './desk-commands';
import type { KeyCommand } from './desk-keys';
import { belongsToControl, findKey } from './find-key';
import { KeyChoice } from './key-choice';
import { KeysDialog } from './keys-dialog';

export interface AttachedParts extends Omit<CommandParts, 'showKeys' | 'leaveStage'> {
  /** Takes a command over, where only a part of the Desk is there: true when it is dealt with, also by doing nothing. */
  readonly instead?: (command: KeyCommand) => boolean;
}

/** Listens for the Desk's keys on the whole page and runs their commands. One per Desk. */
@Injectable()
export class DeskKeyboard {
  private readonly document = inject(DOCUMENT);
  private readonly dialog = inject(MatDialog);
  private readonly choice = inject(KeyChoice);
  private parts: AttachedParts | null = null;

  constructor() {
    const press = (event: KeyboardEvent) => this.press(event);
    // Any key that comes up, and leaving the window, lets the picture go.
    const letGo = () => this.parts?.stage.panKeyHeld.set(false);
    const window = this.document.defaultView;
    this.document.addEventListener('keydown', press);
    this.document.addEventListener('keyup', letGo);
    window?.addEventListener('blur', letGo);
    inject(DestroyRef).onDestroy(() => {
      this.document.removeEventListener('keydown', press);
      this.document.removeEventListener('keyup', letGo);
      window?.removeEventListener('blur', letGo);
    });
  }

  attach(parts: AttachedParts): void {
    this.parts = parts;
  }

  showKeys(): void {
    if (this.dialog.openDialogs.length === 0) this.dialog.open(KeysDialog, { autoFocus: 'dialog' });
  }

  private press(event: KeyboardEvent): void {
    if (!this.parts || event.defaultPrevented || this.dialog.openDialogs.length > 0) return;
    if (belongsToControl(event)) return;
    const focused = this.document.activeElement;
    const onStage = focused?.tagName === 'ST-STAGE';
    const command = findKey(event, {
      onStage,
      canEdit: this.parts.state.canEdit,
      charactersOn: this.choice.charactersOn(),
    });
    if (!command) return;
    const leaveStage = () => onStage && (focused as HTMLElement).blur();
    const handled = this.parts.instead?.(command)
      ? true
      : runCommand(command, { ...this.parts, showKeys: () => this.showKeys(), leaveStage });
    if (handled) event.preventDefault();
  }
}

import { isBareCharacter, keyGroups, type KeyCommand, type KeyPress, type KeyRow } from './desk-keys';

/** Where the Desk's keys stand at the moment of a press. */
export interface KeyPlace {
  readonly onStage: boolean;
  readonly canEdit: boolean;
  /** Whether bare letters, digits and signs count. */
  readonly charactersOn: boolean;
}

interface Entry {
  readonly press: KeyPress & { readonly command: KeyCommand };
  readonly row: KeyRow;
}

const entries: readonly Entry[] = keyGroups.flatMap(({ rows }) =>
  rows.flatMap((row) => row.presses.map((press) => ({ press, row }))),
);

/** The command of a key press at a place; null when it means nothing there. */
export function findKey(event: KeyboardEvent, place: KeyPlace): KeyCommand | null {
  if (event.isComposing) return null;
  const found = entries.find(({ press }) => isPressed(press, event));
  if (!found) return null;
  if (found.row.edits && !place.canEdit) return null;
  if (found.row.onStage && !place.onStage) return null;
  if (isBareCharacter(found.press) && !place.charactersOn && found.press.key !== '?') return null;
  return found.press.command;
}

function isPressed(press: KeyPress, event: KeyboardEvent): boolean {
  const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
  if (key !== press.key) return false;
  if ((event.ctrlKey || event.metaKey) !== (press.ctrl ?? false) || event.altKey !== (press.alt ?? false))
    return false;
  // Signs such as ? and + need Shift on some keyboards and not on others.
  const isSign = press.key.length === 1 && !/[a-z ]/.test(press.key);
  return isSign || event.shiftKey === (press.shift ?? false);
}

/**
 * Whether a control under the focus has its own use for a key, so that the Desk leaves it alone: text being typed, a
 * button about to be pressed, a choice being changed.
 */
export function belongsToControl(event: KeyboardEvent): boolean {
  const target = event.target;
  if (!(target instanceof HTMLElement)) return false;
  if (target.isContentEditable || target.closest('[role="dialog"], [role="menu"], [role="listbox"]'))
    return true;
  const typing = target.closest(
    'textarea, select, [role="combobox"], input:not([type="checkbox"]):not([type="radio"])',
  );
  if (typing) return true;
  const bare = !event.ctrlKey && !event.metaKey && !event.altKey;
  const presses = event.key === 'Enter' || event.key === ' ';
  if (presses && bare && target.closest('button, a[href], summary, input, [role="tab"]')) return true;
  const turns = /^(Arrow|Home|End|Page)/.test(event.key);
  return turns && bare && target.closest('[role="tablist"], [role="radiogroup"], [type="radio"]') !== null;
}

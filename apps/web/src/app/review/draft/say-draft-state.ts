import type { DraftSaveState, StopReason } from './draft-edits';

const stopWords: Readonly<Record<StopReason, string>> = {
  'signed-out': 'Sign in again to send it.',
  forbidden: 'You may no longer change this review.',
  sent: 'The review was sent meanwhile.',
  gone: 'The review was thrown away meanwhile.',
};

/** Whether everything is saved, in a few words. `kept`: whether the device can keep text over a reload. */
export function sayDraftState(state: DraftSaveState, kept = true): string {
  const where = kept
    ? 'Your text is kept on this device.'
    : 'Your text is not kept anywhere yet: leave this page open.';
  switch (state.kind) {
    case 'saved':
      return 'Everything saved';
    case 'saving':
      return 'Saving…';
    case 'waiting':
      return `${state.offline ? 'No connection.' : 'Server not reached.'} ${where}`;
    case 'held':
      return 'Changed by somebody else: decide below';
    case 'stopped':
      return `${stopWords[state.why]} ${where}`;
  }
}

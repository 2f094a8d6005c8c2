/** Why sending has stopped until the person does something about it. */
export type StopReason = 'signed-out' | 'forbidden' | 'gone';

/** Whether the server has everything. `count`: changes it has not. */
export type SaveState =
  | { readonly kind: 'saved'; readonly drafts: number }
  | { readonly kind: 'saving'; readonly count: number }
  | { readonly kind: 'waiting'; readonly count: number; readonly offline: boolean }
  | { readonly kind: 'conflict'; readonly count: number }
  | { readonly kind: 'refused'; readonly count: number; readonly words: string }
  | { readonly kind: 'stopped'; readonly count: number; readonly why: StopReason };

const stopWords: Readonly<Record<StopReason, string>> = {
  'signed-out': 'sign in again to send',
  forbidden: 'you may no longer change this clip',
  gone: 'the clip was deleted',
};

/** The state in a few words for the bar. `kept`: whether the device can keep changes over a reload. */
export function saySaveState(state: SaveState, kept = true): string {
  const where = kept ? 'kept on this device' : 'not kept anywhere yet: leave this page open';
  switch (state.kind) {
    case 'saved':
      if (state.drafts === 0) return 'All marks saved';
      return `Saved; ${state.drafts} unfinished, ${kept ? 'kept on this device' : 'kept while this page is open'}`;
    case 'saving':
      return 'Saving…';
    case 'waiting':
      return `${state.offline ? 'No connection' : 'Server not reached'}: ${changes(state.count)} ${where}`;
    case 'conflict':
      return `Changed by somebody else: ${changes(state.count)} to decide`;
    case 'refused':
      return `Not taken: ${changes(state.count)} to correct`;
    case 'stopped':
      return `${changes(state.count)} ${where}: ${stopWords[state.why]}`;
  }
}

function changes(count: number): string {
  return count === 1 ? '1 change' : `${count} changes`;
}

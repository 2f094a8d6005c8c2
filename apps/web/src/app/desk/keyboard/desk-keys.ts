/** Everything that a key can do on the Desk. */
export type KeyCommand =
  | 'step-back'
  | 'step-forward'
  | 'step-back-ten'
  | 'step-forward-ten'
  | 'first-frame'
  | 'last-frame'
  | 'marked-before'
  | 'marked-after'
  | 'play'
  | 'play-back'
  | 'slower'
  | 'faster'
  | 'left-arm'
  | 'right-arm'
  | 'next-to-mark'
  | 'place-joint'
  | 'joint-after'
  | 'joint-before'
  | 'nudge-left'
  | 'nudge-right'
  | 'nudge-up'
  | 'nudge-down'
  | 'nudge-left-ten'
  | 'nudge-right-ten'
  | 'nudge-up-ten'
  | 'nudge-down-ten'
  | 'remove-mark'
  | 'set-entry'
  | 'set-catch'
  | 'set-exit'
  | 'set-next-entry'
  | 'toggle-breath'
  | 'toggle-source'
  | 'draw-plumb'
  | 'undo'
  | 'redo'
  | 'fit'
  | 'zoom-in'
  | 'zoom-out'
  | 'hold-picture'
  | 'toggle-loupe'
  | 'toggle-trail'
  | 'leave-stage'
  | 'show-keys';

/** One key press. Letters are given in lower case; `ctrl` also stands for the command key of a Mac. */
export interface KeyPress {
  readonly key: string;
  readonly shift?: boolean;
  readonly alt?: boolean;
  readonly ctrl?: boolean;
}

export interface KeyRow {
  /** What the row does, as the dialog says it. */
  readonly says: string;
  /** Each press with its command. */
  readonly presses: readonly (KeyPress & { readonly command: KeyCommand })[];
  /** Only while the stage has the focus, so that it can be left and other controls keep their keys. */
  readonly onStage?: boolean;
  /** Changes the clip: not for those who may look only. */
  readonly edits?: boolean;
}

export interface KeyGroup {
  readonly name: string;
  readonly rows: readonly KeyRow[];
}

/** The one table of keys: what is pressed is looked up here, and the dialog lists it. */
export const keyGroups: readonly KeyGroup[] = [
  {
    name: 'Frames',
    rows: [
      {
        says: 'One frame back, forward',
        presses: [
          { key: 'ArrowLeft', command: 'step-back' },
          { key: 'ArrowRight', command: 'step-forward' },
        ],
      },
      {
        says: 'Ten frames',
        presses: [
          { key: 'ArrowLeft', shift: true, command: 'step-back-ten' },
          { key: 'ArrowRight', shift: true, command: 'step-forward-ten' },
        ],
      },
      {
        says: 'Marked frame before, after (chosen arm)',
        presses: [
          { key: 'PageUp', command: 'marked-before' },
          { key: 'PageDown', command: 'marked-after' },
        ],
      },
      {
        says: 'First, last frame',
        presses: [
          { key: 'Home', command: 'first-frame' },
          { key: 'End', command: 'last-frame' },
        ],
      },
      {
        says: 'Play or stop; with Shift backward',
        presses: [
          { key: ' ', command: 'play' },
          { key: ' ', shift: true, command: 'play-back' },
        ],
      },
      {
        says: 'Slower, faster',
        presses: [
          { key: 's', command: 'slower' },
          { key: 'f', command: 'faster' },
        ],
      },
    ],
  },
  {
    name: 'Marking',
    rows: [
      {
        says: 'Left arm, right arm',
        presses: [
          { key: '1', command: 'left-arm' },
          { key: '2', command: 'right-arm' },
        ],
      },
      { says: 'Next frame to mark', presses: [{ key: 'n', command: 'next-to-mark' }], edits: true },
      {
        says: 'Joint after, before; past the last one leaves the stage',
        presses: [
          { key: 'Tab', command: 'joint-after' },
          { key: 'Tab', shift: true, command: 'joint-before' },
        ],
        onStage: true,
        edits: true,
      },
      {
        says: 'Move the joint or the crosshair one pixel of the picture',
        presses: [
          { key: 'ArrowLeft', alt: true, command: 'nudge-left' },
          { key: 'ArrowRight', alt: true, command: 'nudge-right' },
          { key: 'ArrowUp', alt: true, command: 'nudge-up' },
          { key: 'ArrowDown', alt: true, command: 'nudge-down' },
        ],
        edits: true,
      },
      {
        says: 'Move it ten pixels',
        presses: [
          { key: 'ArrowLeft', alt: true, shift: true, command: 'nudge-left-ten' },
          { key: 'ArrowRight', alt: true, shift: true, command: 'nudge-right-ten' },
          { key: 'ArrowUp', alt: true, shift: true, command: 'nudge-up-ten' },
          { key: 'ArrowDown', alt: true, shift: true, command: 'nudge-down-ten' },
        ],
        edits: true,
      },
      {
        says: 'Place the joint at the crosshair',
        presses: [{ key: 'Enter', command: 'place-joint' }],
        onStage: true,
        edits: true,
      },
      {
        says: 'Remove the mark of the chosen arm',
        presses: [
          { key: 'Delete', command: 'remove-mark' },
          { key: 'Backspace', command: 'remove-mark' },
        ],
        edits: true,
      },
      { says: 'Undo', presses: [{ key: 'z', ctrl: true, command: 'undo' }], edits: true },
      {
        says: 'Redo',
        presses: [
          { key: 'z', ctrl: true, shift: true, command: 'redo' },
          { key: 'y', ctrl: true, command: 'redo' },
        ],
        edits: true,
      },
    ],
  },
  {
    name: 'Strokes, on this frame',
    rows: [
      { says: 'Entry', presses: [{ key: 'e', command: 'set-entry' }], edits: true },
      { says: 'Catch', presses: [{ key: 'c', command: 'set-catch' }], edits: true },
      { says: 'Exit', presses: [{ key: 'x', command: 'set-exit' }], edits: true },
      {
        says: 'Next entry, where no further stroke follows',
        presses: [{ key: 'r', command: 'set-next-entry' }],
        edits: true,
      },
      {
        says: 'Breath on this stroke, yes or no',
        presses: [{ key: 'b', command: 'toggle-breath' }],
        edits: true,
      },
      {
        says: 'Event on this frame: hand seen, or the wrist stands in',
        presses: [{ key: 'w', command: 'toggle-source' }],
        edits: true,
      },
    ],
  },
  {
    name: 'Picture',
    rows: [
      { says: 'Draw the plumb', presses: [{ key: 'p', command: 'draw-plumb' }], edits: true },
      { says: 'Whole picture', presses: [{ key: '0', command: 'fit' }] },
      {
        says: 'Larger, smaller',
        presses: [
          { key: '+', command: 'zoom-in' },
          { key: '=', command: 'zoom-in' },
          { key: '-', command: 'zoom-out' },
        ],
      },
      {
        says: 'Hold down to move the picture by dragging',
        presses: [{ key: 'g', command: 'hold-picture' }],
      },
      { says: 'Loupe on or off', presses: [{ key: 'l', command: 'toggle-loupe' }] },
      { says: 'Marks of the frames around, on or off', presses: [{ key: 'm', command: 'toggle-trail' }] },
      { says: 'Leave the stage', presses: [{ key: 'Escape', command: 'leave-stage' }], onStage: true },
      { says: 'These keys', presses: [{ key: '?', command: 'show-keys' }] },
    ],
  },
];

const keyNames: Readonly<Record<string, string>> = {
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  ' ': 'Space',
  PageUp: 'Page up',
  PageDown: 'Page down',
};

/** A key press for the eye: `Shift ←`. */
export function nameKeys({ key, shift, alt, ctrl }: KeyPress): readonly string[] {
  const name = keyNames[key] ?? (key.length === 1 ? key.toUpperCase() : key);
  return [...(ctrl ? ['Ctrl'] : []), ...(alt ? ['Alt'] : []), ...(shift ? ['Shift'] : []), name];
}

/** A key that a person may type by speaking or by accident, and can therefore switch off: a bare character. */
export function isBareCharacter({ key, ctrl, alt }: KeyPress): boolean {
  return key.length === 1 && key !== ' ' && !ctrl && !alt;
}

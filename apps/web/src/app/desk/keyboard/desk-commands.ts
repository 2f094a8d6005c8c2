import type { StageController } from '../stage/stage-controller';
import { speeds } from '../state/desk-play';
import type { DeskState } from '../state/desk-state';
import type { KeyCommand } from './desk-keys';

/** What commands work on. */
export interface CommandParts {
  readonly state: DeskState;
  readonly stage: Pick<
    StageController,
    | 'fit'
    | 'zoomIn'
    | 'zoomOut'
    | 'toggleLoupe'
    | 'toggleTrail'
    | 'loupeWanted'
    | 'trailWanted'
    | 'panKeyHeld'
  >;
  readonly showKeys: () => void;
  readonly leaveStage: () => void;
}

/** Answers false when the key is to do what it does anyway, such as Tab past the last joint. */
type Command = (parts: CommandParts) => boolean | void;

const nudge =
  (dx: number, dy: number): Command =>
  ({ state }) =>
    state.marking.nudgeJoint(dx, dy);
const step =
  (by: number): Command =>
  ({ state }) =>
    state.step(by);
const setEvent =
  (event: 'entry' | 'catch' | 'exit' | 'nextEntry'): Command =>
  ({ state }) =>
    void state.events.setEvent(event);

/** One function for each command; what is refused is said by the state. */
const commands: Readonly<Record<KeyCommand, Command>> = {
  'step-back': step(-1),
  'step-forward': step(1),
  'step-back-ten': step(-10),
  'step-forward-ten': step(10),
  'first-frame': ({ state }) => state.goTo(0),
  'last-frame': ({ state }) => state.goTo(state.frameTimesUs().length - 1),
  'marked-before': ({ state }) => void state.goToMarked(-1),
  'marked-after': ({ state }) => void state.goToMarked(1),
  play: ({ state }) => state.play.toggle(),
  'play-back': ({ state }) => (state.play.playing() ? state.play.stop() : state.play.start(-1)),
  slower: ({ state }) => changeSpeed(state, 1),
  faster: ({ state }) => changeSpeed(state, -1),
  'left-arm': ({ state }) => state.chooseArm('left'),
  'right-arm': ({ state }) => state.chooseArm('right'),
  'next-to-mark': ({ state }) => void state.nextFrameToMark(),
  'place-joint': ({ state }) => void state.marking.placeAtCrosshair(),
  'joint-after': ({ state }) => toNeighbour(state, 1),
  'joint-before': ({ state }) => toNeighbour(state, -1),
  'nudge-left': nudge(-1, 0),
  'nudge-right': nudge(1, 0),
  'nudge-up': nudge(0, -1),
  'nudge-down': nudge(0, 1),
  'nudge-left-ten': nudge(-10, 0),
  'nudge-right-ten': nudge(10, 0),
  'nudge-up-ten': nudge(0, -10),
  'nudge-down-ten': nudge(0, 10),
  'remove-mark': ({ state }) => void state.marking.removeMark(),
  'set-entry': setEvent('entry'),
  'set-catch': setEvent('catch'),
  'set-exit': setEvent('exit'),
  'set-next-entry': setEvent('nextEntry'),
  'toggle-breath': ({ state }) => void state.events.toggleBreath(),
  'toggle-source': ({ state }) => void state.events.toggleSourceHere(),
  'draw-plumb': ({ state }) =>
    state.setUp.drawingPlumb() ? state.setUp.stopPlumb() : state.setUp.startPlumb(),
  undo: ({ state }) => void state.undo(),
  redo: ({ state }) => void state.redo(),
  fit: ({ stage }) => stage.fit(),
  'zoom-in': ({ stage }) => stage.zoomIn(),
  'zoom-out': ({ stage }) => stage.zoomOut(),
  'hold-picture': ({ stage }) => stage.panKeyHeld.set(true),
  'toggle-loupe': ({ stage, state }) => {
    stage.toggleLoupe();
    state.say(stage.loupeWanted() ? 'Loupe on.' : 'Loupe off.');
  },
  'toggle-trail': ({ stage, state }) => {
    stage.toggleTrail();
    state.say(
      stage.trailWanted()
        ? 'Marks of the frames around are shown.'
        : 'Marks of the frames around are hidden.',
    );
  },
  'leave-stage': ({ leaveStage }) => leaveStage(),
  'show-keys': ({ showKeys }) => showKeys(),
};

/** Runs a command; false when the browser is to handle the key itself. */
export function runCommand(command: KeyCommand, parts: CommandParts): boolean {
  return commands[command](parts) !== false;
}

function toNeighbour(state: DeskState, by: 1 | -1): boolean {
  const joint = state.marking.neighbour(by);
  if (joint === null) return false;
  state.chooseJoint(joint);
  return true;
}

/** `by` 1: slower. At either end the speed stays. */
function changeSpeed({ play }: DeskState, by: 1 | -1): void {
  const at = speeds.findIndex(({ value }) => value === play.speed());
  const next = speeds[at + by];
  if (next) play.setSpeed(next.value);
}

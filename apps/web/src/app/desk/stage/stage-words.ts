import { degreesText } from './angle-figure';
import { JOINTS } from './arm-figure';
import type { StageArm, StageState } from './stage-state';

/** The stage in words, for those who cannot see it. */
export function stageWords(state: StageState): string {
  const frame = `Frame ${state.frame()} of ${state.timesUs().length}${state.place() ? `, ${state.place()}` : ''}.`;
  const arms = (['left', 'right'] as const).flatMap((arm) => state.armOn(arm) ?? []);
  if (arms.length === 0) return `${frame} No arm is marked on it.`;
  return [frame, ...arms.map((arm) => armWords(arm, state))].join(' ');
}

function armWords({ arm, joints, theirs }: StageArm, state: StageState): string {
  const name = arm === 'left' ? 'Left arm' : 'Right arm';
  const placed = JOINTS.filter((joint) => joints[joint]);
  const angles = arm === state.arm() ? state.angles() : null;
  const conflict = theirs ? ' Someone else marked it differently; both are drawn.' : '';
  if (angles) {
    const forearm = degreesText(angles.forearmDeg);
    return `${name}: forearm ${forearm}, elbow ${degreesText(angles.elbowDeg)}.${conflict}`;
  }
  return `${name}: ${placed.length === JOINTS.length ? 'marked' : `${placed.join(' and ')} placed`}.${conflict}`;
}

/** What went wrong with a frame, in a few words; the sentence that follows says what to do. */
export function troubleTitle(reason: string, frame: number | null): string {
  if (frame === null) return 'The clip cannot be shown';
  return reason === 'corrupt-frame' ? `Frame ${frame} is damaged` : `Frame ${frame} did not come`;
}

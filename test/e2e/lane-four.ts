import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** A clip that is not in the demo, rendered with known joints and angles; see test/swimmer. */
export const laneFour = fileURLToPath(new URL('../swimmer/clips/lane-four.mp4', import.meta.url));

export type Arm = 'left' | 'right';
export interface Point {
  readonly x: number;
  readonly y: number;
}
export interface TrueStroke {
  readonly arm: Arm;
  readonly entry: number;
  readonly catch: number;
  readonly exit: number;
  readonly nextEntry: number;
  readonly breath: boolean;
}
export interface TrueMark {
  readonly shoulder: Point;
  readonly elbow: Point;
  readonly wrist: Point;
  readonly forearmDeg: number;
  readonly upperArmDeg: number;
  readonly elbowDeg: number;
  readonly elbowDropDeg: number;
}

interface TruthFile {
  readonly width: number;
  readonly height: number;
  readonly framesPerSecond: number;
  readonly plumb: { readonly top: Point; readonly bottom: Point };
  readonly strokes: readonly {
    readonly arm: Arm;
    readonly entryUs: number;
    readonly catchUs: number;
    readonly exitUs: number;
    readonly nextEntryUs: number;
    readonly breath: boolean;
  }[];
  readonly columns: readonly string[];
  readonly frames: Readonly<Record<Arm, readonly (readonly number[])[]>>;
}

export const truth = JSON.parse(readFileSync(laneFour.replace('.mp4', '.truth.json'), 'utf8')) as TruthFile;

/** The strokes with their events on the nearest frames, by arm and time. */
export function trueStrokes(arm: Arm): TrueStroke[] {
  const frameOf = (us: number) => Math.round((us * truth.framesPerSecond) / 1_000_000);
  return truth.strokes
    .filter((stroke) => stroke.arm === arm)
    .map(({ entryUs, catchUs, exitUs, nextEntryUs, breath }) => ({
      arm,
      entry: frameOf(entryUs),
      catch: frameOf(catchUs),
      exit: frameOf(exitUs),
      nextEntry: frameOf(nextEntryUs),
      breath,
    }));
}

/** Joints (pixels) and angles (degrees) of an arm on a frame. */
export function trueMark(arm: Arm, frame: number): TrueMark {
  const row = truth.frames[arm][frame];
  if (!row) throw new Error(`no truth for frame ${frame}`);
  const of = (column: string) => row[truth.columns.indexOf(column)] ?? NaN;
  const point = (joint: string) => ({ x: of(`${joint}X`), y: of(`${joint}Y`) });
  return {
    shoulder: point('shoulder'),
    elbow: point('elbow'),
    wrist: point('wrist'),
    forearmDeg: of('forearmDeg'),
    upperArmDeg: of('upperArmDeg'),
    elbowDeg: of('elbowDeg'),
    elbowDropDeg: of('elbowDropDeg'),
  };
}

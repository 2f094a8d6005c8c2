import { describe, expect, it } from 'vitest';
import { DeskPlay } from './desk-play';
import type { DeskChange } from './desk-change';
import { deskState, testClip, testStrokes } from './testing';

const distance = { metres: 5, uncertaintyM: 0.05, fromFrame: 30, toFrame: 240 };

function recorded(desk: ReturnType<typeof deskState>): DeskChange[] {
  const changes: DeskChange[] = [];
  desk.onChange((more) => changes.push(...more));
  return changes;
}

describe('events by hand or wrist', () => {
  it('turn over on the shown frame, widen their ± and can be undone', () => {
    const desk = deskState();
    const changes = recorded(desk);
    desk.chooseArm('left');
    desk.goTo(64);
    const [stroke] = desk.strokes();
    const recovery = () => {
      const phases = desk.readings.measures().get(stroke?.id ?? '')?.phases;
      return phases?.ok ? phases.value.recovery.uncertainty : NaN;
    };
    const before = recovery();
    expect(desk.events.toggleSourceHere()).toBe(true);
    expect(desk.strokes()[0]?.exitSource).toBe('wrist-proxy');
    expect(desk.spoken()?.words).toContain('the wrist stands in');
    expect(recovery()).toBeGreaterThan(before);
    expect(changes).toHaveLength(1);
    desk.undo();
    expect(desk.strokes()[0]?.exitSource ?? 'hand-seen').toBe('hand-seen');
    expect(recovery()).toBe(before);
    desk.goTo(65);
    expect(desk.events.toggleSourceHere()).toBe(false);
  });

  it('turn the entry of the next stroke with the next entry that it is', () => {
    const follower = { ...testStrokes[0], id: testClip.sessionId, arm: 'left' as const, entry: 90 };
    const next = { ...follower, catch: 114, exit: 144, nextEntry: 170, breath: false };
    const desk = deskState({ strokes: [...testStrokes, next] });
    const changes = recorded(desk);
    const [first] = desk.strokes();
    if (!first) throw new Error('no stroke');
    desk.events.toggleSource(first, 'nextEntry');
    expect(changes.map((change) => change.kind === 'stroke' && change.after)).toMatchObject([
      { id: first.id, nextEntrySource: 'wrist-proxy' },
      { id: next.id, entrySource: 'wrist-proxy' },
    ]);
    desk.undo();
    expect(desk.strokes().every(({ entrySource }) => entrySource !== 'wrist-proxy')).toBe(true);
  });
});

describe('a known distance', () => {
  it('gives every stroke a length at once, and takes it back with undo', () => {
    const desk = deskState();
    const changes = recorded(desk);
    const length = () => desk.readings.measures().get(testStrokes[0]?.id ?? '')?.strokeLength;
    expect(length()).toMatchObject({ ok: false, reason: 'no-distance' });
    expect(desk.setUp.setDistance(distance)).toBe(true);
    const found = length();
    // 5 m in 210 frames of a sixtieth, cycles of 80 frames.
    expect(found?.ok && found.value.value).toBeCloseTo((5 / 210) * 80, 4);
    expect(changes).toEqual([{ kind: 'distance', before: null, after: distance }]);
    expect(desk.spoken()?.words).toBe('Distance set: 1.43 m/s.');
    desk.undo();
    expect(desk.setUp.distance()).toBeNull();
    desk.redo();
    expect(desk.clip().distance).toEqual(distance);
  });

  it('is refused in words where it is none', () => {
    const desk = deskState();
    const refusal = (change: object) => {
      expect(desk.setUp.setDistance({ ...distance, ...change })).toBe(false);
      return desk.spoken()?.words ?? '';
    };
    expect(refusal({ metres: -5 })).toBe('A distance is more than 0 metres.');
    expect(refusal({ metres: NaN }).length).toBeGreaterThan(5);
    expect(refusal({ uncertaintyM: 6 })).toContain('smaller than the distance');
    expect(refusal({ fromFrame: 240 })).toContain('after the first');
    expect(refusal({ toFrame: 300 })).toContain('A frame lies outside the clip');
    expect(desk.setUp.distance()).toBeNull();
  });
});

describe('both arms', () => {
  it('are read along the clip: a passage needs a third stroke', () => {
    const desk = deskState();
    expect(desk.readings.coordination()).toMatchObject({ ok: false, reason: 'too-few-strokes' });
    const third = { ...testStrokes[0], id: testClip.sessionId, arm: 'left' as const, entry: 90 };
    const more = { ...third, catch: 114, exit: 144, nextEntry: 170, breath: false };
    const read = deskState({ strokes: [...testStrokes, more] }).readings.coordination();
    // Pulls of 30 of 80 frames: 37.5 − 50 percent.
    expect(read.ok && read.value.index).toBeCloseTo(-12.5, 1);
    expect(read.ok && read.value.mode).toBe('catch-up');
  });
});

describe('the speed of the water', () => {
  it('begins where slow motion need not play faster than its file', () => {
    expect([1, 0.5, 0.25, 0.2, 0.125, 0.01, 2].map((factor) => DeskPlay.suiting(factor))).toEqual([
      1, 0.5, 0.25, 0.125, 0.125, 0.125, 1,
    ]);
    const desk = deskState({ clip: { ...testClip, captureRateFactor: 0.25 } });
    expect(desk.play.speed()).toBe(0.25);
  });
});

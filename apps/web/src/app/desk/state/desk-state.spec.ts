import { describe, expect, it } from 'vitest';
import { bareDesk, deskState, markWith, testClip, testMarks } from './testing';

describe('DeskState: marking', () => {
  it('places shoulder, elbow and wrist one after the other, each one undo step', () => {
    const desk = bareDesk();
    desk.chooseArm('left');
    desk.goTo(12);
    expect(desk.task()).toEqual({ kind: 'place', arm: 'left', joint: 'shoulder' });
    desk.marking.placeJoint({ x: 100, y: 100 });
    desk.marking.placeJoint({ x: 200, y: 150 });
    expect(desk.readingAtFrame().left).toEqual({ ok: false, reason: 'missing-joint' });
    desk.marking.placeJoint({ x: 200, y: 250 });
    expect(desk.task()).toEqual({ kind: 'look' });
    const reading = desk.readingAtFrame().left;
    expect(reading.ok && reading.value.angles.forearmDeg).toBeCloseTo(0, 9);

    desk.undo();
    expect(desk.markAt('left', 12)?.wrist).toBeNull();
    expect(desk.task()).toEqual({ kind: 'place', arm: 'left', joint: 'wrist' });
    desk.undo();
    desk.undo();
    expect(desk.markAt('left', 12)).toBeNull();
    expect(desk.undo()).toBe(false);
    desk.redo();
    desk.redo();
    desk.redo();
    expect(desk.markAt('left', 12)?.wrist).toEqual({ x: 200, y: 250 });
  });

  it('keeps joints inside the picture', () => {
    const desk = bareDesk();
    desk.marking.placeJoint({ x: -5, y: 9000 });
    expect(desk.markAt('right', 0)?.shoulder).toEqual({ x: 0, y: testClip.height });
  });

  it('lets readings follow a drag without history or saving, until it is committed', () => {
    const desk = deskState();
    const saved: unknown[] = [];
    desk.onChange((changes) => saved.push(...changes));
    desk.chooseArm('left');
    desk.goTo(34);
    const wristUnderElbow = { x: desk.markAt('left', 34)?.elbow?.x ?? 0, y: 600 };
    desk.marking.previewJoint('left', 34, 'wrist', wristUnderElbow);
    const dragged = desk.readingAtFrame().left;
    expect(dragged.ok && dragged.value.angles.forearmDeg).toBeCloseTo(0, 9);
    expect(desk.undoWords()).toBeNull();
    expect(saved).toEqual([]);

    desk.marking.dropPreview();
    const back = desk.readingAtFrame().left;
    expect(back.ok && back.value.angles.forearmDeg).toBeCloseTo(70, 9);

    desk.marking.previewJoint('left', 34, 'wrist', wristUnderElbow);
    desk.marking.commitMark('left', 34);
    expect(saved).toHaveLength(1);
    desk.undo();
    expect(desk.markAt('left', 34)).toEqual(
      testMarks.find(({ arm, frame }) => arm === 'left' && frame === 34),
    );
  });

  it('takes a row of nudges back in one step, and no further back', () => {
    const desk = deskState();
    desk.goTo(74);
    const before = desk.markAt('right', 74);
    desk.chooseJoint('wrist');
    for (let i = 0; i < 5; i += 1) desk.marking.nudgeJoint(1, 0);
    expect(desk.markAt('right', 74)?.wrist?.x).toBeCloseTo((before?.wrist?.x ?? 0) + 5, 9);
    desk.chooseJoint('elbow');
    desk.marking.nudgeJoint(0, 1);
    desk.undo();
    expect(desk.markAt('right', 74)?.elbow).toEqual(before?.elbow);
    desk.undo();
    expect(desk.markAt('right', 74)).toEqual(before);
  });

  it('marks with the keyboard alone: the crosshair starts near the joint of the nearest marked frame', () => {
    const desk = bareDesk({ marks: [markWith('right', 20, { upperArmDeg: 60, forearmDeg: 30 })] });
    desk.goTo(22);
    desk.marking.nudgeJoint(3, -2);
    expect(desk.crosshair()).toEqual({ x: 603, y: 248 });
    desk.marking.placeAtCrosshair();
    expect(desk.markAt('right', 22)?.shoulder).toEqual({ x: 603, y: 248 });
    expect(desk.joint()).toBe('elbow');
  });

  it('removes a mark and brings it back', () => {
    const desk = deskState();
    desk.goTo(74);
    const before = desk.markAt('right', 74);
    desk.marking.removeMark();
    expect(desk.markAt('right', 74)).toBeNull();
    desk.goTo(0);
    desk.undo();
    expect(desk.markAt('right', 74)).toEqual(before);
    expect(desk.frame()).toBe(74);
  });

  it('changes nothing for those who may look only', () => {
    const desk = deskState({ canEdit: false });
    desk.goTo(75);
    desk.marking.placeJoint({ x: 1, y: 1 });
    desk.marking.removeMark('right', 74);
    desk.setUp.setPlumb(null);
    expect(desk.markAt('right', 75)).toBeNull();
    expect(desk.markAt('right', 74)).not.toBeNull();
    expect(desk.plumbAssumed()).toBe(false);
    expect(desk.task()).toEqual({ kind: 'look' });
  });
});

describe('DeskState: strokes', () => {
  it('builds a stroke from its events and measures it', () => {
    const desk = bareDesk({ marks: testMarks });
    const press = (event: 'entry' | 'catch' | 'exit' | 'nextEntry', frame: number) => {
      desk.goTo(frame);
      return desk.events.setEvent(event);
    };
    expect(press('catch', 74)).toBe(false);
    expect(desk.spoken()?.words).toContain('Set its entry first');
    press('entry', 50);
    press('catch', 74);
    expect(desk.strokeReading()).toBeNull();
    press('exit', 104);
    desk.goTo(90);
    expect(desk.strokeReading()?.name).toBe('First right stroke');
    expect(desk.strokeReading()?.measures.phases).toEqual({ ok: false, reason: 'no-next-entry' });
    press('nextEntry', 130);
    desk.goTo(90);
    const vertical = desk.strokeReading()?.measures.verticalAt;
    expect(vertical?.ok && vertical.value.value).toBeCloseTo((10 + (5 * 25) / 40) / 30, 6);
  });

  it('measures only the stroke whose mark is dragged again', () => {
    const desk = deskState();
    const before = desk.readings.measures();
    desk.marking.previewJoint('left', 34, 'wrist', { x: 700, y: 500 });
    const after = desk.readings.measures();
    const [left, right] = ['3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d21', '3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d22'];
    expect(after.get(right ?? '')).toBe(before.get(right ?? ''));
    expect(after.get(left ?? '')).not.toBe(before.get(left ?? ''));
  });

  it('undoes an entry that ended one stroke and began the next as one step', () => {
    const desk = deskState({ strokes: [{ ...stroke, nextEntry: null }], marks: [] });
    desk.goTo(140);
    desk.events.setEvent('entry');
    expect(desk.strokes().map(({ entry, nextEntry }) => [entry, nextEntry])).toEqual([
      [50, 140],
      [140, null],
    ]);
    desk.undo();
    expect(desk.strokes().map(({ entry, nextEntry }) => [entry, nextEntry])).toEqual([[50, null]]);
  });

  it('leads with N through what the stroke still needs, then to the other arm', () => {
    const desk = deskState({ marks: testMarks.filter(({ arm, frame }) => arm === 'right' && frame !== 84) });
    desk.goTo(60);
    desk.nextFrameToMark();
    expect([desk.arm(), desk.frame()]).toEqual(['right', 84]);
    desk.nextFrameToMark();
    expect([desk.arm(), desk.frame()]).toEqual(['left', 10]);
    desk.nextFrameToMark();
    expect([desk.arm(), desk.frame()]).toEqual(['left', 34]);
  });
});

const stroke = {
  id: '3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d22',
  arm: 'right' as const,
  entry: 50,
  catch: 74,
  exit: 104,
  nextEntry: 130,
  breath: false,
};

describe('DeskState: set-up', () => {
  it('turns all readings with the plumb, also while it is drawn', () => {
    const desk = deskState();
    desk.goTo(74);
    const forearm = () => {
      const reading = desk.readingAtFrame().right;
      return reading.ok ? reading.value.angles.forearmDeg : NaN;
    };
    const upright = forearm();
    const leaning = { top: { x: 600, y: 100 }, bottom: { x: 600 + 500 * Math.tan(Math.PI / 36), y: 600 } };
    desk.setUp.previewPlumb(leaning);
    expect(forearm()).toBeCloseTo(upright - 5, 6);
    desk.setUp.previewPlumb(null);
    expect(forearm()).toBeCloseTo(upright, 9);
    desk.setUp.setPlumb(leaning);
    expect(forearm()).toBeCloseTo(upright - 5, 6);
    desk.undo();
    expect(forearm()).toBeCloseTo(upright, 9);
  });

  it('refuses a plumb that says nothing about the vertical, in words', () => {
    const desk = bareDesk();
    expect(desk.setUp.setPlumb({ top: { x: 10, y: 10 }, bottom: { x: 12, y: 14 } })).toBe(false);
    expect(desk.spoken()).toMatchObject({
      refused: true,
      words: 'The plumb line is too short; draw it longer.',
    });
    expect(desk.plumbAssumed()).toBe(true);
  });

  it('joins typed facts into one undo step', () => {
    const desk = bareDesk();
    desk.setUp.setClipFacts({ captureRateFactor: 0.5 });
    desk.setUp.setClipFacts({ captureRateFactor: 0.25 });
    desk.setUp.setClipFacts({ travel: 'left' });
    desk.undo();
    expect(desk.clip()).toMatchObject({ captureRateFactor: 1, travel: 'right' });
  });
});

describe('DeskState: how far marks can be trusted', () => {
  it('follows the spread that the server reads the clip with, values as they were', () => {
    const desk = deskState();
    const stroke = desk.strokes()[0];
    if (!stroke?.catch) throw new Error('no stroke');
    desk.chooseArm(stroke.arm);
    desk.goTo(stroke.catch);
    const read = () => {
      const reading = desk.readingAtFrame()[stroke.arm];
      const drop = desk.readings.measures().get(stroke.id)?.peakDrop;
      if (!reading.ok || !drop?.ok) throw new Error('not read');
      return {
        angle: reading.value.angles.elbowDropDeg,
        angleU: reading.value.uncertainty.elbowDropDeg,
        drop: drop.value.value,
        dropU: drop.value.uncertainty,
      };
    };
    const before = read();
    const { shoulder, elbow, wrist } = testClip.jointUncertaintyPx;
    desk.takeSpread({ shoulder: 3 * shoulder, elbow: 3 * elbow, wrist: 3 * wrist });
    const after = read();
    expect([after.angle, after.drop]).toEqual([before.angle, before.drop]);
    expect(after.angleU).toBeCloseTo(3 * before.angleU, 9);
    expect(after.dropU).toBeGreaterThan(2 * before.dropU);
  });
});

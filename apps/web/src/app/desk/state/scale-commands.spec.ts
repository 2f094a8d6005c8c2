import type { Scale } from '@stillstroke/contract/scale';
import { describe, expect, it } from 'vitest';
import { bareDesk, deskState } from './testing';

const length: Scale = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 100, y: 400 },
  to: { x: 500, y: 400 },
  metres: 2,
  uncertaintyM: 0,
  check: null,
};

describe('scale on the Desk', () => {
  it('begins in the middle of the picture, and its points are put in place one undo step each', () => {
    const desk = bareDesk();
    const saved: unknown[] = [];
    desk.onChange((changes) => saved.push(...changes));
    desk.scale.begin('length');
    expect(desk.scale.placing()).toBe(true);
    // A press beside the points places no joint meanwhile.
    expect(desk.task()).toEqual({ kind: 'look' });
    expect(desk.scale.points().map(({ name }) => name)).toEqual(['from', 'to']);
    desk.scale.previewPoint('from', { x: 10, y: 20 });
    expect(desk.scale.scale()).toMatchObject({ from: { x: 10, y: 20 } });
    expect(saved).toHaveLength(1);
    desk.scale.commitPreview();
    expect(saved).toHaveLength(2);
    desk.undo();
    expect(desk.scale.scale()).not.toMatchObject({ from: { x: 10, y: 20 } });
    desk.undo();
    expect(desk.scale.scale()).toBeNull();
    desk.redo();
    expect(desk.scale.scale()).not.toBeNull();
  });

  it('joins a row of arrow presses into one step', () => {
    const desk = bareDesk({ scale: length });
    for (let x = 101; x <= 105; x += 1) desk.scale.movePoint('from', { x, y: 400 }, 'nudge-scale');
    desk.undo();
    expect(desk.scale.scale()).toEqual(length);
  });

  it('measures a line with its uncertainty, and follows the line and the scale', () => {
    const desk = bareDesk({ scale: length });
    expect(desk.scale.measured()).toBeNull();
    desk.scale.showLine(true);
    desk.scale.movePoint('line-from', { x: 200, y: 100 });
    desk.scale.movePoint('line-to', { x: 400, y: 100 });
    const read = desk.scale.measured();
    expect(read?.ok && read.value.metres).toBeCloseTo(1, 12);
    expect(read?.ok && read.value.uncertaintyM).toBeGreaterThan(0);
    desk.scale.setMetres('metres', 4);
    const after = desk.scale.measured();
    expect(after?.ok && after.value.metres).toBeCloseTo(2, 12);
    // The line is not the clip's: taking steps back leaves it.
    desk.undo();
    expect(desk.scale.line()).not.toBeNull();
  });

  it('refuses in words what fixes no scale, and keeps what was there', () => {
    const desk = bareDesk();
    desk.scale.begin('rectangle');
    const before = desk.scale.stored();
    desk.scale.movePoint('corner-0', { x: 900, y: 500 });
    expect(desk.spoken()).toMatchObject({ refused: true });
    expect(desk.scale.scale()).toEqual(before);
    desk.scale.setMetres('widthM', 0);
    expect(desk.spoken()?.words).toContain('above 0');
    desk.scale.setMetres('widthM', NaN);
    expect(desk.scale.stored()).toEqual(before);
  });

  it('shows how a second length fits', () => {
    const check = { from: { x: 100, y: 100 }, to: { x: 300, y: 100 }, metres: 0.9 };
    const desk = bareDesk({ scale: { ...length, check } });
    const found = desk.scale.check();
    expect(found?.ok && found.value.differenceM).toBeCloseTo(0.1, 9);
    expect(found?.ok && found.value.agrees).toBe(false);
    desk.scale.setCheck(false);
    expect(desk.scale.check()).toBeNull();
  });

  it('gives reach and depth of the current stroke in metres, in the swimmer’s plane only', () => {
    const desk = deskState({ scale: length });
    desk.chooseArm('left');
    desk.goTo(34);
    const path = desk.view.handPath();
    expect(path?.reachAtEntry.ok && path.reachAtEntry.value.frame).toBe(10);
    expect(path?.handDepth.ok && path.handDepth.value.metres).toBeCloseTo((130 + 120) * 0.005, 2);
    desk.scale.setPlane('wall');
    const onWall = desk.view.handPath();
    expect(onWall?.handDepth).toEqual({ ok: false, reason: 'scale-of-other-plane' });
  });

  it('changes nothing for those who may look only', () => {
    const desk = bareDesk({ canEdit: false, scale: length });
    desk.scale.set(null);
    desk.scale.startPlacing();
    desk.scale.previewPoint('from', { x: 1, y: 1 });
    expect(desk.scale.scale()).toEqual(length);
    expect(desk.scale.placing()).toBe(false);
  });
});

describe('cautions on the Desk', () => {
  it('belong to the chosen arm on the shown frame, and follow a drag', () => {
    const desk = deskState();
    desk.chooseArm('left');
    desk.goTo(34);
    const codes = () => desk.view.frameCautions().map(({ code }) => code);
    // Travel to the right: the left arm is the far one.
    expect(codes()).toEqual(['far-arm']);
    desk.chooseArm('right');
    expect(codes()).toEqual([]);
    desk.goTo(74);
    expect(codes()).toEqual([]);
    const mark = desk.markAt('right', 74);
    const [elbow, wrist] = [mark?.elbow, mark?.wrist];
    if (!elbow || !wrist) throw new Error('not marked');
    const near = { x: (elbow.x + wrist.x) / 2, y: (elbow.y + wrist.y) / 2 };
    desk.marking.previewJoint('right', 74, 'wrist', near);
    expect(codes()).toEqual(['foreshortened']);
    desk.setUp.setPlumb(null);
    desk.goTo(104);
    expect(codes()).toEqual(['plumb-assumed']);
    desk.goTo(105);
    expect(codes()).toEqual([]);
  });

  it('say for the stroke what the frames behind its measures carry', () => {
    const desk = deskState();
    desk.chooseArm('left');
    desk.goTo(34);
    const [far] = desk.view.strokeCautions();
    expect(far?.code).toBe('far-arm');
    expect(far?.affects.map(({ reading }) => reading)).toContain('verticalAt');
    desk.setUp.setClipFacts({ fieldOfView: { deg: 96, medium: 'water' } });
    desk.setUp.setClipFacts({ travel: 'left' });
    expect(desk.view.strokeCautions().map(({ code }) => code)).not.toContain('far-arm');
  });
});

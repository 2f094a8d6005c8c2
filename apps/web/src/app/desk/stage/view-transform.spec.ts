import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { picturePoint, stagePoint } from './spaces';
import {
  centreOn,
  clampView,
  fitScale,
  fitView,
  insidePicture,
  isFitted,
  LARGEST_SCALE,
  panBy,
  pinch,
  resizedView,
  showsPixels,
  toPicture,
  toStage,
  type ViewFrame,
  zoomAt,
} from './view-transform';

const side = fc.integer({ min: 16, max: 4096 });
const frames = fc.record({ pw: side, ph: side, sw: side, sh: side }).map(({ pw, ph, sw, sh }): ViewFrame => ({
  picture: { width: pw, height: ph },
  stage: { width: sw, height: sh },
}));
const share = fc.double({ min: 0, max: 1, noNaN: true });
const factor = fc.double({ min: 0.2, max: 5, noNaN: true });
/** A view reached from fit by a few zooms and pans, as a person would. */
const reached = fc
  .record({
    frame: frames,
    moves: fc.array(fc.record({ x: share, y: share, factor, dx: share, dy: share }), { maxLength: 6 }),
  })
  .map(({ frame, moves }) => {
    let view = fitView(frame);
    for (const move of moves) {
      const at = stagePoint(move.x * frame.stage.width, move.y * frame.stage.height);
      view = zoomAt(view, frame, at, move.factor);
      view = panBy(view, frame, (move.dx - 0.5) * frame.stage.width, (move.dy - 0.5) * frame.stage.height);
    }
    return { frame, view };
  });

describe('view transform', () => {
  it('takes points to the stage and back', () => {
    fc.assert(
      fc.property(reached, share, share, ({ frame, view }, x, y) => {
        const point = picturePoint(x * frame.picture.width, y * frame.picture.height);
        const back = toPicture(view, toStage(view, point));
        expect(back.x).toBeCloseTo(point.x, 6);
        expect(back.y).toBeCloseTo(point.y, 6);
      }),
    );
  });

  it('keeps the picture point under the pointer when zooming in on the picture', () => {
    fc.assert(
      fc.property(
        reached,
        share,
        share,
        fc.double({ min: 1, max: 8, noNaN: true }),
        ({ frame, view }, x, y, by) => {
          const point = picturePoint(x * frame.picture.width, y * frame.picture.height);
          const at = toStage(view, point);
          const after = toStage(zoomAt(view, frame, at, by), point);
          expect(after.x).toBeCloseTo(at.x, 5);
          expect(after.y).toBeCloseTo(at.y, 5);
        },
      ),
    );
  });

  it('keeps both picture points under two fingers that spread on the picture', () => {
    const frame: ViewFrame = { picture: { width: 1920, height: 1080 }, stage: { width: 960, height: 540 } };
    const view = fitView(frame);
    const before = [stagePoint(400, 200), stagePoint(500, 300)] as const;
    const after = [stagePoint(350, 150), stagePoint(550, 350)] as const;
    const next = pinch(view, frame, before, after);
    expect(next.scale).toBeCloseTo(view.scale * 2, 9);
    before.forEach((finger, i) => {
      const moved = toStage(next, toPicture(view, finger));
      expect(moved.x).toBeCloseTo(after[i]?.x ?? NaN, 9);
      expect(moved.y).toBeCloseTo(after[i]?.y ?? NaN, 9);
    });
  });

  it('does not move when two fingers lie on one point', () => {
    const frame: ViewFrame = { picture: { width: 100, height: 100 }, stage: { width: 100, height: 100 } };
    const finger = stagePoint(50, 50);
    expect(pinch(fitView(frame), frame, [finger, finger], [finger, finger])).toEqual(fitView(frame));
  });

  it('always covers the place of the fitted picture, give or take the rim', () => {
    fc.assert(
      fc.property(reached, ({ frame, view }) => {
        const fit = fitView(frame);
        const slackX = frame.stage.width / 4 + 1e-6;
        const slackY = frame.stage.height / 4 + 1e-6;
        const right = (v: typeof view) => v.offsetX + frame.picture.width * v.scale;
        const bottom = (v: typeof view) => v.offsetY + frame.picture.height * v.scale;
        expect(view.offsetX).toBeLessThanOrEqual(fit.offsetX + slackX);
        expect(view.offsetY).toBeLessThanOrEqual(fit.offsetY + slackY);
        expect(right(view)).toBeGreaterThanOrEqual(right(fit) - slackX);
        expect(bottom(view)).toBeGreaterThanOrEqual(bottom(fit) - slackY);
        expect(clampView(view, frame)).toEqual(view);
      }),
    );
  });

  it('goes from fit to single pixels and no further', () => {
    const frame: ViewFrame = { picture: { width: 1920, height: 1080 }, stage: { width: 960, height: 540 } };
    const at = stagePoint(10, 10);
    const nearest = zoomAt(fitView(frame), frame, at, 1e6);
    expect(nearest.scale).toBe(LARGEST_SCALE);
    expect(LARGEST_SCALE).toBeGreaterThanOrEqual(32);
    expect(zoomAt(nearest, frame, at, 1e-6)).toEqual(fitView(frame));
  });

  it('lets a picture smaller than the stage fill it', () => {
    const frame: ViewFrame = { picture: { width: 2, height: 1 }, stage: { width: 1000, height: 1000 } };
    expect(fitView(frame)).toEqual({ scale: 500, offsetX: 0, offsetY: 250 });
    expect(zoomAt(fitView(frame), frame, stagePoint(0, 0), 3)).toEqual(fitView(frame));
  });

  it('fits again after a resize when it fitted, and keeps the middle when it was zoomed', () => {
    fc.assert(
      fc.property(reached, side, side, ({ frame, view }, width, height) => {
        const after: ViewFrame = { picture: frame.picture, stage: { width, height } };
        const next = resizedView(view, frame, after);
        if (isFitted(view, frame)) expect(next).toEqual(fitView(after));
        else expect(next).toEqual(clampView(next, after));
      }),
    );
    const before: ViewFrame = { picture: { width: 1000, height: 1000 }, stage: { width: 500, height: 500 } };
    const after: ViewFrame = { picture: before.picture, stage: { width: 600, height: 400 } };
    const zoomed = zoomAt(fitView(before), before, stagePoint(250, 250), 8);
    expect(toPicture(resizedView(zoomed, before, after), stagePoint(300, 200))).toEqual(
      picturePoint(500, 500),
    );
  });

  it('stays usable while sizes are unknown', () => {
    const frame: ViewFrame = { picture: { width: 0, height: 0 }, stage: { width: 0, height: 0 } };
    expect(fitScale(frame)).toBe(1);
    expect(fitView(frame)).toEqual({ scale: 1, offsetX: 0, offsetY: 0 });
  });

  it('draws squares once a pixel is two device pixels wide', () => {
    const view = { scale: 1.5, offsetX: 0, offsetY: 0 };
    expect(showsPixels(view, 1)).toBe(false);
    expect(showsPixels(view, 2)).toBe(true);
  });

  it('brings a point to the middle and keeps points inside the picture', () => {
    const frame: ViewFrame = { picture: { width: 1000, height: 1000 }, stage: { width: 500, height: 500 } };
    const zoomed = zoomAt(fitView(frame), frame, stagePoint(0, 0), 16);
    const middle = toStage(centreOn(zoomed, frame, picturePoint(400, 700)), picturePoint(400, 700));
    expect(middle.x).toBeCloseTo(250, 9);
    expect(middle.y).toBeCloseTo(250, 9);
    expect(insidePicture(picturePoint(-3, 1200), frame.picture)).toEqual(picturePoint(0, 1000));
  });
});

import {
  type PicturePoint,
  picturePoint,
  type Size,
  stageDistance,
  type StagePoint,
  stagePoint,
} from './spaces';

/**
 * How the picture lies on the stage: `stage = picture · scale + offset`.
 * `scale` is CSS pixels per picture pixel; offsets are CSS pixels.
 */
export interface ViewTransform {
  readonly scale: number;
  readonly offsetX: number;
  readonly offsetY: number;
}

/** Picture (picture pixels) and stage (CSS pixels) that a view is for. */
export interface ViewFrame {
  readonly picture: Size;
  readonly stage: Size;
}

/** A single picture pixel may become this many CSS pixels wide. */
export const LARGEST_SCALE = 64;
/** From this many device pixels per picture pixel on, pixels are drawn as squares. */
const CRISP_FROM = 2;
/** Share of the stage by which a picture's edge may be pulled in when zoomed far in, so that its rim can be worked on. */
const RIM_SHARE = 0.25;

/** The whole picture, as large as the stage allows, in the middle. */
export function fitView({ picture, stage }: ViewFrame): ViewTransform {
  const scale = fitScale({ picture, stage });
  return {
    scale,
    offsetX: (stage.width - picture.width * scale) / 2,
    offsetY: (stage.height - picture.height * scale) / 2,
  };
}

/** Scale of {@link fitView}; 1 while either size is still unknown (zero). */
export function fitScale({ picture, stage }: ViewFrame): number {
  const scale = Math.min(stage.width / picture.width, stage.height / picture.height);
  return Number.isFinite(scale) && scale > 0 ? scale : 1;
}

export function largestScale(frame: ViewFrame): number {
  return Math.max(LARGEST_SCALE, fitScale(frame));
}

export function toStage(view: ViewTransform, point: PicturePoint): StagePoint {
  return stagePoint(point.x * view.scale + view.offsetX, point.y * view.scale + view.offsetY);
}

export function toPicture(view: ViewTransform, point: StagePoint): PicturePoint {
  return picturePoint((point.x - view.offsetX) / view.scale, (point.y - view.offsetY) / view.scale);
}

/**
 * Zooms by a factor (above 1: nearer) so that the picture point under `at` stays where it is. Zooming in on the picture
 * keeps it exactly; zooming out gives way where the picture would leave its place.
 */
export function zoomAt(view: ViewTransform, frame: ViewFrame, at: StagePoint, factor: number): ViewTransform {
  const scale = clamp(view.scale * factor, fitScale(frame), largestScale(frame));
  return placed(frame, scale, toPicture(view, at), at);
}

/** Moves the picture by CSS pixels. */
export function panBy(view: ViewTransform, frame: ViewFrame, dx: number, dy: number): ViewTransform {
  return clampView({ ...view, offsetX: view.offsetX + dx, offsetY: view.offsetY + dy }, frame);
}

/** Two fingers: what lay under them stays under them; their distance is the zoom, their middle the pan. */
export function pinch(
  view: ViewTransform,
  frame: ViewFrame,
  before: readonly [StagePoint, StagePoint],
  after: readonly [StagePoint, StagePoint],
): ViewTransform {
  const apart = stageDistance(...before);
  const factor = apart > 0 ? stageDistance(...after) / apart : 1;
  const scale = clamp(view.scale * factor, fitScale(frame), largestScale(frame));
  return placed(frame, scale, toPicture(view, middle(before)), middle(after));
}

/** The view that brings a picture point to the middle of the stage as far as the limits allow. */
export function centreOn(view: ViewTransform, frame: ViewFrame, point: PicturePoint): ViewTransform {
  return placed(frame, view.scale, point, stagePoint(frame.stage.width / 2, frame.stage.height / 2));
}

/**
 * The same view within its limits: from fit to {@link LARGEST_SCALE}, and covering the place that the picture takes
 * when it fits, give or take a rim that grows with the zoom. Both limits widen with the scale, which is why zooming in
 * on a point of the picture never needs to move it.
 */
export function clampView(view: ViewTransform, frame: ViewFrame): ViewTransform {
  const fit = fitScale(frame);
  const scale = clamp(view.scale, fit, largestScale(frame));
  const { picture, stage } = frame;
  const offset = (wanted: number, pictureSide: number, stageSide: number) => {
    const centred = (stageSide - pictureSide * scale) / 2;
    const reach = (pictureSide * (scale - fit)) / 2 + stageSide * RIM_SHARE * (1 - fit / scale);
    return clamp(wanted, centred - reach, centred + reach);
  };
  return {
    scale,
    offsetX: offset(view.offsetX, picture.width, stage.width),
    offsetY: offset(view.offsetY, picture.height, stage.height),
  };
}

/**
 * The view after the stage has changed its size: the picture that fitted fits again, otherwise the zoom and the picture
 * point in the middle stay.
 */
export function resizedView(view: ViewTransform, before: ViewFrame, after: ViewFrame): ViewTransform {
  if (isFitted(view, before)) return fitView(after);
  const middleBefore = stagePoint(before.stage.width / 2, before.stage.height / 2);
  return centreOn(view, after, toPicture(view, middleBefore));
}

/** Whether the whole picture is shown as large as it can be. */
export function isFitted(view: ViewTransform, frame: ViewFrame): boolean {
  return view.scale <= fitScale(frame) * (1 + 1e-9);
}

/** Whether picture pixels are large enough to be drawn as squares. */
export function showsPixels(view: ViewTransform, devicePixelRatio: number): boolean {
  return view.scale * devicePixelRatio >= CRISP_FROM;
}

/** The nearest point inside the picture, its edges included. */
export function insidePicture(point: PicturePoint, picture: Size): PicturePoint {
  return picturePoint(clamp(point.x, 0, picture.width), clamp(point.y, 0, picture.height));
}

function placed(frame: ViewFrame, scale: number, point: PicturePoint, at: StagePoint): ViewTransform {
  const view = { scale, offsetX: at.x - point.x * scale, offsetY: at.y - point.y * scale };
  return clampView(view, frame);
}

function middle([a, b]: readonly [StagePoint, StagePoint]): StagePoint {
  return stagePoint((a.x + b.x) / 2, (a.y + b.y) / 2);
}

function clamp(value: number, low: number, high: number): number {
  return Math.min(Math.max(value, low), high);
}

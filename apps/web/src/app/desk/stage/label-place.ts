import type { Size, StagePoint } from './spaces';
import { stagePoint } from './spaces';

/** An upright rectangle on the stage, CSS pixels. */
export interface Box {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

export type Segment = readonly [StagePoint, StagePoint];

export interface LabelWish {
  /** What the label speaks of; it is looked for round this point. */
  readonly round: StagePoint;
  /** Direction from there in which the label would be best, radians, clockwise from x as on a canvas. */
  readonly towards: number;
  /** Distance of the label's middle from there at which the search begins, CSS pixels. */
  readonly from: number;
  readonly size: Size;
}

/** What a label must stay clear of. */
export interface Obstacles {
  readonly lines: readonly Segment[];
  readonly boxes: readonly Box[];
  readonly stage: Size;
}

/** CSS pixels between a label and any line or label. */
export const LABEL_GAP = 5;
const DIRECTIONS = 24;
const RING_STEP = 14;
const RINGS = 9;

/**
 * Place for a label that covers no line and no other label and lies on the stage: the one nearest to the wish. Where the
 * stage is too full for that, the place with the most room.
 */
export function placeLabel(wish: LabelWish, obstacles: Obstacles): Box {
  let roomiest: { box: Box; room: number } | null = null;
  for (const box of candidates(wish)) {
    const room = clearance(box, obstacles);
    if (room >= LABEL_GAP) return box;
    if (!roomiest || room > roomiest.room) roomiest = { box, room };
  }
  return roomiest?.box ?? boxAround(wish.round, wish.size);
}

/** Ring by ring outwards, on each ring from the wished direction to both sides. */
function* candidates({ round, towards, from, size }: LabelWish): Generator<Box> {
  for (let ring = 0; ring < RINGS; ring++) {
    const away = from + ring * RING_STEP;
    for (let step = 0; step < DIRECTIONS; step++) {
      const turn = Math.ceil(step / 2) * (step % 2 === 0 ? 1 : -1) * ((2 * Math.PI) / DIRECTIONS);
      const angle = towards + turn;
      yield boxAround(stagePoint(round.x + away * Math.cos(angle), round.y + away * Math.sin(angle)), size);
    }
  }
}

/** Free distance round a box, CSS pixels; negative by as much as it leaves the stage, 0 when it covers something. */
export function clearance(box: Box, { lines, boxes, stage }: Obstacles): number {
  const outside = Math.min(
    box.left,
    box.top,
    stage.width - box.left - box.width,
    stage.height - box.top - box.height,
  );
  if (outside < 0) return outside;
  const toLines = lines.map((line) => distanceToSegment(box, line));
  const toBoxes = boxes.map((other) => distanceToBox(box, other));
  return Math.min(Infinity, ...toLines, ...toBoxes);
}

function boxAround(middle: StagePoint, { width, height }: Size): Box {
  return { left: middle.x - width / 2, top: middle.y - height / 2, width, height };
}

function distanceToBox(a: Box, b: Box): number {
  const dx = Math.max(0, b.left - a.left - a.width, a.left - b.left - b.width);
  const dy = Math.max(0, b.top - a.top - a.height, a.top - b.top - b.height);
  return Math.hypot(dx, dy);
}

/** 0 when the segment touches the box. */
function distanceToSegment(box: Box, [a, b]: Segment): number {
  if (crosses(box, a, b)) return 0;
  const corners = [
    stagePoint(box.left, box.top),
    stagePoint(box.left + box.width, box.top),
    stagePoint(box.left, box.top + box.height),
    stagePoint(box.left + box.width, box.top + box.height),
  ];
  return Math.min(
    pointToBox(box, a),
    pointToBox(box, b),
    ...corners.map((corner) => pointToSegment(corner, a, b)),
  );
}

/** Whether any of the segment lies in the box: it is cut down to each side in turn. */
function crosses(box: Box, a: StagePoint, b: StagePoint): boolean {
  let from = 0;
  let to = 1;
  const cut = (start: number, delta: number, low: number, high: number): boolean => {
    if (delta === 0) return start >= low && start <= high;
    const enter = (delta > 0 ? low - start : high - start) / delta;
    const leave = (delta > 0 ? high - start : low - start) / delta;
    from = Math.max(from, enter);
    to = Math.min(to, leave);
    return from <= to;
  };
  return (
    cut(a.x, b.x - a.x, box.left, box.left + box.width) && cut(a.y, b.y - a.y, box.top, box.top + box.height)
  );
}

function pointToBox(box: Box, p: StagePoint): number {
  return distanceToBox(box, { left: p.x, top: p.y, width: 0, height: 0 });
}

function pointToSegment(p: StagePoint, a: StagePoint, b: StagePoint): number {
  const dx = b.x - a.x;
  const dy = b.y - a.y;
  const square = dx * dx + dy * dy;
  const along = square > 0 ? Math.min(1, Math.max(0, ((p.x - a.x) * dx + (p.y - a.y) * dy) / square)) : 0;
  return Math.hypot(p.x - a.x - along * dx, p.y - a.y - along * dy);
}

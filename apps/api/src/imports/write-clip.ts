import { randomUUID } from 'node:crypto';
import type { ExportClip, ExportStroke } from '@stillstroke/contract/export';
import type { ImportChoice } from '@stillstroke/contract/import';
import type { Db } from '@stillstroke/db/open';
import { clips, marks, strokes } from '@stillstroke/db/schema/film';
import { cameraRoll } from '@stillstroke/geometry/calibration/plumb';
import { and, eq, inArray } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';
import { checkDistance, keepDistance } from '../clips/distance.service';
import { checkFrame, checkJoints, markColumns } from '../marks/mark-rules';
import { knownDistance } from '../measures/clip-reading';
import { refreshClipFigures } from '../measures/figures';
import { settleMarker } from '../repeatability/marker';
import { HttpProblem } from '../platform/problem';
import { checkEvents, checkNoOverlap } from '../strokes/stroke-rules';
import { strokeColumns } from '../strokes/stroke-answer';
import { written, type ClipPlan } from './import-plan';

type Transaction = Parameters<Parameters<Db['transaction']>[0]>[0];

/** Who brings it in, and when. */
export interface Stamp {
  readonly updatedAt: string;
  readonly updatedBy: string;
}

/**
 * Puts what a file has for a clip onto a clip of ours under a choice, by the same rules as if it were done by hand.
 *
 * @throws HttpProblem with the rule that the file breaks; call it in a transaction
 */
export function writeClip(
  tx: Transaction,
  from: ExportClip,
  to: ClipRow,
  plan: ClipPlan,
  choice: ImportChoice,
  stamp: Stamp,
): void {
  writeSetUp(tx, from, to, choice);
  writeDistance(tx, from, to, choice, stamp);
  writeStrokes(tx, to, plan, choice, stamp);
  writeMarks(tx, { ...to, travel: from.travel }, plan, choice, stamp);
  settleMarker(tx, to.id);
  refreshClipFigures(tx, to.id);
}

function writeSetUp(tx: Transaction, from: ExportClip, to: ClipRow, choice: ImportChoice): void {
  const { view, travel, stroke, captureRateFactor, fieldOfView, plumb } = from;
  if (!cameraRoll(plumb).ok)
    throw new HttpProblem(422, 'plumb-too-short', 'The plumb in the file is too short or lies level.');
  const plumbColumns = {
    plumbTopX: plumb?.top.x ?? null,
    plumbTopY: plumb?.top.y ?? null,
    plumbBottomX: plumb?.bottom.x ?? null,
    plumbBottomY: plumb?.bottom.y ?? null,
  };
  if (choice === 'add') {
    // Only a plumb can be missing; of the rest a clip has always something.
    if (to.plumbTopX === null && plumb !== null)
      tx.update(clips).set(plumbColumns).where(eq(clips.id, to.id)).run();
    return;
  }
  tx.update(clips)
    .set({
      view,
      travel,
      stroke,
      captureRateFactor,
      fieldOfViewDeg: fieldOfView?.deg ?? null,
      fieldOfViewMedium: fieldOfView?.medium ?? null,
      ...plumbColumns,
    })
    .where(eq(clips.id, to.id))
    .run();
}

function writeDistance(
  tx: Transaction,
  { distance }: ExportClip,
  to: ClipRow,
  choice: ImportChoice,
  stamp: Stamp,
): void {
  if (choice === 'add' && (distance === null || knownDistance(tx, to.id) !== null)) return;
  if (distance !== null) checkDistance(tx, to, distance);
  keepDistance(tx, to.id, distance, stamp);
}

function writeStrokes(
  tx: Transaction,
  to: ClipRow,
  plan: ClipPlan,
  choice: ImportChoice,
  stamp: Stamp,
): void {
  const wanted = written(plan.strokes, choice);
  const going = [
    ...wanted.flatMap(({ ours }) => ours.map(({ id }) => id)),
    ...(choice === 'match' ? plan.onlyHere.strokes.map(({ id }) => id) : []),
  ];
  for (const ids of portions([...new Set(going)]))
    tx.delete(strokes)
      .where(and(eq(strokes.clipId, to.id), inArray(strokes.id, ids)))
      .run();
  for (const { file, ours } of wanted) {
    checkEvents(file, to.frameCount);
    const id = freeId(tx, file);
    const fields = { ...file, id, clipId: to.id };
    checkNoOverlap(tx, fields);
    const version = Math.max(0, ...ours.map((row) => row.version)) + 1;
    tx.insert(strokes)
      .values({ id, clipId: to.id, arm: file.arm, ...strokeColumns(file), ...stamp, version })
      .run();
  }
}

/** The stroke's own id, so that links to it lead back; another where some clip has a stroke of that id. */
function freeId(tx: Transaction, { id }: ExportStroke): string {
  const taken = tx.select({ id: strokes.id }).from(strokes).where(eq(strokes.id, id)).get();
  return taken ? randomUUID() : id;
}

function writeMarks(tx: Transaction, to: ClipRow, plan: ClipPlan, choice: ImportChoice, stamp: Stamp): void {
  if (choice === 'match')
    for (const { arm, frame } of plan.onlyHere.marks)
      tx.delete(marks)
        .where(and(eq(marks.clipId, to.id), eq(marks.arm, arm), eq(marks.frame, frame)))
        .run();
  for (const { file, ours } of written(plan.marks, choice)) {
    const { arm, frame, shoulder, elbow, wrist } = file;
    checkFrame(to, frame);
    checkJoints({ shoulder, elbow, wrist }, to);
    const changed = { ...markColumns({ shoulder, elbow, wrist }), ...stamp };
    tx.insert(marks)
      .values({ clipId: to.id, arm, frame, ...changed })
      .onConflictDoUpdate({
        target: [marks.clipId, marks.arm, marks.frame],
        set: { ...changed, version: (ours[0]?.version ?? 0) + 1 },
      })
      .run();
  }
}

/** A statement takes only so many parameters. */
function* portions<T>(items: readonly T[]): Generator<T[]> {
  for (let from = 0; from < items.length; from += 500) yield items.slice(from, from + 500);
}

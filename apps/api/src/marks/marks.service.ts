import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, ParamsOf, QueryOf } from '@stillstroke/contract/endpoint';
import type {
  deleteMark as deleteCall,
  Mark,
  putMark as putCall,
  SavedMark,
} from '@stillstroke/contract/marks';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { marks } from '@stillstroke/db/schema/film';
import { and, asc, eq, sql } from 'drizzle-orm';
import { jointUncertaintyOf, type ClipRow } from '../clips/clip-answer';
import { clipRow } from '../measures/clip-reading';
import { refreshClipFigures, refreshFiguresAt } from '../measures/figures';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, notFound } from '../platform/problem';
import { settleMarker, settleMarkerAfter } from '../repeatability/marker';
import { liveClip } from '../sessions/live-film';
import { markAnswer } from './mark-answer';
import { checkFrame, checkJoints, markColumns } from './mark-rules';

type Context = Pick<AppContext, 'db' | 'now'>;
type Place = Pick<ParamsOf<typeof putCall>, 'arm' | 'frame'>;

/** All marks of a clip, by frame. */
export function listMarks({ db }: Context, user: SignedInUser, clipId: string): Mark[] {
  const { clip } = liveClip(db, user, clipId);
  return marksOfClip(db)
    .all({ clipId: clip.id })
    .map((row) => markAnswer(row, clip));
}

const marksOfClip = preparedOnce((db) =>
  db
    .select()
    .from(marks)
    .where(eq(marks.clipId, sql.placeholder('clipId')))
    .orderBy(asc(marks.frame), asc(marks.arm))
    .prepare(),
);

/**
 * Sets the mark of one arm on one frame. Sent twice it is the same mark, of the same version; with a version, it is
 * refused when that is not the newest (0: when there is one already) and the mark there is not what is sent.
 */
export function putMark(
  { db, now }: Context,
  user: SignedInUser,
  { id: clipId, ...place }: ParamsOf<typeof putCall>,
  { version, ...joints }: BodyOf<typeof putCall>,
): SavedMark {
  const { clip } = liveClip(db, user, clipId);
  checkFrame(clip, place.frame);
  checkJoints(joints, clip);
  const fields = markColumns(joints);
  return db.transaction(
    (tx) => {
      const there = markAt(tx, clip.id, place);
      if (there && isSame(there, fields)) return savedAnswer(there, clip);
      if (version !== undefined && version !== (there?.version ?? 0))
        throw changedMeanwhile('mark', there ? markAnswer(there, clip) : null);
      const changed = { ...fields, updatedAt: now().toISOString(), updatedBy: user.id };
      const row = tx
        .insert(marks)
        .values({ clipId: clip.id, ...place, ...changed })
        .onConflictDoUpdate({
          target: [marks.clipId, marks.arm, marks.frame],
          set: { ...changed, version: (there?.version ?? 0) + 1 },
        })
        .returning()
        .get();
      return savedAnswer(row, refreshReadings(tx, clip, place, settleMarkerAfter(tx, clip, user.id)));
    },
    { behavior: 'immediate' },
  );
}

/** Takes a mark away; with a version, only when that is the newest. */
export function deleteMark(
  { db }: Context,
  user: SignedInUser,
  { id: clipId, ...place }: ParamsOf<typeof deleteCall>,
  { version }: QueryOf<typeof deleteCall>,
): void {
  const { clip } = liveClip(db, user, clipId);
  db.transaction(
    (tx) => {
      const there = markAt(tx, clip.id, place);
      if (!there) throw notFound('mark');
      if (version !== undefined && version !== there.version)
        throw changedMeanwhile('mark', markAnswer(there, clip));
      tx.delete(marks).where(at(clip.id, place)).run();
      refreshReadings(tx, clip, place, settleMarker(tx, clip.id));
    },
    { behavior: 'immediate' },
  );
}

function savedAnswer(row: typeof marks.$inferSelect, clip: ClipRow): SavedMark {
  return { ...markAnswer(row, clip), jointUncertaintyPx: { ...jointUncertaintyOf(clip) } };
}

type Writer = Pick<Db, 'select' | 'insert' | 'delete' | 'update'>;

/** What was kept of the strokes that the mark belongs to, or of all when the clip is read with another's spread now. */
function refreshReadings(tx: Writer, clip: ClipRow, { arm, frame }: Place, allOfThem: boolean): ClipRow {
  if (!allOfThem) {
    refreshFiguresAt(tx, clip.id, arm, frame);
    return clip;
  }
  refreshClipFigures(tx, clip.id);
  return clipRow(tx, clip.id) ?? clip;
}

const at = (clipId: string, { arm, frame }: Place) =>
  and(eq(marks.clipId, clipId), eq(marks.arm, arm), eq(marks.frame, frame));

function markAt(db: Pick<Db, 'select'>, clipId: string, place: Place) {
  return markQuery(db).get({ clipId, ...place });
}

const markQuery = preparedOnce((db) =>
  db
    .select()
    .from(marks)
    .where(
      and(
        eq(marks.clipId, sql.placeholder('clipId')),
        eq(marks.arm, sql.placeholder('arm')),
        eq(marks.frame, sql.placeholder('frame')),
      ),
    )
    .prepare(),
);

function isSame(there: typeof marks.$inferSelect, fields: ReturnType<typeof markColumns>): boolean {
  return (Object.keys(fields) as (keyof typeof fields)[]).every((key) => there[key] === fields[key]);
}

import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Agreements, MeasureAgreement } from '@stillstroke/contract/repeatability';
import { users } from '@stillstroke/db/schema/club';
import { markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import { coachAgreement } from '@stillstroke/geometry/statistics/coach-agreement';
import { type AngleName, anglesTwice } from '@stillstroke/geometry/uncertainty/own-uncertainty';
import type { ClipAxes } from '@stillstroke/geometry/angles/arm-angles';
import type { ArmMark } from '@stillstroke/geometry/arm';
import {
  armAngleUncertainty,
  type JointUncertaintyPx,
} from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import { and, eq, inArray, isNotNull, ne } from 'drizzle-orm';
import { grouped } from '../measures/grouped';
import type { AppContext } from '../platform/context';
import { liveClip } from '../sessions/live-film';
import { spreadOf, type Reader } from './marker';
import { markedTwice, placedTwice, type TwiceRow } from './round-rows';

type Pair = Agreements['items'][number];

/** Every pair of coaches of whom one has marked again what the other had marked on this clip. */
export function getAgreement(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  clipId: string,
): Agreements['items'] {
  const { clip } = liveClip(db, user, clipId);
  const rows = newestOfEach(
    markedTwice(
      db,
      and(
        eq(markingRounds.clipId, clip.id),
        isNotNull(roundMarks.firstBy),
        ne(roundMarks.firstBy, markingRounds.userId),
      ),
    ),
  );
  const ids = [...new Set(rows.flatMap(({ row, againBy }) => [row.firstBy ?? '', againBy]))];
  const names = new Map(
    db
      .select({ id: users.id, name: users.name })
      .from(users)
      .where(inArray(users.id, ids))
      .all()
      .map(({ id, name }) => [id, name]),
  );
  const coach = (id: string) => ({ id, name: names.get(id) ?? 'Someone' });
  return [...grouped(rows, ({ row, againBy }) => `${row.firstBy ?? ''} ${againBy}`).values()].flatMap(
    (of) => {
      const [one] = of;
      if (!one?.row.firstBy) return [];
      return [{ first: coach(one.row.firstBy), second: coach(one.againBy), ...agreementOf(db, of) }];
    },
  );
}

/** A frame that someone marked again in two rounds counts once, as it was last: two of one frame are not independent. */
function newestOfEach(rows: readonly TwiceRow[]): TwiceRow[] {
  const key = ({ row, againBy }: TwiceRow) => `${againBy} ${row.arm} ${row.frame}`;
  return [...new Map(rows.map((row) => [key(row), row])).values()];
}

function agreementOf(db: Reader, rows: readonly TwiceRow[]): Pick<Pair, 'frames' | 'measures'> {
  const read = rows.flatMap((twice) => {
    const placed = placedTwice(twice);
    const angles = placed && anglesTwice(placed);
    if (!angles) return [];
    const { clip, row, againBy } = twice;
    const first = placingErrors(placed.first, placed.axes, spreadOf(db, clip, row.firstBy));
    const second = placingErrors(placed.again, placed.axes, spreadOf(db, clip, againBy));
    return first && second ? [{ arm: row.arm, frame: row.frame, angles, errors: { first, second } }] : [];
  });
  const of = (name: AngleName): MeasureAgreement | null => {
    const found = coachAgreement(
      read.map(({ angles, errors }) => ({
        ...angles[name],
        firstUncertainty: errors.first[name],
        secondUncertainty: errors.second[name],
      })),
    );
    if (!found.ok) return null;
    const { count: _, points, ...figures } = found.value;
    return {
      ...figures,
      points: read.flatMap(({ arm, frame }, at) => {
        const point = points[at];
        return point ? [{ arm, frame, ...point }] : [];
      }),
    };
  };
  const [forearmDeg, upperArmDeg] = [of('forearmDeg'), of('upperArmDeg')];
  const [elbowDeg, elbowDropDeg] = [of('elbowDeg'), of('elbowDropDeg')];
  const measures =
    forearmDeg && upperArmDeg && elbowDeg && elbowDropDeg
      ? { forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg }
      : null;
  return { frames: read.length, measures };
}

/** How far placing alone leaves each angle open; the camera's lean is common to both readings and is left out. */
function placingErrors(
  mark: ArmMark,
  axes: ClipAxes,
  jointUncertaintyPx: JointUncertaintyPx,
): Readonly<Record<AngleName, number>> | null {
  const read = armAngleUncertainty(mark, { ...axes, jointUncertaintyPx });
  if (!read.ok) return null;
  const { parts } = read.value;
  const of = (name: AngleName) =>
    Math.hypot(...parts[name].filter(({ source }) => source !== 'roll').map(({ alone }) => alone));
  return {
    forearmDeg: of('forearmDeg'),
    upperArmDeg: of('upperArmDeg'),
    elbowDeg: of('elbowDeg'),
    elbowDropDeg: of('elbowDropDeg'),
  };
}

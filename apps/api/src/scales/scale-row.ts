import { scaleSchema, type ClipScale, type Scale } from '@stillstroke/contract/scale';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { clipScales } from '@stillstroke/db/schema/scale';
import { eq, sql } from 'drizzle-orm';

/** The scale kept for a clip, or undefined. */
export function scaleRow(
  db: Pick<Db, 'select'>,
  clipId: string,
): { readonly scale: Scale; readonly version: number } | undefined {
  const row = query(db).get({ clipId });
  // What was written was checked; what another version wrote and this one cannot read counts as not there.
  if (!row) return undefined;
  const scale = scaleSchema.safeParse(row.scale);
  return scale.success ? { scale: scale.data, version: row.version } : undefined;
}

export function scaleAnswer(db: Pick<Db, 'select'>, clipId: string): ClipScale {
  return scaleRow(db, clipId) ?? { scale: null, version: 0 };
}

const query = preparedOnce((db) =>
  db
    .select({ scale: clipScales.scale, version: clipScales.version })
    .from(clipScales)
    .where(eq(clipScales.clipId, sql.placeholder('clipId')))
    .prepare(),
);

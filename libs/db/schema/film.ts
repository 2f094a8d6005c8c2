import { sql } from 'drizzle-orm';
import {
  blob,
  index,
  integer,
  primaryKey,
  real,
  sqliteTable,
  text,
  uniqueIndex,
} from 'drizzle-orm/sqlite-core';
import { athletes, users } from './club';

/** Sessions, clips with their frame index, and what a coach puts on them: strokes and marks. */

export const sessions = sqliteTable(
  'sessions',
  {
    id: text().primaryKey(),
    athleteId: text()
      .notNull()
      .references(() => athletes.id, { onDelete: 'cascade' }),
    /** YYYY-MM-DD */
    date: text().notNull(),
    place: text(),
    note: text(),
    createdAt: text().notNull(),
    /** Set while a deletion can still be undone; purged afterwards. */
    deletedAt: text(),
  },
  (table) => [
    index('sessions_athlete_date').on(table.athleteId, table.date),
    index('sessions_deleted')
      .on(table.deletedAt)
      .where(sql`${table.deletedAt} is not null`),
  ],
);

export const clips = sqliteTable(
  'clips',
  {
    id: text().primaryKey(),
    sessionId: text()
      .notNull()
      .references(() => sessions.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    view: text({
      enum: ['side-underwater', 'front-underwater', 'side-above', 'front-above', 'deck'],
    }).notNull(),
    travel: text({ enum: ['left', 'right'] }).notNull(),
    stroke: text({ enum: ['full', 'drill'] }).notNull(),
    /** World seconds per file second. */
    captureRateFactor: real().notNull().default(1),
    /** Degrees between the side edges of the picture, in water or in air; null while nobody has said it. */
    fieldOfViewDeg: real(),
    fieldOfViewMedium: text({ enum: ['water', 'air'] }),
    plumbTopX: real(),
    plumbTopY: real(),
    plumbBottomX: real(),
    plumbBottomY: real(),
    status: text({ enum: ['ready', 'converting', 'failed'] }).notNull(),
    width: integer().notNull(),
    height: integer().notNull(),
    frameCount: integer().notNull(),
    durationUs: integer().notNull(),
    /** Frames per file second; null when variable. */
    frameRate: real(),
    codec: text().notNull(),
    container: text().notNull(),
    sizeBytes: integer().notNull(),
    sha256: text().notNull(),
    cutOff: integer({ mode: 'boolean' }).notNull(),
    hasPoster: integer({ mode: 'boolean' }).notNull(),
    createdAt: text().notNull(),
    deletedAt: text(),
    /** Which version of the formulas its stroke figures were computed with; 0 = not yet. */
    figuresFormulas: integer().notNull().default(0),
    /** Who placed most of its marks. */
    markerId: text().references(() => users.id, { onDelete: 'set null' }),
    /**
     * Their own spread, standard uncertainty per coordinate in pixels of this picture; null while it is not known. Kept
     * here, so that every reading of the clip is made with one and the same.
     */
    jointShoulderPx: real(),
    jointElbowPx: real(),
    jointWristPx: real(),
  },
  (table) => [
    index('clips_session').on(table.sessionId),
    index('clips_sha256').on(table.sha256),
    index('clips_formulas').on(table.figuresFormulas),
    index('clips_deleted')
      .on(table.deletedAt)
      .where(sql`${table.deletedAt} is not null`),
  ],
);

/** Presentation times (whole microseconds) and key frames of a clip, as little-endian arrays; read and written whole. */
export const clipFrames = sqliteTable('clip_frames', {
  clipId: text()
    .primaryKey()
    .references(() => clips.id, { onDelete: 'cascade' }),
  /** Float64 each: whole microseconds stay exact up to 2^53. */
  timestampsUs: blob({ mode: 'buffer' }).notNull(),
  /** Uint32 each: frame indices. */
  keyFrames: blob({ mode: 'buffer' }).notNull(),
});

const eventSource = () =>
  text({ enum: ['hand-seen', 'wrist-proxy'] })
    .notNull()
    .default('hand-seen');

export const strokes = sqliteTable(
  'strokes',
  {
    id: text().primaryKey(),
    clipId: text()
      .notNull()
      .references(() => clips.id, { onDelete: 'cascade' }),
    arm: text({ enum: ['left', 'right'] }).notNull(),
    entryFrame: integer().notNull(),
    catchFrame: integer().notNull(),
    exitFrame: integer().notNull(),
    nextEntryFrame: integer(),
    breath: integer({ mode: 'boolean' }).notNull(),
    /** Whether the hand was seen on the event's frame or the wrist stands in for it. */
    entrySource: eventSource(),
    catchSource: eventSource(),
    exitSource: eventSource(),
    nextEntrySource: eventSource(),
    version: integer().notNull().default(1),
    updatedAt: text().notNull(),
    updatedBy: text(),
  },
  (table) => [uniqueIndex('strokes_clip_arm_entry').on(table.clipId, table.arm, table.entryFrame)],
);

/** Joints in pixels of the picture as shown. */
export const marks = sqliteTable(
  'marks',
  {
    clipId: text()
      .notNull()
      .references(() => clips.id, { onDelete: 'cascade' }),
    arm: text({ enum: ['left', 'right'] }).notNull(),
    frame: integer().notNull(),
    shoulderX: real().notNull(),
    shoulderY: real().notNull(),
    elbowX: real().notNull(),
    elbowY: real().notNull(),
    wristX: real().notNull(),
    wristY: real().notNull(),
    version: integer().notNull().default(1),
    updatedAt: text().notNull(),
    updatedBy: text(),
  },
  (table) => [primaryKey({ columns: [table.clipId, table.arm, table.frame] })],
);

/**
 * What was measured on each stroke, kept so that Compare, Trend and lists need not compute it again. Derived from events,
 * marks, plumb, travel and capture rate factor, and written in the same transaction as any change of those.
 */
export const strokeFigures = sqliteTable(
  'stroke_figures',
  {
    strokeId: text()
      .notNull()
      .references(() => strokes.id, { onDelete: 'cascade' }),
    measure: text({
      enum: [
        'verticalAt',
        'peakDrop',
        'elbowAtMidPull',
        'entryAndCatch',
        'pull',
        'push',
        'recovery',
        'strokeRate',
        'strokeLength',
        'strokeIndex',
      ],
    }).notNull(),
    /** In the unit of the measure. */
    value: real().notNull(),
    /** Standard uncertainty in the same unit. */
    uncertainty: real().notNull(),
    /** The part of it that all strokes of a clip share (camera roll), which more strokes do not lessen. */
    setUp: real().notNull().default(0),
    /** Where to look at it. */
    frame: integer().notNull(),
  },
  (table) => [primaryKey({ columns: [table.strokeId, table.measure] })],
);

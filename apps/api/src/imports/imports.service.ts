import { createHash } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { ExportClip } from '@stillstroke/contract/export';
import type {
  ImportChoice,
  ImportClip,
  ImportPreview,
  importFile,
  previewImport,
} from '@stillstroke/contract/import';
import type { Db } from '@stillstroke/db/open';
import { fieldOfViewOf, plumbOf, type ClipRow } from '../clips/clip-answer';
import { exportedClip } from '../exports/export-clip';
import { liveClips } from '../exports/export-session';
import { clipRow } from '../measures/clip-reading';
import type { AppContext } from '../platform/context';
import { badField, changedMeanwhile, HttpProblem } from '../platform/problem';
import { liveSession } from '../sessions/live-film';
import { misfit } from './fits';
import { countsOf, onClip, planOf } from './import-plan';
import { pairUp, type Pair } from './pairing';
import { sameFigures } from './same-figures';
import { writeClip, type Stamp } from './write-clip';

type Context = Pick<AppContext, 'db' | 'now'>;
type Transaction = Parameters<Parameters<Db['transaction']>[0]>[0];

/** What a file would change; done for real in a transaction that is taken back, so that it is what importing does. */
export function previewOf(
  context: Context,
  user: SignedInUser,
  sessionId: string,
  { file, pairs }: BodyOf<typeof previewImport>,
): ImportPreview {
  const { db } = context;
  liveSession(db, user, sessionId);
  const ours = liveClips(context, sessionId);
  const paired = pairUp(file, ours, pairs);
  return {
    basis: basisOf(db, ours),
    clips: paired.map((pair) => tried(context, user, pair)),
    ours: named(ours),
  };
}

/**
 * Puts a file onto clips of a session, all of it or nothing. Films are never made: what was marked on a film that is not
 * here is left out.
 */
export function importInto(
  context: Context,
  user: SignedInUser,
  sessionId: string,
  { file, pairs, choice, basis }: BodyOf<typeof importFile>,
): ImportPreview {
  const { db } = context;
  liveSession(db, user, sessionId);
  return db.transaction(
    (tx) => {
      const ours = liveClips(context, sessionId);
      if (basisOf(tx, ours) !== basis) throw changedMeanwhile('session', null);
      const paired = pairUp(file, ours, pairs);
      if (!paired.some(({ to }) => to))
        throw new HttpProblem(
          422,
          'import-does-not-fit',
          'No clip of the file is of a film in this session. Upload the film, or choose the clip it goes onto.',
        );
      const clips = paired.map((pair) => written(tx, pair, choice, stampOf(context, user)));
      return { basis: basisOf(tx, liveClips(context, sessionId)), clips, ours: named(ours) };
    },
    { behavior: 'immediate' },
  );
}

const stampOf = ({ now }: Context, user: SignedInUser): Stamp => ({
  updatedAt: now().toISOString(),
  updatedBy: user.id,
});

const named = (rows: readonly ClipRow[]) => rows.map(({ id, name }) => ({ id, name }));

class TakenBack extends Error {
  constructor(readonly clip: ImportClip) {
    super('preview');
  }
}

/** As it would be if the clip were to become as in the file. */
function tried(context: Context, user: SignedInUser, pair: Pair): ImportClip {
  try {
    context.db.transaction((tx) => {
      throw new TakenBack(written(tx, pair, 'match', stampOf(context, user)));
    });
  } catch (error) {
    if (error instanceof TakenBack) return error.clip;
    if (error instanceof HttpProblem) return { ...leftOut(pair), refusal: error.detail };
    throw error;
  }
  return leftOut(pair);
}

function written(tx: Transaction, pair: Pair, choice: ImportChoice, stamp: Stamp): ImportClip {
  const { from, to } = pair;
  if (!to) return leftOut(pair);
  refuseMuddled(from);
  const refusal = misfit(tx, from, to);
  if (refusal) throw new HttpProblem(422, 'import-does-not-fit', refusal);
  const plan = planOf(from, to, onClip(tx, to.id));
  writeClip(tx, from, to, plan, choice, stamp);
  const now = clipRow(tx, to.id) ?? to;
  return {
    ...leftOut(pair),
    setUp: [...plan.setUp],
    strokes: countsOf(plan.strokes, plan.onlyHere.strokes.length),
    marks: countsOf(plan.marks, plan.onlyHere.marks.length),
    figures: sameFigures(from, exportedClip(tx, now)),
  };
}

/** What no export of ours has, and what cannot be put anywhere: the same thing twice, an arm in two strokes at once. */
function refuseMuddled({ name, strokes, marks }: ExportClip): void {
  const twice = (keys: readonly string[]) => new Set(keys).size !== keys.length;
  if (twice(strokes.map(({ id }) => id)))
    throw badField('file', `${name} has a stroke twice. Export it again.`);
  if (twice(marks.map(({ arm, frame }) => `${arm} ${frame}`)))
    throw badField('file', `${name} has two marks of one arm on one frame. Export it again.`);
  for (const arm of ['left', 'right'] as const) {
    const inOrder = strokes.filter((stroke) => stroke.arm === arm).sort((a, b) => a.entry - b.entry);
    const overlap = inOrder.find((stroke, n) => {
      const before = inOrder[n - 1];
      return before !== undefined && stroke.entry < (before.nextEntry ?? before.exit);
    });
    if (overlap)
      throw badField(
        'file',
        `${name} has two strokes of the ${arm} arm at once, at frame ${overlap.entry}. Export it again.`,
      );
  }
}

function leftOut({ from, date, to, foundBy }: Pair): ImportClip {
  const none = { new: 0, changed: 0, same: 0, onlyHere: 0 };
  return {
    from: { id: from.id, name: from.name, date },
    to: to && { id: to.id, name: to.name },
    foundBy,
    refusal: null,
    setUp: [],
    strokes: none,
    marks: none,
    figures: { same: 0, different: 0 },
  };
}

/** Fingerprint of all that an import may change, versions included. */
function basisOf(db: Pick<Db, 'select'>, ours: readonly ClipRow[]): string {
  const hash = createHash('sha256');
  for (const row of ours) {
    const { id, view, travel, stroke, captureRateFactor } = row;
    hash.update(
      JSON.stringify([
        id,
        view,
        travel,
        stroke,
        captureRateFactor,
        fieldOfViewOf(row),
        plumbOf(row),
        onClip(db, id),
      ]),
    );
  }
  return hash.digest('hex');
}

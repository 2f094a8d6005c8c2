import * as z from 'zod';
import { pointSchema } from './clip-facts';
import { endpoint, type AnswerOf } from './endpoint';
import { frameSchema, idParams, idSchema, instantSchema } from './fields';
import { armSchema } from './strokes';

/** Marking the same frames again: how closely a coach repeats their own marks, and how two coaches agree. */

export const jointsSchema = z.strictObject({ shoulder: pointSchema, elbow: pointSchema, wrist: pointSchema });
export type Joints = z.infer<typeof jointsSchema>;

export const roundSchema = z.strictObject({
  id: idSchema,
  clipId: idSchema,
  clipName: z.string(),
  sessionId: idSchema,
  athleteName: z.string(),
  createdAt: instantSchema,
  finishedAt: instantSchema.nullable(),
  frames: z.int(),
  /** Frames that have been marked again. */
  marked: z.int(),
  /** Frames whose first mark is the coach's own: only these tell how closely they repeat themselves. */
  own: z.int(),
});
export type MarkingRound = z.infer<typeof roundSchema>;

/** One frame of a round. The first mark is never sent: it is to be placed without it. */
export const roundMarkSchema = z.strictObject({
  position: z.int(),
  arm: armSchema,
  frame: frameSchema,
  again: jointsSchema.nullable(),
});
export type RoundMark = z.infer<typeof roundMarkSchema>;

const roundWithMarks = roundSchema.extend({ marks: z.array(roundMarkSchema) });

export const listClipRounds = endpoint({
  method: 'get',
  path: '/api/clips/:id/marking-rounds',
  access: ['admin', 'coach'],
  summary: 'The caller’s own rounds of marking again on a clip, newest first',
  params: idParams,
  answer: z.strictObject({ items: z.array(roundSchema), nextCursor: z.null() }),
});

export const startRound = endpoint({
  method: 'post',
  path: '/api/clips/:id/marking-rounds',
  access: ['admin', 'coach'],
  summary: 'Begin a round: marked frames of the clip in random order, the caller’s own first',
  status: 201,
  params: idParams,
  body: z.strictObject({ frames: z.int().min(3).max(40).default(10) }),
  answer: roundWithMarks,
});

export const getRound = endpoint({
  method: 'get',
  path: '/api/marking-rounds/:id',
  access: ['admin', 'coach'],
  summary: 'One of the caller’s own rounds with its frames in the order shown',
  params: idParams,
  answer: roundWithMarks,
});
export type MarkingRoundWithMarks = AnswerOf<typeof getRound>;

export const putRoundMark = endpoint({
  method: 'put',
  path: '/api/marking-rounds/:id/marks/:position',
  access: ['admin', 'coach'],
  summary: 'Set the joints of one frame of a round; sent twice it is the same mark',
  params: z.strictObject({ id: idSchema, position: z.coerce.number().int().min(0).max(1000) }),
  body: jointsSchema,
  answer: roundMarkSchema,
});

export const finishRound = endpoint({
  method: 'post',
  path: '/api/marking-rounds/:id/finish',
  access: ['admin', 'coach'],
  summary: 'End a round whose frames are all marked; the uncertainties of the coach’s clips follow',
  params: idParams,
  answer: roundSchema,
});

export const deleteRound = endpoint({
  method: 'delete',
  path: '/api/marking-rounds/:id',
  access: ['admin', 'coach'],
  summary: 'Throw a round away; figures and uncertainties follow',
  status: 204,
  params: idParams,
  answerKind: 'none',
});

const perJoint = z.strictObject({ shoulder: z.number(), elbow: z.number(), wrist: z.number() });

export const typicalErrorSchema = z.strictObject({
  typicalErrorDeg: z.number(),
  minimalChangeDeg: z.number(),
  biasDeg: z.number(),
});

const perAngle = <T extends z.ZodType>(each: T) =>
  z.strictObject({ forearmDeg: each, upperArmDeg: each, elbowDeg: each, elbowDropDeg: each });

export const getMarking = endpoint({
  method: 'get',
  path: '/api/marking',
  access: ['admin', 'coach'],
  summary: 'The caller’s own repeatability, and the rounds that it was found from',
  answer: z.strictObject({
    /** Null until two frames have been marked twice. */
    figures: z
      .strictObject({
        /** Standard deviation of one placing, per coordinate, pixels of a picture whose shorter side is 1080. */
        spreadAt1080: perJoint,
        degreesOfFreedom: z.int(),
        frames: z.int(),
        rounds: z.int(),
        /** When the newest of those rounds was finished. */
        measuredAt: instantSchema,
        /** False while too few frames are behind it: the default then stands in the uncertainties. */
        inUse: z.boolean(),
        typicalErrors: perAngle(typicalErrorSchema).nullable(),
      })
      .nullable(),
    defaultAt1080: perJoint,
    framesNeeded: z.int(),
    rounds: z.array(roundSchema),
  }),
});
export type MarkingFigures = AnswerOf<typeof getMarking>;

export const forgetMarking = endpoint({
  method: 'delete',
  path: '/api/marking',
  access: ['admin', 'coach'],
  summary: 'Forget the caller’s figures with all their rounds; the default stands again',
  status: 204,
  answerKind: 'none',
});

const intervalSchema = z.strictObject({ low: z.number(), high: z.number() });

export const measureAgreementSchema = z.strictObject({
  /** Mean of first − second, degrees, with its 95 % interval. */
  bias: z.number(),
  biasInterval: intervalSchema,
  sd: z.number(),
  /** bias ± 1.96 SD. */
  limits: intervalSchema,
  lowerLimitInterval: intervalSchema,
  upperLimitInterval: intervalSchema,
  /** Standard deviation of a difference that placing the joints twice would leave, by the two coaches' own spreads. */
  marking: z.number(),
  /** The bias against it: none shown, no more than `marking`, or more. */
  verdict: z.enum(['no-shift', 'small', 'large']),
  points: z.array(
    z.strictObject({ arm: armSchema, frame: frameSchema, mean: z.number(), difference: z.number() }),
  ),
});
export type MeasureAgreement = z.infer<typeof measureAgreementSchema>;

const coachSchema = z.strictObject({ id: idSchema, name: z.string() });

export const getAgreement = endpoint({
  method: 'get',
  path: '/api/clips/:id/marking-agreement',
  access: ['admin', 'coach'],
  summary: 'How two coaches agree who have marked the same frames of a clip, per measure (Bland and Altman)',
  params: idParams,
  answer: z.strictObject({
    items: z.array(
      z.strictObject({
        first: coachSchema,
        /** Who marked again in finished rounds what the first had marked. */
        second: coachSchema,
        frames: z.int(),
        /** Null with fewer than three frames. */
        measures: perAngle(measureAgreementSchema).nullable(),
      }),
    ),
    nextCursor: z.null(),
  }),
});
export type Agreements = AnswerOf<typeof getAgreement>;

import * as z from 'zod';

/** Stable codes of refusals; the client switches on these, never on the words. */
export const problemCodes = [
  'bad-request',
  'not-signed-in',
  'forbidden',
  'not-found',
  'conflict',
  'changed-meanwhile',
  'csrf',
  'too-many-attempts',
  'wrong-credentials',
  'email-taken',
  'name-taken',
  'weak-password',
  'invitation-spent',
  'password-link-spent',
  'events-out-of-order',
  'frame-out-of-range',
  'strokes-overlap',
  'plumb-too-short',
  'distance-unusable',
  'joints-coincide',
  'scale-unusable',
  'clip-not-ready',
  'not-a-video',
  'no-video-track',
  'no-frames',
  'unreadable-video',
  'unsupported-codec',
  'file-too-large',
  'clip-too-long',
  'picture-too-large',
  'duplicate-clip',
  'upload-cut-off',
  'upload-malformed',
  'storage-full',
  'undo-expired',
  'not-a-picture',
  'review-sent',
  'review-not-ready',
  'import-does-not-fit',
  'too-few-marks',
  'round-not-done',
  'round-finished',
  'range-not-satisfiable',
  'internal',
] as const;
export const problemCodeSchema = z.enum(problemCodes);
export type ProblemCode = z.infer<typeof problemCodeSchema>;

/** `application/problem+json` (RFC 9457) with our stable `code`; `detail` is a sentence for people that says what to do. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: problemCodeSchema,
  issues: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** What the server has now, where a change was refused because somebody else changed it meanwhile. */
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;

import { HttpProblem } from '../platform/problem';

export const malformed = (detail: string) => new HttpProblem(400, 'upload-malformed', detail);
export const cutOff = () =>
  new HttpProblem(400, 'upload-cut-off', 'The upload ended before the file did. Send it again.');

export const tooLarge = (limitBytes: number) =>
  new HttpProblem(
    413,
    'file-too-large',
    `The file is larger than the ${Math.floor(limitBytes / 1024 ** 2)} MiB that are taken. Cut the clip or export it smaller.`,
  );

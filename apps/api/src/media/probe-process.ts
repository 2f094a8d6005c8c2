import { CLIP_FORMATS } from '@stillstroke/clip-index/packet-table';
import { ClipRefusal } from '@stillstroke/clip-index/clip-refusal';
import { readClipIndex } from '@stillstroke/clip-index/frame-index';
import { FilePathSource, Input } from 'mediabunny';
import { writePoster } from './poster';
import type { ProbeAnswer, ProbeQuestion, ProbeReady } from './probe-protocol';
import { remakePicture } from './remake-picture';

/**
 * The process that looks into files. A file made to crash or stall a reader takes this process down and not the server,
 * which ends it after a time and starts another.
 */
async function answerTo(question: ProbeQuestion): Promise<ProbeAnswer> {
  if (question.kind === 'picture') return pictureAnswer(question.picture, question.made);
  const input = new Input({ source: new FilePathSource(question.film), formats: CLIP_FORMATS });
  try {
    if (question.kind === 'index') return { kind: 'index', index: await readClipIndex(input) };
    await writePoster(input, question);
    return { kind: 'poster' };
  } catch (error) {
    if (error instanceof ClipRefusal) return { kind: 'refused', code: error.code, message: error.message };
    return { kind: 'failed', message: error instanceof Error ? error.message : String(error) };
  } finally {
    input.dispose();
  }
}

async function pictureAnswer(picture: string, made: string): Promise<ProbeAnswer> {
  try {
    return { kind: 'picture', ...(await remakePicture(picture, made)) };
  } catch (error) {
    return { kind: 'failed', message: error instanceof Error ? error.message : String(error) };
  }
}

process.on('message', (question: ProbeQuestion) => {
  void answerTo(question).then((answer) => process.send?.(answer));
});
// Without the server there is nobody to answer.
process.on('disconnect', () => process.exit(0));
process.send?.({ kind: 'ready' } satisfies ProbeReady);

import type { IncomingMessage } from 'node:http';
import { Busboy, type BusboyHeaders, type BusboyInstance } from '@fastify/busboy';
import { aboutStillSchema, type AboutStill } from '@stillstroke/contract/stills';
import { cutOff, malformed, tooLarge } from '../media/upload-problems';
import { UploadWatch } from '../media/upload-watch';
import { badRequest } from '../platform/mount';

export interface ReceivedPicture {
  readonly bytes: Buffer;
  readonly about: AboutStill;
}

/** A frame of 4K as PNG with room to spare; a JPEG is far smaller. */
export const PICTURE_BYTES = 32 * 1024 * 1024;
const ABOUT_BYTES = 48 * 1024;
const ENVELOPE_BYTES = 16 * 1024;
const limits = {
  fieldNameSize: 40,
  fieldSize: ABOUT_BYTES,
  fields: 2,
  files: 2,
  fileSize: PICTURE_BYTES,
  headerPairs: 20,
  headerSize: 8192,
};

/**
 * Reads an upload of one picture (field `picture`) and what is said about it (field `about`, JSON).
 *
 * @throws HttpProblem upload-malformed, upload-cut-off, file-too-large or bad-request
 */
export async function receivePicture(req: IncomingMessage): Promise<ReceivedPicture> {
  if (Number(req.headers['content-length'] ?? 0) > PICTURE_BYTES + ABOUT_BYTES + ENVELOPE_BYTES)
    throw tooLarge(PICTURE_BYTES);
  const parser = openParser(req);
  const watch = new UploadWatch(req, parser);
  try {
    const parts = await Promise.race([parsed(req, parser), watch.stalled(() => false)]);
    if (!parts.bytes || parts.bytes.length === 0) throw malformed('Send the picture in the field `picture`.');
    return { bytes: parts.bytes, about: aboutOf(parts.about) };
  } finally {
    watch.end();
    req.unpipe(parser);
    if (!req.complete && !req.destroyed) req.resume();
  }
}

interface Parts {
  bytes: Buffer | null;
  about: string | null;
}

function parsed(req: IncomingMessage, parser: BusboyInstance): Promise<Parts> {
  const parts: Parts = { bytes: null, about: null };
  return new Promise((resolve, reject) => {
    parser.on('file', (field, file) => {
      // A part that is given up emits its error here as well; the parser's own says it all.
      file.on('error', () => undefined);
      if (field !== 'picture' || parts.bytes) {
        file.resume();
        reject(malformed('Send one picture only, in the field `picture`.'));
        return;
      }
      const chunks: Buffer[] = [];
      parts.bytes = Buffer.alloc(0);
      file.on('data', (chunk: Buffer) => chunks.push(chunk));
      file.on('limit', () => reject(tooLarge(PICTURE_BYTES)));
      file.on('end', () => (parts.bytes = Buffer.concat(chunks)));
    });
    parser.on('field', (name, value, nameCut, valueCut) => {
      if (name !== 'about' || parts.about !== null || nameCut || valueCut)
        reject(malformed('Say what the picture is, once, in the field `about`, in less than 48 KiB.'));
      parts.about = value;
    });
    for (const event of ['filesLimit', 'fieldsLimit', 'partsLimit'] as const)
      parser.on(event, () => reject(malformed('The upload has more parts than it may have.')));
    parser.on('error', (error) => reject(parserProblem(error)));
    parser.on('finish', () => resolve(parts));
    req.on('error', () => reject(cutOff()));
    req.on('close', () => {
      if (!req.complete) reject(cutOff());
    });
    if (req.destroyed) reject(cutOff());
    req.pipe(parser);
  });
}

function openParser(req: IncomingMessage): BusboyInstance {
  try {
    const isPartAFile = (field: string | undefined, _type: string | undefined, name: string | undefined) =>
      field === 'picture' || name !== undefined;
    return new Busboy({ headers: req.headers as BusboyHeaders, limits, isPartAFile });
  } catch {
    throw malformed('Send the picture as multipart/form-data.');
  }
}

function aboutOf(text: string | null): AboutStill {
  if (text === null) throw malformed('Say what the picture is in the field `about`.');
  let read: unknown;
  try {
    read = JSON.parse(text);
  } catch {
    throw malformed('The field `about` is not JSON.');
  }
  const about = aboutStillSchema.safeParse(read);
  if (about.success) return about.data;
  throw badRequest(about.error.issues);
}

function parserProblem(error: unknown) {
  const message = error instanceof Error ? error.message : '';
  return /unexpected end/i.test(message)
    ? cutOff()
    : malformed('The upload is not well-formed multipart/form-data.');
}

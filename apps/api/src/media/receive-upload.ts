import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import type { IncomingMessage } from 'node:http';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Busboy, type BusboyFileStream, type BusboyHeaders, type BusboyInstance } from '@fastify/busboy';
import { uploadFieldsSchema, type UploadFields } from '@stillstroke/contract/clips';
import { badRequest } from '../platform/mount';
import { HttpProblem } from '../platform/problem';
import { filmName } from './film-name';
import { cutOff, malformed, tooLarge } from './upload-problems';
import { UploadWatch } from './upload-watch';

/** What an upload brought. The file lies where it was to be written and is safely on disk. */
export interface ReceivedFilm {
  /** The name it came with, made safe. */
  readonly name: string;
  readonly fields: UploadFields;
  readonly sizeBytes: number;
  /** Hexadecimal. */
  readonly sha256: string;
}

/** Names and values of ours are short; whatever is longer is none of ours. */
const limits = { fieldNameSize: 40, fieldSize: 200, fields: 8, files: 2, headerPairs: 20, headerSize: 8192 };
/** Room in the declared length for what surrounds the file. */
const ENVELOPE_BYTES = 64 * 1024;

/**
 * Streams a multipart upload to disk: exactly one file in the field `video`, and text fields as the contract names them.
 * The hash is taken on the way. On any failure the promise rejects after writing has stopped; what was written is the
 * caller's to remove.
 *
 * @param path where to write the file; must not exist
 * @throws HttpProblem upload-malformed, upload-cut-off, file-too-large, storage-full or bad-request
 */
export async function receiveUpload(
  req: IncomingMessage,
  path: string,
  limitBytes: number,
): Promise<ReceivedFilm> {
  if (Number(req.headers['content-length'] ?? 0) > limitBytes + ENVELOPE_BYTES) throw tooLarge(limitBytes);
  return new Upload(req, path, limitBytes).received();
}

class Upload {
  private readonly stop = new AbortController();
  private readonly fields = new Map<string, string>();
  private writing: Promise<Omit<ReceivedFilm, 'fields'>> | null = null;
  private written = false;

  constructor(
    private readonly req: IncomingMessage,
    private readonly path: string,
    private readonly limitBytes: number,
  ) {}

  async received(): Promise<ReceivedFilm> {
    const parser = openParser(this.req);
    const watch = new UploadWatch(this.req, parser);
    try {
      await Promise.race([this.parsed(parser), watch.stalled(() => this.writing !== null && !this.written)]);
      const film = await this.writing;
      if (!film) throw malformed('Send the video in the field `video`.');
      return { ...film, fields: checkedFields(this.fields) };
    } catch (error) {
      this.req.unpipe(parser);
      this.stop.abort();
      await this.writing?.catch(() => undefined);
      throw error;
    } finally {
      watch.end();
    }
  }

  /** Resolves when the whole body was read and written; rejects at the first thing wrong with it. */
  private parsed(parser: BusboyInstance): Promise<void> {
    return new Promise((resolve, reject) => {
      parser.on('file', (field, file, name) => {
        // A part that is given up emits its error here as well; the parser's own says it all.
        file.on('error', () => undefined);
        if (field !== 'video' || this.writing) {
          file.resume();
          reject(malformed('Send one file only, in the field `video`.'));
          return;
        }
        this.writing = this.write(file, name);
        this.writing.then(() => (this.written = true), reject);
      });
      parser.on('field', (name, value, nameCut, valueCut) => {
        try {
          this.takeField(name, value, nameCut || valueCut);
        } catch (error) {
          reject(error instanceof Error ? error : new Error(String(error)));
        }
      });
      for (const event of ['filesLimit', 'fieldsLimit', 'partsLimit'] as const)
        parser.on(event, () => reject(malformed('The upload has more parts than it may have.')));
      parser.on('error', (error) => reject(parserProblem(error)));
      parser.on('finish', resolve);
      this.req.on('error', () => reject(cutOff()));
      // A request also closes when all of it has been read, which may be before the parser is through with it.
      this.req.on('close', () => {
        if (!this.req.complete) reject(cutOff());
      });
      if (this.req.destroyed) reject(cutOff());
      this.req.pipe(parser);
    });
  }

  private takeField(name: string, value: string, cut: boolean): void {
    if (cut || !Object.hasOwn(uploadFieldsSchema.shape, name))
      throw malformed(
        'The upload has a field that is not known; send view, travel, stroke and captureRateFactor.',
      );
    if (this.fields.has(name)) throw malformed(`The field ${name} came twice.`);
    this.fields.set(name, value);
    // At once, so that a film of two gigabytes is not sent for a typing error behind which nobody wants it.
    checkedFields(this.fields);
  }

  private async write(
    file: BusboyFileStream,
    name: string | undefined,
  ): Promise<Omit<ReceivedFilm, 'fields'>> {
    const hash = createHash('sha256');
    let sizeBytes = 0;
    const { limitBytes } = this;
    const measured = new Transform({
      transform(chunk: Buffer, _encoding, done) {
        sizeBytes += chunk.length;
        hash.update(chunk);
        done(sizeBytes > limitBytes ? tooLarge(limitBytes) : null, chunk);
      },
    });
    try {
      await pipeline(file, measured, createWriteStream(this.path, { flags: 'wx', flush: true }), {
        signal: this.stop.signal,
      });
    } catch (error) {
      throw storageProblem(error);
    }
    if (sizeBytes === 0)
      throw new HttpProblem(422, 'not-a-video', 'The file is empty. Copy it again from the camera.');
    return { name: filmName(name), sizeBytes, sha256: hash.digest('hex') };
  }
}

function openParser(req: IncomingMessage): BusboyInstance {
  try {
    return new Busboy({ headers: req.headers as BusboyHeaders, limits, isPartAFile });
  } catch {
    throw malformed('Send the video as multipart/form-data.');
  }
}

/** The field `video` is a file whatever its headers say; any other part is one only when it has a file name. */
const isPartAFile = (field: string | undefined, _type: string | undefined, name: string | undefined) =>
  field === 'video' || name !== undefined;

function checkedFields(fields: ReadonlyMap<string, string>): UploadFields {
  const parsed = uploadFieldsSchema.safeParse(Object.fromEntries(fields));
  if (parsed.success) return parsed.data;
  throw badRequest(parsed.error.issues);
}

function parserProblem(error: unknown): HttpProblem {
  const message = error instanceof Error ? error.message : '';
  return /unexpected end/i.test(message)
    ? cutOff()
    : malformed('The upload is not well-formed multipart/form-data.');
}

function storageProblem(error: unknown): unknown {
  const code = (error as { code?: unknown } | null)?.code;
  if (code !== 'ENOSPC' && code !== 'EDQUOT') return error;
  return new HttpProblem(
    507,
    'storage-full',
    'The server has no room left for films. Nothing was kept; ask whoever runs it to make room.',
  );
}

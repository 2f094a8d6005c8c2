import { createReadStream, statSync } from 'node:fs';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo, Socket } from 'node:net';
import { basename, extname } from 'node:path';

const TYPES: Record<string, string> = { '.html': 'text/html', '.mp4': 'video/mp4', '.webm': 'video/webm' };

/** Serves scripts from memory and media from a folder, with Range, and fails on demand as a network does. */
export class MediaServer {
  /** Media requests are cut off instead of answered. */
  offline = false;
  /** Media is answered with this status instead of with data. */
  status: number | null = null;
  /** Bytes of media handed to sockets. */
  bytesSent = 0;
  private readonly server: Server;
  private readonly sockets = new Set<Socket>();

  private constructor(
    private readonly scripts: Readonly<Record<string, string>>,
    private readonly mediaFile: (name: string) => string,
  ) {
    this.server = createServer((request, response) => {
      this.answer(request, response);
    });
    this.server.on('connection', (socket) => {
      this.sockets.add(socket);
      socket.on('close', () => this.sockets.delete(socket));
    });
  }

  /**
   * @param scripts script texts by path; `/` is an empty page
   * @param mediaFile file of the disk for a name under `/media/`
   */
  static async start(
    scripts: Readonly<Record<string, string>>,
    mediaFile: (name: string) => string,
  ): Promise<MediaServer> {
    const started = new MediaServer(scripts, mediaFile);
    await new Promise<void>((resolve) => started.server.listen(0, '127.0.0.1', resolve));
    return started;
  }

  get origin(): string {
    return `http://localhost:${(this.server.address() as AddressInfo).port}`;
  }

  /** Cuts every connection, as a lost network does, also those in the middle of an answer. */
  goOffline(): void {
    this.offline = true;
    for (const socket of this.sockets) socket.destroy();
  }

  async stop(): Promise<void> {
    for (const socket of this.sockets) socket.destroy();
    await new Promise((resolve) => this.server.close(resolve));
  }

  private answer(request: IncomingMessage, response: ServerResponse): void {
    const path = new URL(request.url ?? '/', 'http://localhost').pathname;
    const script = this.scripts[path];
    if (path === '/') {
      response.writeHead(200, { 'content-type': 'text/html' }).end('<!doctype html><title>frames</title>');
    } else if (script !== undefined) {
      response.writeHead(200, { 'content-type': 'text/javascript' }).end(script);
    } else if (path.startsWith('/media/')) {
      this.answerMedia(request, response, decodeURIComponent(path.slice('/media/'.length)));
    } else {
      response.writeHead(404).end();
    }
  }

  private answerMedia(request: IncomingMessage, response: ServerResponse, name: string): void {
    if (this.offline) {
      request.socket.destroy();
      return;
    }
    if (this.status !== null) {
      response.writeHead(this.status).end();
      return;
    }
    const file = this.mediaFile(name);
    const size = statSync(file).size;
    const range = /^bytes=(\d+)-(\d*)$/.exec(request.headers.range ?? '');
    const start = range === null ? 0 : Number(range[1]);
    const end = range?.[2] ? Math.min(Number(range[2]), size - 1) : size - 1;
    if (start >= size) {
      response.writeHead(416, { 'content-range': `bytes */${size}` }).end();
      return;
    }
    response.writeHead(range === null ? 200 : 206, {
      'content-type': TYPES[extname(basename(name))] ?? 'application/octet-stream',
      'accept-ranges': 'bytes',
      'content-length': end - start + 1,
      ...(range === null ? {} : { 'content-range': `bytes ${start}-${end}/${size}` }),
    });
    const data = createReadStream(file, { start, end, highWaterMark: 1 << 16 });
    data.on('data', (chunk) => {
      this.bytesSent += chunk.length;
    });
    data.on('error', () => response.destroy());
    response.on('close', () => data.destroy());
    data.pipe(response);
  }
}

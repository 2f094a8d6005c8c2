import { once } from 'node:events';
import { createServer, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium, type Page } from '@playwright/test';
import { build } from 'esbuild';
import type { FilmPlan } from './scene';

/** Takes one frame: RGBA, lowest row first. */
export type FrameSink = (pixels: Buffer) => Promise<void>;

/** A headless Chromium that draws films, and the door its frames come back through. */
export interface Studio {
  readonly draw: (plan: FilmPlan, frames: readonly number[], sink: FrameSink) => Promise<void>;
  readonly close: () => Promise<void>;
}

export async function openStudio(executablePath = '/usr/bin/chromium'): Promise<Studio> {
  const bundle = await build({
    entryPoints: [fileURLToPath(new URL('./film-page.ts', import.meta.url))],
    bundle: true,
    write: false,
    format: 'iife',
    target: 'chrome120',
  });
  const script = bundle.outputFiles[0]?.text ?? '';
  let sink: FrameSink = () => Promise.resolve();
  const { server, address } = await openDoor((pixels) => sink(pixels));
  const browser = await chromium.launch({
    executablePath,
    args: [
      '--no-sandbox',
      '--headless',
      '--disable-background-networking',
      '--use-angle=swiftshader',
      '--enable-unsafe-swiftshader',
    ],
  });
  const page = await openPage(browser, address, script);
  return {
    draw: async (plan, frames, into) => {
      sink = into;
      await page.evaluate(([p, f, to]) => window.film(p, f, to), [plan, [...frames], address] as const);
    },
    close: async () => {
      await browser.close();
      server.close();
    },
  };
}

async function openPage(browser: Browser, address: string, script: string): Promise<Page> {
  const page = await browser.newPage();
  await page.goto(address);
  await page.addScriptTag({ content: script });
  return page;
}

async function openDoor(take: FrameSink): Promise<{ server: Server; address: string }> {
  const server = createServer((request, response) => {
    if (request.method !== 'POST') {
      response.setHeader('content-type', 'text/html').end('<!doctype html><title>film</title>');
      return;
    }
    body(request)
      .then(take)
      .then(
        () => response.end(),
        (error: unknown) => {
          console.error(error);
          response.writeHead(500).end();
        },
      );
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  return { server, address: `http://127.0.0.1:${port}/` };
}

async function body(request: IncomingMessage): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of request) parts.push(part as Buffer);
  return Buffer.concat(parts);
}

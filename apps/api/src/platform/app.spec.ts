import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Router } from 'express';
import { pino } from 'pino';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { createApp } from '../app';
import { TestBrowser } from './test-browser';
import { openTestClub, type TestClub } from './test-club';

let club: TestClub;
let webFolder: string;
beforeEach(async () => {
  webFolder = mkdtempSync(join(tmpdir(), 'stillstroke-web-'));
  writeFileSync(
    join(webFolder, 'index.html'),
    '<link rel="stylesheet" href="styles-ABCD1234.css"><st-root ngCspNonce="__CSP_NONCE__"></st-root>',
  );
  writeFileSync(join(webFolder, 'main-ABCD1234.js'), 'export {};');
  writeFileSync(join(webFolder, 'favicon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
  club = await openTestClub({ webFolder });
});
afterEach(() => {
  club.close();
  rmSync(webFolder, { recursive: true, force: true });
});

describe('the web app', () => {
  it('gets a fresh nonce in page and policy at every address of the app, and the page is not kept', async () => {
    const seen = new Set<string>();
    for (const path of ['/', '/squad', '/clips/5f0c6a0e-7a55-4b0e-9d0f-0d5c2f0a7c11']) {
      const page = await club.anonymous().get(path);
      expect(page.status).toBe(200);
      expect(page.get('Cache-Control')).toBe('no-store');
      const nonce = /ngCspNonce="([^"]+)"/.exec(page.text)?.[1] ?? '';
      expect(page.get('Content-Security-Policy')).toContain(`style-src 'self' 'nonce-${nonce}'`);
      seen.add(nonce);
    }
    expect(seen.size).toBe(3);
    expect(seen.has('__CSP_NONCE__')).toBe(false);
  });

  it('allows no inline script, no foreign host and no framing', async () => {
    const policy = (await club.anonymous().get('/')).get('Content-Security-Policy') ?? '';
    expect(policy).not.toMatch(/unsafe|\*|https?:/);
    expect(policy).toContain("script-src 'self';");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).toContain("worker-src 'self' blob:");
  });

  it('keeps hashed files for a year, others not unasked', async () => {
    const hashed = await club.anonymous().get('/main-ABCD1234.js');
    expect(hashed.get('Cache-Control')).toBe('public, max-age=31536000, immutable');
    expect((await club.anonymous().get('/favicon.svg')).get('Cache-Control')).toBe('no-cache');
  });

  it('does not answer a missing file with the page, nor leave its folder', async () => {
    expect((await club.anonymous().get('/main-GONE1234.js')).status).toBe(404);
    expect((await club.anonymous().get('/..%2f..%2fetc/passwd.txt')).status).toBe(404);
    expect((await club.anonymous().mutate('post', '/squad')).status).toBe(404);
  });

  it('says so when it is not built', async () => {
    const app = createApp(club.context, { webFolder: join(webFolder, 'nowhere') });
    const page = await new TestBrowser(app).get('/');
    expect(page.status).toBe(503);
    expect(page.text).toContain('npm run build');
  });
});

describe('the API', () => {
  it('answers its health', async () => {
    const answer = await club.anonymous().get('/api/health');
    expect(answer.body).toEqual({ status: 'ok', version: expect.stringMatching(/^\d+\.\d+\.\d+/) as string });
    expect(answer.get('Cache-Control')).toBe('no-store');
    expect(answer.get('X-Powered-By')).toBeUndefined();
  });

  it('answers an unknown call with a problem', async () => {
    const answer = await club.anonymous().get('/api/nothing');
    expect(answer.status).toBe(404);
    expect(answer.type).toBe('application/problem+json');
    expect(answer.body).toMatchObject({ code: 'not-found', status: 404 });
  });

  it.each([
    ['text', 'text/plain', '{"email":"a@b.example","password":"x"}', 415],
    ['a form', 'application/x-www-form-urlencoded', 'email=a&password=b', 415],
    ['multipart where JSON is due', 'multipart/form-data; boundary=x', '--x--', 415],
    ['broken JSON', 'application/json', '{"email":', 400],
    ['a bare word', 'application/json', '"hello"', 400],
    ['too much', 'application/json', JSON.stringify({ email: 'x'.repeat(70_000) }), 413],
  ])('refuses %s as a body', async (_case, type, body, status) => {
    const browser = club.anonymous();
    await browser.get('/api/health');
    const answer = await browser.mutate('post', '/api/auth/sign-in').set('Content-Type', type).send(body);
    expect(answer.status).toBe(status);
    expect(answer.body).toMatchObject({ code: 'bad-request' });
  });

  it('tells nothing of an unexpected error, and logs it without the values of the query', async () => {
    const lines: string[] = [];
    const log = pino({ level: 'debug' }, { write: (line: string) => void lines.push(line) });
    const failing = () => {
      const router = Router();
      router.get('/api/broken/:name', () => {
        club.context.sqlite.prepare('select * from nowhere where name = ?').get('secret-value');
      });
      return router;
    };
    const app = createApp({ ...club.context, log }, { routers: [failing], webFolder });
    const answer = await new TestBrowser(app).get('/api/broken/secret-name?token=secret-token');
    expect(answer.status).toBe(500);
    expect(answer.text).not.toMatch(/nowhere|secret/);
    expect(lines.join('')).toContain('/api/broken/:name');
    expect(lines.join('')).not.toMatch(/secret/);
  });
});

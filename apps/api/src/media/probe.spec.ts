import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { Probe } from './probe';
import { corpusFile } from './test-films';

describe('the process that looks into films', () => {
  const probe = new Probe();
  const folder = mkdtempSync(join(tmpdir(), 'stillstroke-probe-'));
  afterEach(() => {
    probe.close();
    rmSync(folder, { recursive: true, force: true });
  });

  const film = { kind: 'index', film: corpusFile('b-frames.mp4') } as const;

  it('is ended when a film stalls it, and the next film is looked into by another', async () => {
    // A pipe into which nobody writes: opening it waits for ever.
    const pipe = join(folder, 'film');
    execFileSync('mkfifo', [pipe]);
    const asked = await Promise.all([probe.ask({ kind: 'index', film: pipe }, 300), probe.ask(film, 60_000)]);
    expect(asked[0]).toEqual({ kind: 'failed', message: 'took too long' });
    expect(asked[1]).toMatchObject({ kind: 'index', index: { width: 160, height: 120 } });
  });

  it('says that there is no file rather than falling over', async () => {
    const answer = await probe.ask({ kind: 'index', film: '/nowhere/film' }, 60_000);
    expect(answer.kind).toBe('failed');
    expect((await probe.ask(film, 60_000)).kind).toBe('index');
  });
});

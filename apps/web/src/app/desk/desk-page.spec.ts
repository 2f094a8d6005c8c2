import { provideHttpClient } from '@angular/common/http';
import {
  HttpTestingController,
  provideHttpClientTesting,
  type TestRequest,
} from '@angular/common/http/testing';
import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Session } from '@stillstroke/contract/sessions';
import type { Mark } from '@stillstroke/contract/marks';
import { afterEach, describe, expect, it } from 'vitest';
import { Connection } from '../core/connection';
import { SignInState } from '../core/sign-in/sign-in-state';
import { pageFindings } from '../core/testing/page-findings';
import { DeskPage } from './desk-page';
import { ClipOpener } from './stage/clip-frames';
import { PaintedSource } from './stage/testing';
import { isComplete, type DeskMark } from './state/desk-mark';
import { markWith, testClip, testMarks, testStrokes, testTimesUs } from './state/testing';

const coach: SignedInUser = {
  id: '6a0f7a52-7c57-4a3b-9a5e-0c5f9f1c2d01',
  name: 'Owen Hale',
  email: 'coach@tarnvalley.example',
  role: 'coach',
  clubId: '6a0f7a52-7c57-4a3b-9a5e-0c5f9f1c2d02',
  clubName: 'Tarn Valley Swim Club',
  athleteId: null,
};

function saved(mark: DeskMark, version = 1): Mark {
  if (!isComplete(mark)) throw new Error('not complete');
  const none = { forearmDeg: 0, upperArmDeg: 0, elbowDeg: 0, elbowDropDeg: 0 };
  const { arm, frame, shoulder, elbow, wrist } = mark;
  const updatedAt = '2026-11-28T10:00:00.000Z';
  const facts = { angles: none, uncertaintyDeg: none, plumbAssumed: false, version, updatedAt };
  return { arm, frame, shoulder, elbow, wrist, ...facts };
}

const testSession: Session = {
  id: testClip.sessionId,
  athleteId: testClip.athleteId,
  athleteName: 'Ines Corrow',
  squadId: '6a0f7a52-7c57-4a3b-9a5e-0c5f9f1c2d03',
  squadName: 'Masters squad',
  date: '2026-11-28',
  place: null,
  note: null,
  clips: [],
  summary: { strokes: { left: 1, right: 1 }, verticalAt: { left: null, right: null } },
  deletedAt: null,
};

const problem = (status: number, code: string, current?: unknown) => ({
  type: 'about:blank',
  title: code,
  status,
  detail: 'In words.',
  code,
  ...(current !== undefined && { current }),
});

describe('DeskPage', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;

  afterEach(() => TestBed.resetTestingModule());

  /** Another user each time, so that nothing kept for one test is found by the next. */
  function begin(user: Partial<SignedInUser> = {}): SignedInUser {
    const person = { ...coach, id: crypto.randomUUID(), ...user };
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'clips/:clipId', component: DeskPage }], withComponentInputBinding()),
        { provide: ClipOpener, useValue: { open: () => Promise.resolve(new PaintedSource()) } },
        { provide: SignInState, useValue: { user: signal(person) } },
        { provide: Connection, useValue: { online: signal(true) } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    return person;
  }

  async function go(query = ''): Promise<void> {
    harness = await RouterTestingHarness.create();
    await harness.navigateByUrl(`/clips/${testClip.id}${query}`);
  }

  async function asked(method: string, url: string): Promise<TestRequest> {
    for (let i = 0; i < 200; i += 1) {
      const [found] = http.match((request) => request.method === method && request.urlWithParams === url);
      if (found) return found;
      await new Promise((resolve) => setTimeout(resolve, 5));
    }
    throw new Error(`nobody asked for ${method} ${url}`);
  }

  const clipUrl = `/api/clips/${testClip.id}`;

  async function load({
    clip = testClip,
    marks = testMarks,
  }: { clip?: Clip; marks?: readonly DeskMark[] } = {}) {
    (await asked('GET', clipUrl)).flush(clip);
    (await asked('GET', `${clipUrl}/frames`)).flush({ timestampsUs: testTimesUs, keyFrames: [0] });
    const strokes = testStrokes.map((stroke) => ({ ...stroke, clipId: clip.id, version: 1 }));
    (await asked('GET', `${clipUrl}/strokes`)).flush({ items: strokes, nextCursor: null });
    const items = marks.map((mark) => saved(mark));
    (await asked('GET', `${clipUrl}/marks`)).flush({ items, nextCursor: null });
    (await asked('GET', `${clipUrl}/scale`)).flush({ scale: null, version: 0 });
    await until(() => page().querySelector('st-stage .caption strong') !== null);
    (await asked('GET', `/api/sessions/${clip.sessionId}`)).flush(testSession);
    await settle();
  }

  const page = (): HTMLElement => harness.routeNativeElement ?? document.body;
  const text = (selector: string): string => page().querySelector(selector)?.textContent?.trim() ?? '';

  async function settle(): Promise<void> {
    // Not until it is stable: a request that a test leaves open would hold it for ever.
    for (let i = 0; i < 6; i += 1) await new Promise(requestAnimationFrame);
  }

  async function until(met: () => boolean): Promise<void> {
    for (let i = 0; i < 300 && !met(); i += 1) await new Promise((resolve) => setTimeout(resolve, 10));
    if (!met()) throw new Error('it did not come about');
  }

  function press(key: string, more: KeyboardEventInit = {}): void {
    const target = document.activeElement ?? document.body;
    target.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
  }

  function click(name: string): void {
    const button = [...page().querySelectorAll<HTMLElement>('button, [role="tab"]')].find(
      (one) => (one.getAttribute('aria-label') ?? one.textContent.trim()) === name,
    );
    if (!button) throw new Error(`no button ${name}`);
    button.click();
  }

  it('opens at the frame and arm that the address names, and follows in the address', async () => {
    begin();
    await go('?frame=74&arm=right');
    await load();
    expect(text('st-stage .caption')).toContain('Frame 74');
    expect(text('#reading-title')).toBe('Right forearm');
    press('ArrowRight', { shiftKey: true });
    press('1');
    await until(() => TestBed.inject(Router).url.includes('frame=84&arm=left'));
    expect(await pageFindings(page())).toEqual([]);
  });

  it('marks with the keyboard alone and saves each mark', async () => {
    begin();
    await go('?frame=200&arm=left');
    await load();
    page().querySelector<HTMLElement>('st-stage')?.focus();
    for (const way of ['ArrowUp', 'ArrowRight', 'ArrowDown']) {
      press(way, { altKey: true, shiftKey: true });
      press('Enter');
    }
    const request = await asked('PUT', `${clipUrl}/marks/left/200`);
    expect(request.request.body).toMatchObject({ version: 0 });
    await settle();
    expect(text('st-desk-bar .save')).toBe('Saving…');
    const mark = request.request.body as Pick<Mark, 'shoulder' | 'elbow' | 'wrist'>;
    const jointUncertaintyPx = testClip.jointUncertaintyPx;
    request.flush({ ...saved({ arm: 'left', frame: 200, ...mark }), jointUncertaintyPx });
    await until(() => text('st-desk-bar .save') === 'All marks saved');

    press('z', { ctrlKey: true });
    const removed = await asked('DELETE', `${clipUrl}/marks/left/200?version=1`);
    removed.flush(null, { status: 204, statusText: 'No Content' });
    await until(() => text('st-desk-bar .save').startsWith('Saved; 1 unfinished'));
  });

  it('shows a conflict with both versions, and overwrites only when the coach says so', async () => {
    begin();
    await go('?frame=74&arm=right');
    await load();
    press('Delete');
    const theirs = saved(markWith('right', 74, { upperArmDeg: 60, forearmDeg: 33 }), 4);
    const refusal = problem(409, 'changed-meanwhile', theirs);
    (await asked('DELETE', `${clipUrl}/marks/right/74?version=1`)).flush(refusal, {
      status: 409,
      statusText: 'Conflict',
    });
    await until(() => page().querySelector('st-conflicts') !== null);
    expect(text('st-conflicts dl')).toMatch(/Yours\s*removed\s*Theirs\s*forearm 33/);
    expect(text('st-desk-bar .save')).toContain('Changed by somebody else');
    expect(await pageFindings(page())).toEqual([]);
    click('Take theirs');
    await until(() => page().querySelector('st-conflicts') === null);
    expect(text('.headline')).toContain('33');
    expect(text('st-desk-bar .save')).toBe('All marks saved');
  });

  it('keeps what was not sent on the device, and sends it at the next visit', async () => {
    const person = begin();
    await go('?frame=74&arm=right');
    await load();
    press('Delete');
    (await asked('DELETE', `${clipUrl}/marks/right/74?version=1`)).flush(problem(401, 'not-signed-in'), {
      status: 401,
      statusText: 'Unauthorized',
    });
    await until(() => text('st-desk-bar .save').includes('sign in again'));

    TestBed.resetTestingModule();
    begin({ id: person.id });
    await go('?frame=74&arm=right');
    await load();
    expect(text('.headline')).toBe('–');
    (await asked('DELETE', `${clipUrl}/marks/right/74?version=1`)).flush(null, {
      status: 204,
      statusText: 'No Content',
    });
    await until(() => text('st-desk-bar .save') === 'All marks saved');
  });

  it('shows an athlete the readings and no tools', async () => {
    begin({ role: 'athlete' });
    await go('?frame=74&arm=right');
    await load();
    expect(text('.headline')).toContain('70.0°');
    const buttons = [...page().querySelectorAll('button')].map((one) => one.textContent.trim());
    for (const tool of ['Undo', 'Next to mark N', 'Set here']) expect(buttons).not.toContain(tool);
    press('Delete');
    press('e');
    await settle();
    expect(text('.headline')).toContain('70.0°');
    expect(page().querySelectorAll('[role="tab"]')).toHaveLength(3);
  });

  it('begins with the set-up where a clip has neither plumb nor marks, and lets it be skipped', async () => {
    begin();
    await go();
    await load({ clip: { ...testClip, plumb: null }, marks: [] });
    expect(text('st-set-up-panel h2')).toBe('Set-up');
    expect(await pageFindings(page())).toEqual([]);
    click('Skip for now');
    await until(() => text('#reading-title') !== '');
    expect(text('.caution')).toContain('plumb is assumed');
  });

  it('lists every mark, to be gone to and corrected by numbers', async () => {
    begin();
    await go();
    await load();
    click('Marks');
    await until(() => page().querySelectorAll('st-marks-list tbody tr').length === testMarks.length);
    click('Edit frame 74, right arm');
    await until(() => page().querySelector('fieldset') !== null);
    const field = page().querySelector<HTMLInputElement>('[aria-label="wrist, from the left"]');
    if (!field) throw new Error('no field');
    field.value = '712.5';
    field.dispatchEvent(new Event('change'));
    const request = await asked('PUT', `${clipUrl}/marks/right/74`);
    expect(request.request.body).toMatchObject({ wrist: { x: 712.5 }, version: 1 });
    expect(await pageFindings(page())).toEqual([]);
  });

  it('lists the strokes with their events', async () => {
    begin();
    await go('?frame=74&arm=right');
    await load();
    click('Strokes');
    await until(() => page().querySelectorAll('st-strokes-panel section').length === 2);
    click('Set here: Exit, First right stroke');
    await until(() => text('.said').includes('exit has to come after the catch'));
    expect(await pageFindings(page())).toEqual([]);
  });

  it('says in words why there is no Desk', async () => {
    begin();
    await go();
    (await asked('GET', clipUrl)).flush(problem(404, 'not-found'), { status: 404, statusText: 'Not Found' });
    await until(() => page().querySelector('st-problem-message') !== null);
    expect(text('st-problem-message')).toContain('no such clip, or it was deleted');
  });

  it('says that a clip is still being made ready', async () => {
    begin();
    await go();
    (await asked('GET', clipUrl)).flush({ ...testClip, status: 'converting' });
    await until(() => text('.message').includes('still being made ready'));
    click('Look again');
    await load();
    expect(text('st-stage .caption')).toContain('Frame 34');
  });
});

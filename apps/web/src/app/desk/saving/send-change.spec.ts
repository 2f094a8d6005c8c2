import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import type { SavedMark } from '@stillstroke/contract/marks';
import type { Scale } from '@stillstroke/contract/scale';
import { beforeEach, describe, expect, it } from 'vitest';
import { Api } from '../../core/api/api';
import { sourcesOf } from '../state/desk-stroke';
import { markWith, testClip, testStrokes } from '../state/testing';
import type { PendingChange, Wanted } from './pending-change';
import { ChangeSender } from './send-change';

const mine = markWith('left', 7, { upperArmDeg: 60, forearmDeg: 20 });
const theirs = markWith('left', 7, { upperArmDeg: 60, forearmDeg: 50 });
const wantedMark: Wanted = { kind: 'mark', arm: 'left', frame: 7, mark: mine };
const markUrl = `/api/clips/${testClip.id}/marks/left/7`;

const pending = (wanted: Wanted, base: number): PendingChange => ({
  id: 'x',
  owner: 'o',
  order: 1,
  thing: 't',
  wanted,
  base,
  tried: true,
});

const spread = { shoulder: 5, elbow: 4, wrist: 4 };

const saved = (mark: typeof mine, version: number): SavedMark => ({
  arm: 'left',
  frame: 7,
  shoulder: mark.shoulder ?? { x: 0, y: 0 },
  elbow: mark.elbow ?? { x: 0, y: 0 },
  wrist: mark.wrist ?? { x: 0, y: 0 },
  angles: { forearmDeg: 20, upperArmDeg: 60, elbowDeg: 140, elbowDropDeg: 0 },
  uncertaintyDeg: { forearmDeg: 1, upperArmDeg: 1, elbowDeg: 1, elbowDropDeg: 1 },
  plumbAssumed: false,
  version,
  updatedAt: '2026-05-04T09:00:00.000Z',
  jointUncertaintyPx: spread,
});

const problem = (status: number, code: string, current?: unknown) => ({
  type: 'about:blank',
  title: code,
  status,
  detail: 'Say what to do.',
  code,
  ...(current !== undefined && { current }),
});

describe('ChangeSender', () => {
  let http: HttpTestingController;
  let sender: ChangeSender;

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    sender = new ChangeSender(TestBed.inject(Api), testClip.id);
  });

  it('puts a mark with the version it was made on, and answers the new one', async () => {
    const result = sender.send(pending(wantedMark, 3));
    const request = http.expectOne({ method: 'PUT', url: markUrl });
    expect(request.request.body).toEqual({
      shoulder: mine.shoulder,
      elbow: mine.elbow,
      wrist: mine.wrist,
      version: 3,
    });
    request.flush(saved(mine, 4));
    expect(await result).toEqual({ kind: 'done', version: 4 });
  });

  it('passes on with which spread the server reads the clip from then on', async () => {
    const told: unknown[] = [];
    sender = new ChangeSender(TestBed.inject(Api), testClip.id, (now) => told.push(now));
    void sender.send(pending(wantedMark, 3));
    http.expectOne(markUrl).flush(saved(mine, 4));
    await vi.waitFor(() => expect(told).toEqual([spread]));
    void sender.send(pending({ ...wantedMark, mark: null }, 4));
    http.expectOne(`${markUrl}?version=4`).flush(null, { status: 204, statusText: 'No Content' });
    (await nextRequest(http, `/api/clips/${testClip.id}`)).flush(testClip);
    await vi.waitFor(() => expect(told).toEqual([spread, testClip.jointUncertaintyPx]));
  });

  it('shows what somebody else made of it meanwhile', async () => {
    const result = sender.send(pending(wantedMark, 3));
    const { jointUncertaintyPx: _, ...there } = saved(theirs, 5);
    const refusal = problem(409, 'changed-meanwhile', there);
    http.expectOne(markUrl).flush(refusal, { status: 409, statusText: 'Conflict' });
    expect(await result).toMatchObject({
      kind: 'conflict',
      theirs: { version: 5, wanted: { mark: theirs } },
    });
  });

  it('takes its own change coming back for an acknowledgement that was lost', async () => {
    const stroke = testStrokes[0];
    if (!stroke) throw new Error('no stroke');
    const result = sender.send(pending({ kind: 'stroke', id: stroke.id, stroke }, 1));
    const current = { ...stroke, ...sourcesOf(stroke), clipId: testClip.id, version: 2 };
    const request = http.expectOne({ method: 'PATCH', url: `/api/strokes/${stroke.id}` });
    request.flush(problem(409, 'changed-meanwhile', current), { status: 409, statusText: 'Conflict' });
    expect(await result).toEqual({ kind: 'done', version: 2 });
  });

  it('puts a known distance, and reads what is there', async () => {
    const distance = { metres: 5, uncertaintyM: 0.05, fromFrame: 3, toFrame: 90 };
    const result = sender.send(pending({ kind: 'distance', distance }, 1));
    const request = http.expectOne({ method: 'PUT', url: `/api/clips/${testClip.id}/distance` });
    expect(request.request.body).toEqual({ distance });
    request.flush({ ...testClip, distance });
    expect(await result).toEqual({ kind: 'done', version: 1 });
    const theirs = sender.fetchTheirs({ kind: 'distance', distance: null });
    http.expectOne(`/api/clips/${testClip.id}`).flush({ ...testClip, distance });
    expect(await theirs).toEqual({ wanted: { kind: 'distance', distance }, version: 1 });
  });

  it('says of a stroke what its events were chosen by', () => {
    const stroke = testStrokes[0];
    if (!stroke) throw new Error('no stroke');
    void sender.send(
      pending({ kind: 'stroke', id: stroke.id, stroke: { ...stroke, exitSource: 'wrist-proxy' } }, 1),
    );
    const request = http.expectOne({ method: 'PATCH', url: `/api/strokes/${stroke.id}` });
    expect(request.request.body).toMatchObject({ entrySource: 'hand-seen', exitSource: 'wrist-proxy' });
  });

  it('creates a stroke the server does not have under the id chosen here', () => {
    const stroke = testStrokes[1];
    if (!stroke) throw new Error('no stroke');
    void sender.send(pending({ kind: 'stroke', id: stroke.id, stroke }, 0));
    const request = http.expectOne({ method: 'POST', url: `/api/clips/${testClip.id}/strokes` });
    expect(request.request.body).toMatchObject({ id: stroke.id, arm: 'right', entry: 50, nextEntry: 130 });
  });

  it('calls a mark that is gone already taken away', async () => {
    const result = sender.send(pending({ ...wantedMark, mark: null }, 3));
    http
      .expectOne({ method: 'DELETE', url: `${markUrl}?version=3` })
      .flush(problem(404, 'not-found'), { status: 404, statusText: 'Not Found' });
    await Promise.resolve();
    (await nextRequest(http, `/api/clips/${testClip.id}/marks`)).flush({ items: [], nextCursor: null });
    expect(await result).toEqual({ kind: 'done', version: 0 });
  });

  it('sends a scale with its version, brings the other one in a conflict, and takes one away that is gone', async () => {
    const scale: Scale = {
      kind: 'length',
      plane: 'swimmer',
      from: { x: 1, y: 2 },
      to: { x: 300, y: 2 },
      metres: 1,
      uncertaintyM: 0,
      check: null,
    };
    const scaleUrl = `/api/clips/${testClip.id}/scale`;
    const sent = sender.send(pending({ kind: 'scale', scale }, 2));
    const request = http.expectOne({ method: 'PUT', url: scaleUrl });
    expect(request.request.body).toEqual({ scale, version: 2 });
    const other = { scale: { ...scale, metres: 2 }, version: 5 };
    request.flush(problem(409, 'changed-meanwhile', other), { status: 409, statusText: 'Conflict' });
    expect(await sent).toEqual({
      kind: 'conflict',
      theirs: { wanted: { kind: 'scale', scale: other.scale }, version: 5 },
    });
    const gone = sender.send(pending({ kind: 'scale', scale: null }, 5));
    http
      .expectOne({ method: 'DELETE', url: `${scaleUrl}?version=5` })
      .flush(problem(404, 'not-found'), { status: 404, statusText: 'Not Found' });
    await Promise.resolve();
    (await nextRequest(http, scaleUrl)).flush({ scale: null, version: 0 });
    expect(await gone).toEqual({ kind: 'done', version: 0 });
  });

  it('tells a clip that is gone from a thing that is gone', async () => {
    const result = sender.send(pending(wantedMark, 0));
    http.expectOne(markUrl).flush(problem(404, 'not-found'), { status: 404, statusText: 'Not Found' });
    (await nextRequest(http, `/api/clips/${testClip.id}/marks`)).flush(problem(404, 'not-found'), {
      status: 404,
      statusText: 'Not Found',
    });
    expect(await result).toEqual({ kind: 'stopped', why: 'gone' });
  });

  for (const [status, code, expected] of [
    [401, 'not-signed-in', { kind: 'stopped', why: 'signed-out' }],
    [403, 'forbidden', { kind: 'stopped', why: 'forbidden' }],
    [422, 'joints-coincide', { kind: 'refused', words: 'Say what to do.' }],
    [503, 'internal', { kind: 'later' }],
    [429, 'too-many-attempts', { kind: 'later' }],
  ] as const) {
    it(`answers ${expected.kind} to ${status}`, async () => {
      const result = sender.send(pending(wantedMark, 0));
      http.expectOne(markUrl).flush(problem(status, code), { status, statusText: code });
      expect(await result).toEqual(expected);
    });
  }

  it('sends again later when the line breaks', async () => {
    const result = sender.send(pending(wantedMark, 0));
    http.expectOne(markUrl).error(new ProgressEvent('error'), { status: 0 });
    expect(await result).toEqual({ kind: 'later' });
  });
});

async function nextRequest(http: HttpTestingController, url: string) {
  for (let i = 0; i < 50; i += 1) {
    const [found] = http.match(url);
    if (found) return found;
    await new Promise((resolve) => setTimeout(resolve, 0));
  }
  throw new Error(`nobody asked for ${url}`);
}

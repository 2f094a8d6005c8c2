import { HttpErrorResponse, HttpEventType, HttpResponse, type HttpEvent } from '@angular/common/http';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { Observable, Subject } from 'rxjs';
import type { FilmFields } from './film-fields';
import { UploadQueue, type FilmUpload, type QueueOptions } from './upload-queue';

const usual: FilmFields = { view: 'side-underwater', travel: 'right', stroke: 'full', captureRateFactor: 1 };
const film = (name: string, size = 1000) => new File([new Uint8Array(size)], name, { type: 'video/mp4' });
const refusal = (code: string, status: number) =>
  new HttpErrorResponse({
    status,
    error: { type: 'about:blank', title: code, status, detail: `Because ${code}.`, code },
  });

/** A server whose every answer the test gives. */
class Server {
  readonly sent: { file: File; fields: FilmFields; answer: Subject<HttpEvent<Clip>>; closed: boolean }[] = [];
  readonly saved: { id: string; changes: Partial<FilmFields>; answer: Subject<Clip> }[] = [];

  send(file: File, fields: FilmFields) {
    const one = { file, fields, answer: new Subject<HttpEvent<Clip>>(), closed: false };
    this.sent.push(one);
    const answer = one.answer.asObservable();
    return new Observable<HttpEvent<Clip>>((listener) => {
      const open = answer.subscribe(listener);
      return () => {
        one.closed = true;
        open.unsubscribe();
      };
    });
  }

  save(id: string, changes: Partial<FilmFields>) {
    const answer = new Subject<Clip>();
    this.saved.push({ id, changes, answer });
    return answer;
  }

  progress(at: number, loaded: number, total: number) {
    this.sent[at]?.answer.next({ type: HttpEventType.UploadProgress, loaded, total });
  }

  finish(at: number) {
    const one = this.sent[at];
    const clip = { id: `clip-${at}`, ...one?.fields } as Clip;
    one?.answer.next(new HttpResponse({ status: 201, body: clip }));
    one?.answer.complete();
  }
}

describe('UploadQueue', () => {
  let server: Server;
  let queue: UploadQueue;
  let arrived: Clip[];

  function make(options: Partial<QueueOptions> = {}) {
    server = new Server();
    arrived = [];
    queue = new UploadQueue(server, {
      atATime: 2,
      startsAtOnce: true,
      arrived: (clip) => arrived.push(clip),
      ...options,
    });
  }

  const states = () => queue.uploads().map((upload) => upload.state());
  function at(index: number): FilmUpload {
    const upload = queue.uploads()[index];
    if (!upload) throw new Error(`no upload ${index}`);
    return upload;
  }

  beforeEach(() => make());

  it('sends two at a time, in order', () => {
    queue.add([film('a'), film('b'), film('c')], usual);
    expect(states()).toEqual(['sending', 'sending', 'waiting']);
    server.finish(1);
    expect(states()).toEqual(['sending', 'done', 'sending']);
    expect(server.sent.map(({ file }) => file.name)).toEqual(['a', 'b', 'c']);
    expect(queue.unfinished()).toBe(2);
  });

  it('follows the bytes, and says when only the server’s reading is left', () => {
    queue.add([film('a', 2000)], usual);
    server.progress(0, 1100, 2200);
    expect(at(0).sentBytes()).toBe(1000);
    expect(at(0).state()).toBe('sending');
    server.progress(0, 2200, 2200);
    expect(at(0).state()).toBe('reading');
  });

  it('sends along what was said before the start and saves what is said after it', () => {
    make({ atATime: 1 });
    queue.add([film('a'), film('b')], usual);
    queue.say(at(1), { travel: 'left' });
    queue.say(at(0), { view: 'deck' });
    server.finish(0);
    expect(server.saved[0]).toMatchObject({ id: 'clip-0', changes: { view: 'deck' } });
    expect(at(0).state()).toBe('saving');
    expect(server.sent[1]?.fields.travel).toBe('left');
    server.finish(1);
    expect(server.saved).toHaveLength(1);
    expect(at(1).state()).toBe('done');
  });

  it('saves again what is said while it saves, and what is said when all is done', () => {
    queue.add([film('a')], usual);
    queue.say(at(0), { view: 'deck' });
    server.finish(0);
    queue.say(at(0), { stroke: 'drill' });
    expect(server.saved).toHaveLength(1);
    server.saved[0]?.answer.next({ id: 'clip-0', ...usual, view: 'deck' } as Clip);
    expect(server.saved[1]?.changes).toEqual({ stroke: 'drill' });
    server.saved[1]?.answer.next({ id: 'clip-0', ...usual, view: 'deck', stroke: 'drill' } as Clip);
    expect(at(0).state()).toBe('done');
    queue.say(at(0), { travel: 'left' });
    expect(server.saved[2]?.changes).toEqual({ travel: 'left' });
    expect(arrived).toHaveLength(3);
  });

  it('keeps the clip and gives the reason when a later word cannot be saved', () => {
    queue.add([film('a')], usual);
    queue.say(at(0), { view: 'deck' });
    server.finish(0);
    server.saved[0]?.answer.error(refusal('forbidden', 403));
    expect(at(0).state()).toBe('done');
    expect(at(0).problem()?.detail).toBe('Because forbidden.');
    expect(at(0).fields().view).toBe('deck');
  });

  it('gives the server’s reason for a refusal, lets the next go, and sends it again on demand', () => {
    make({ atATime: 1 });
    queue.add([film('holiday.txt'), film('b')], usual);
    server.sent[0]?.answer.error(refusal('not-a-video', 422));
    expect(states()).toEqual(['refused', 'sending']);
    expect(at(0).problem()?.code).toBe('not-a-video');
    server.finish(1);
    queue.retry(at(0));
    expect(at(0).state()).toBe('sending');
    expect(at(0).problem()).toBeNull();
    expect(server.sent).toHaveLength(3);
  });

  it('stops the request of a cancelled file and lets the next go', () => {
    make({ atATime: 1 });
    queue.add([film('a'), film('b')], usual);
    queue.cancel(at(0));
    expect(server.sent[0]?.closed).toBe(true);
    expect(states()).toEqual(['cancelled', 'sending']);
    queue.putAway(at(0));
    expect(queue.uploads().map(({ file }) => file.name)).toEqual(['b']);
  });

  it('does not put away what is under way, nor cancel what is there', () => {
    queue.add([film('a')], usual);
    queue.putAway(at(0));
    expect(queue.uploads()).toHaveLength(1);
    server.finish(0);
    queue.cancel(at(0));
    expect(at(0).state()).toBe('done');
  });

  it('holds files until told to send them', () => {
    make({ startsAtOnce: false });
    queue.add([film('a'), film('b')], usual);
    expect(server.sent).toHaveLength(0);
    expect(queue.held()).toBe(2);
    queue.say(at(1), { stroke: 'drill' });
    queue.sendHeld();
    expect(server.sent.map(({ fields }) => fields.stroke)).toEqual(['full', 'drill']);
  });

  it('stops everything when the page goes', () => {
    queue.add([film('a'), film('b'), film('c')], usual);
    queue.stopAll();
    expect(states()).toEqual(['cancelled', 'cancelled', 'cancelled']);
    expect(server.sent.map(({ closed }) => closed)).toEqual([true, true]);
    expect(queue.unfinished()).toBe(0);
  });
});

import { HttpEventType } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { ids, madeClip, madeSession } from '../core/testing/made';
import { pageFindings } from '../core/testing/page-findings';
import { athlete, coach, PageTest } from '../core/testing/page-test';
import { FilmsInHand } from './films-in-hand';
import { SessionPage } from './session-page';

const address = `/sessions/${ids.session}`;
const call = `/api/sessions/${ids.session}`;
const film = (name: string) => new File([new Uint8Array(2000)], name, { type: 'video/mp4' });

describe('SessionPage', () => {
  let test: PageTest;

  async function open(session = madeSession(), user = coach) {
    window.localStorage.clear();
    test = await PageTest.open('sessions/:sessionId', SessionPage, address, user);
    await test.answer('GET', call, session);
    const none = { items: [], nextCursor: null, total: 0, unread: 0 };
    await test.answer('GET', `/api/athletes/${session.athleteId}/reviews`, none);
  }

  async function choose(...names: string[]) {
    const field = test.element.querySelector<HTMLInputElement>('input[type=file]');
    const chosen = new DataTransfer();
    for (const name of names) chosen.items.add(film(name));
    if (field) field.files = chosen.files;
    field?.dispatchEvent(new Event('change'));
    await test.settle();
  }

  it('uploads a chosen file, shows how far it is, and puts the clip on the page', async () => {
    await open();
    expect(test.text).toContain('No clip yet');
    await choose('lane-four.mp4');
    const request = await test.request('POST', `${call}/clips`);
    const form = request.request.body as FormData;
    expect([...form.keys()]).toEqual(['view', 'travel', 'stroke', 'captureRateFactor', 'video']);
    request.event({ type: HttpEventType.UploadProgress, loaded: 1000, total: 2000 });
    await test.settle();
    expect(test.text).toContain('50 % of 2 kB');
    request.flush(madeClip(), { status: 201, statusText: 'Created' });
    await test.settle();
    expect(test.text).toContain('One clip');
    expect(test.text).toContain('1 488 frames · 24.8 s · 60 frames a second · 1920 × 1080 · H.264 · 38 MB');
  });

  it('saves what is said of a film while it uploads, and assumes it of the next', async () => {
    await open();
    await choose('lane-four.mp4');
    const request = await test.request('POST', `${call}/clips`);
    const [view] = await test.loader.getAllHarnesses(MatSelectHarness);
    await view?.open();
    const options = await view?.getOptions({ text: 'Side, above water' });
    await options?.[0]?.click();
    request.flush(madeClip(), { status: 201, statusText: 'Created' });
    const saved = await test.answer('PATCH', `/api/clips/${ids.clip}`, madeClip({ view: 'side-above' }));
    expect(saved.request.body).toEqual({ view: 'side-above' });
    await choose('next.mp4');
    const next = await test.request('POST', `${call}/clips`);
    expect((next.request.body as FormData).get('view')).toBe('side-above');
  });

  it('says where a file is that is there already, and offers no second try', async () => {
    await open();
    await choose('lane-four.mp4');
    await test.refuse('POST', `${call}/clips`, 409, 'duplicate-clip', {
      current: { clipId: ids.otherClip, sessionId: ids.otherSession, sessionDate: '2026-11-14' },
    });
    const links = [...test.element.querySelectorAll('.reason a')].map((link) => link.getAttribute('href'));
    expect(links).toEqual([`/clips/${ids.otherClip}`, `/sessions/${ids.otherSession}`]);
    expect(test.text).not.toContain('Send again');
  });

  it('sends a refused file again', async () => {
    await open();
    await choose('notes.txt');
    await test.refuse('POST', `${call}/clips`, 422, 'not-a-video');
    expect(test.text).toContain('Refused: not-a-video.');
    test.press('Send again: notes.txt');
    await test.request('POST', `${call}/clips`);
  });

  it('lets an athlete say what a film shows before it goes, since only a coach may change it later', async () => {
    await open(madeSession(), athlete);
    await choose('a.mp4', 'b.mp4');
    test.server.expectNone(`${call}/clips`);
    test.press('Send 2 clips');
    const requests = await vi.waitFor(() => {
      const found = test.server.match(`${call}/clips`);
      expect(found).toHaveLength(2);
      return found;
    });
    expect(requests.map(({ request }) => request.method)).toEqual(['POST', 'POST']);
    expect(test.element.textContent).not.toContain('Delete');
  });

  it('takes up the files that were dropped before there was a session', async () => {
    test = await PageTest.open('sessions/:sessionId', SessionPage, address, coach);
    TestBed.inject(FilmsInHand).hold([film('dropped.mp4')]);
    await test.answer('GET', call, madeSession());
    const request = await test.request('POST', `${call}/clips`);
    expect(((request.request.body as FormData).get('video') as File).name).toBe('dropped.mp4');
  });

  it('keeps the page and its uploads when reading the session again fails', async () => {
    await open(madeSession({ clips: [madeClip({ status: 'converting' })] }));
    await choose('b.mp4');
    const upload = await test.request('POST', `${call}/clips`);
    const again = await vi.waitFor(() => test.server.expectOne(call), { timeout: 5000 });
    again.flush(null, { status: 500, statusText: 'no' });
    await test.settle();
    expect(upload.cancelled).toBe(false);
    expect(test.text).toContain('b.mp4');
  });

  it('deletes a clip by its name and brings it back', async () => {
    await open(madeSession({ clips: [madeClip()] }));
    test.press('More about lane-four.mp4');
    await test.settle();
    test.press('Delete');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    expect(await dialog.getTitleText()).toBe('Delete lane-four.mp4?');
    test.press('Delete the clip');
    await test.answer('DELETE', `/api/clips/${ids.clip}`, {
      undoUntil: new Date(Date.now() + 60_000).toISOString(),
    });
    await test.answer('GET', call, madeSession());
    expect(test.text).toContain('Recently deleted');
    test.press('Undo');
    await test.answer('POST', `/api/clips/${ids.clip}/restore`, madeClip());
    await test.answer('GET', call, madeSession({ clips: [madeClip()] }));
    expect(test.text).toContain('One clip');
    expect(test.text).not.toContain('Recently deleted');
  });

  it('says that a clip is cut off, being converted, or could not be', async () => {
    await open(
      madeSession({
        clips: [
          madeClip({ cutOff: true }),
          madeClip({ id: ids.otherClip, name: 'phone.mov', status: 'failed' }),
        ],
      }),
    );
    expect(test.text).toContain('The file ends in the middle');
    expect(test.text).toContain('could not be converted');
  });

  it('has nothing for axe to find, with clips and with files under way', async () => {
    await open(madeSession({ clips: [madeClip({ cutOff: true })], note: 'Breathing every three.' }));
    await choose('b.mp4');
    await test.request('POST', `${call}/clips`);
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

import type { Target } from '@stillstroke/contract/targets';
import { ids } from '../core/testing/made';
import { athlete, coach, PageTest } from '../core/testing/page-test';
import { AthletePage } from './athlete-page';

const call = `/api/athletes/${ids.athlete}`;
const ines = {
  id: ids.athlete,
  name: 'Ines Corrow',
  squadId: ids.squad,
  squadName: 'Masters squad',
  lastSession: null,
  sessionCount: 0,
  clipsToMark: 0,
  verticalAt: { left: null, right: null },
  deactivated: false,
};
const early: Target = {
  id: '00000000-0000-4000-8000-000000000077',
  athleteId: ids.athlete,
  measure: 'verticalAt',
  arm: 'left',
  low: null,
  high: 0.4,
  words: 'fingers down early',
  setBy: 'Owen Hale',
  setAt: '2026-06-01T10:00:00.000Z',
  version: 3,
};

describe('TargetsCard', () => {
  let test: PageTest;

  async function open(user = coach, items: Target[] = [early]) {
    test = await PageTest.open('athletes/:athleteId', AthletePage, `/athletes/${ids.athlete}`, user);
    await test.answer('GET', call, ines);
    await test.answer('GET', `${call}/targets`, { items, nextCursor: null });
  }
  const card = () => test.element.querySelector('st-targets-card');
  const field = (name: string) =>
    document.querySelector<HTMLInputElement>(`mat-dialog-container [formControlName="${name}"]`);
  const type = (name: string, text: string) => {
    const input = field(name);
    if (!input) throw new Error(`no field ${name}`);
    input.value = text;
    input.dispatchEvent(new Event('input'));
  };
  const openDialog = async (words: string) => {
    test.press(words);
    await vi.waitFor(() => expect(field('words')).not.toBeNull());
  };

  it('shows band, arm, words and who set it; to the athlete without a way to change it', async () => {
    await open(athlete);
    const text = card()?.textContent?.replace(/\s+/g, ' ') ?? '';
    for (const words of ['Vertical at up to 40 %', 'left arm', '“fingers down early”', 'Set by Owen Hale'])
      expect(text).toContain(words);
    expect(card()?.querySelector('button')).toBeNull();
  });

  it('offers the first third as common practice, taken only when chosen, and editable', async () => {
    await open(coach, []);
    expect(card()?.textContent).toContain('None set');
    await openDialog('Set a target');
    expect([field('to')?.value, field('words')?.value]).toEqual(['', '']);
    test.press('Fill in');
    expect(field('to')?.value).toBe('33.3');
    expect(field('words')?.value).toContain('common practice, no published source');
    type('to', '35');
    test.press('Save');
    const sent = await test.answer('POST', `${call}/targets`, { ...early, high: 0.35 });
    expect(sent.request.body).toMatchObject({ measure: 'verticalAt', arm: 'both', low: null, high: 0.35 });
    await test.answer('GET', `${call}/targets`, { items: [{ ...early, high: 0.35 }], nextCursor: null });
    expect(card()?.textContent).toContain('up to 35 %');
  });

  it('shows what somebody else saved meanwhile, and saves over it only when told again', async () => {
    await open();
    await openDialog('Change the target: Vertical at, left arm');
    expect(field('to')?.value).toBe('40');
    type('words', 'sooner');
    test.press('Save');
    const current = { ...early, high: 0.5, words: 'by half', version: 4 };
    await test.refuse('PATCH', `/api/targets/${early.id}`, 409, 'changed-meanwhile', { current });
    const alert = () => document.querySelector('mat-dialog-container [role=alert]')?.textContent;
    await vi.waitFor(() => expect(alert()).toContain('Now there: up to 50 %, “by half”'));
    test.press('Save');
    const sent = await test.answer('PATCH', `/api/targets/${early.id}`, { ...early, version: 5 });
    expect(sent.request.body).toEqual({ low: null, high: 0.4, words: 'sooner', version: 4 });
  });

  it('deletes at once and brings back', async () => {
    await open();
    test.press('Delete the target: Vertical at, left arm');
    await test.answer('DELETE', `/api/targets/${early.id}`, { undoUntil: '2099-01-01T00:00:00.000Z' });
    await test.answer('GET', `${call}/targets`, { items: [], nextCursor: null });
    test.press('Undo');
    await test.answer('POST', `/api/targets/${early.id}/restore`, early);
    await test.answer('GET', `${call}/targets`, { items: [early], nextCursor: null });
    expect(card()?.textContent).toContain('up to 40 %');
  });
});

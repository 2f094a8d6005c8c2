import { MatSlideToggleHarness } from '@angular/material/slide-toggle/testing';
import type { SwitchableMail } from '@stillstroke/contract/mail';
import { pageFindings } from '../core/testing/page-findings';
import { athlete, PageTest } from '../core/testing/page-test';
import { MailPage } from './mail-page';

const wishes = (off: SwitchableMail[] = []) => ({
  address: 'athlete@tarnvalley.example',
  kinds: (['review-sent', 'question', 'answer', 'promise-reminder'] as const).map((kind) => ({
    kind,
    on: !off.includes(kind),
  })),
});
const toggles = () => [...document.querySelectorAll<HTMLButtonElement>('mat-slide-toggle button')];

describe('MailPage', () => {
  let test: PageTest;

  async function open(off: SwitchableMail[] = []) {
    test = await PageTest.open('mail', MailPage, '/mail', athlete);
    await test.answer('GET', '/api/mail-wishes', wishes(off));
  }

  it('shows what is on and off, and that mails about the account always come', async () => {
    await open(['answer']);
    const switches = await test.loader.getAllHarnesses(MatSlideToggleHarness);
    expect(await Promise.all(switches.map((each) => each.isChecked()))).toEqual([true, true, false, true]);
    expect(test.text).toContain('athlete@tarnvalley.example');
    expect(test.text.match(/always on/g)).toHaveLength(2);
  });

  it('switches one kind off as its switch is moved', async () => {
    await open();
    toggles()[2]?.click();
    const sent = await test.answer('PUT', '/api/mail-wishes/answer', wishes(['answer']));
    expect(sent.request.body).toEqual({ on: false });
    expect(toggles()[2]?.getAttribute('aria-checked')).toBe('false');
  });

  it('moves the switch back and says why when that was refused', async () => {
    await open();
    toggles()[0]?.click();
    await test.refuse('PUT', '/api/mail-wishes/review-sent', 500, 'internal');
    expect(toggles()[0]?.getAttribute('aria-checked')).toBe('true');
    await vi.waitFor(() => expect(document.body.textContent).toContain('Refused: internal.'));
  });

  it('has nothing for axe to find', async () => {
    await open();
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

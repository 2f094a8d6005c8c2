import { MatInputHarness } from '@angular/material/input/testing';
import { pageFindings } from '../core/testing/page-findings';
import { PageTest } from '../core/testing/page-test';
import { ForgotPage } from './forgot-page';

describe('ForgotPage', () => {
  let test: PageTest;

  async function openAndAsk(email: string) {
    test = await PageTest.open('sign-in/forgot', ForgotPage, '/sign-in/forgot', null);
    await (await test.loader.getHarness(MatInputHarness)).setValue(email);
    test.press('Send me a link');
  }

  it('says that a mail comes if there is such an account, and not whether there is', async () => {
    await openAndAsk('coach@tarnvalley.example');
    const sent = await test.answer('POST', '/api/auth/password-wish', null);
    expect(sent.request.body).toEqual({ email: 'coach@tarnvalley.example' });
    expect(test.text).toContain('If coach@tarnvalley.example belongs to an account');
    expect(await pageFindings(test.element)).toEqual([]);
  });

  it('says when there were too many', async () => {
    await openAndAsk('coach@tarnvalley.example');
    await test.refuse('POST', '/api/auth/password-wish', 429, 'too-many-attempts');
    expect(test.element.querySelector('[role=alert]')?.textContent).toContain('too-many-attempts');
  });

  it('sends nothing that is no address', async () => {
    await openAndAsk('coach');
    test.server.expectNone('/api/auth/password-wish');
    await test.settle();
    expect(test.text).toContain('Give the e-mail address of your account.');
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

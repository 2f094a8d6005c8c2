import { MatInputHarness } from '@angular/material/input/testing';
import { pageFindings } from '../core/testing/page-findings';
import { coach, PageTest } from '../core/testing/page-test';
import { NewPasswordPage } from './new-password-page';

const path = '/api/password-resets/abc';

describe('NewPasswordPage', () => {
  let test: PageTest;

  async function open() {
    test = await PageTest.open('new-password/:token', NewPasswordPage, '/new-password/abc', null);
  }

  async function give(password: string) {
    await test.answer('GET', path, { name: coach.name, email: coach.email });
    await (await test.loader.getHarness(MatInputHarness.with({ label: 'New password' }))).setValue(password);
    test.press('Set the password and go in');
  }

  it('sets the password and goes to where the person’s work starts', async () => {
    await open();
    await give('seven herons over weir');
    const sent = await test.answer('POST', path, { user: coach });
    expect(sent.request.body).toEqual({ password: 'seven herons over weir' });
    await vi.waitFor(() => expect(test.url).toBe('/squad'));
  });

  it('shows why a password is refused, and sends no short one', async () => {
    await open();
    await give('short');
    test.server.expectNone(path);
    await (
      await test.loader.getHarness(MatInputHarness.with({ label: 'New password' }))
    ).setValue('password1234');
    test.press('Set the password and go in');
    await test.refuse('POST', path, 400, 'weak-password');
    expect(test.element.querySelector('[role=alert]')?.textContent).toContain('weak-password');
    expect(await pageFindings(test.element)).toEqual([]);
  });

  it('says what to do when the link is spent', async () => {
    await open();
    await test.refuse('GET', path, 404, 'password-link-spent');
    expect(test.text).toContain('This link has been used or has run out');
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

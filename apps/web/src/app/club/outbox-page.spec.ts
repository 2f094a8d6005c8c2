import { MatDialogHarness } from '@angular/material/dialog/testing';
import type { OutboxMail } from '@stillstroke/contract/mail';
import { pageFindings } from '../core/testing/page-findings';
import { admin, PageTest } from '../core/testing/page-test';
import { OutboxPage } from './outbox-page';

const mail: OutboxMail = {
  id: 'm1',
  kind: 'invitation',
  to: { name: 'Owen Hale', address: 'owen@tarnvalley.example' },
  status: 'sent',
  attempts: 1,
  nextAttemptAt: null,
  reason: null,
  createdAt: '2026-11-28T10:00:00.000Z',
  finishedAt: '2026-11-28T10:00:02.000Z',
};
const refused: OutboxMail = {
  ...mail,
  id: 'm2',
  kind: 'answer',
  to: { name: 'Ines Corrow', address: 'ines@tarnvalley.example' },
  status: 'given-up',
  reason: 'The mail server refused the address: 550 No such mailbox',
};

describe('OutboxPage', () => {
  let test: PageTest;

  async function open(items: OutboxMail[], by: 'file' | 'server', address = '/club/outbox') {
    test = await PageTest.open('club/outbox', OutboxPage, address, admin);
    const delivery = { by, linksTo: 'https://strokes.example' };
    await test.answer('GET', '/api/outbox', { items, nextCursor: null, total: items.length, delivery });
  }

  it('opens a mail that was written to a file, with its HTML as text', async () => {
    await open([mail], 'file');
    expect(test.text).toContain('No mail server is set');
    expect(test.text).toContain('Links in them lead to https://strokes.example');
    test.press('Open the mail to Owen Hale');
    const written = {
      subject: 'Your invitation to Stillstroke',
      text: 'Hello Owen Hale,',
      html: '<p onclick="x()">Hello <b>Owen</b></p>',
      file: 'outbox/m1.eml',
    };
    await test.answer('GET', '/api/outbox/m1', { ...mail, written });
    const dialog = await test.overlays.getHarness(MatDialogHarness);
    expect(await dialog.getTitleText()).toBe('Your invitation to Stillstroke');
    expect(await dialog.getText()).toContain('Hello Owen Hale,');
    const source = document.querySelector('st-mail-text-dialog details pre');
    expect(source?.textContent).toBe(written.html);
    expect(source?.children).toHaveLength(0);
  });

  it('says why a mail was given up and tries it again; texts stay closed with a server', async () => {
    await open([mail, refused], 'server');
    expect(test.text).toContain('550 No such mailbox');
    expect(test.text).not.toContain('Open');
    test.press('Try again: the mail to Ines Corrow');
    await test.answer('POST', '/api/outbox/m2/retry', { ...refused, status: 'waiting' });
    await test.request('GET', '/api/outbox');
  });

  it('says how a first mail comes about where there is none', async () => {
    await open([], 'file');
    expect(test.text).toContain('No mail yet');
  });

  it('asks for one state when the address names it', async () => {
    test = await PageTest.open('club/outbox', OutboxPage, '/club/outbox?status=given-up', admin);
    const asked = await test.request('GET', '/api/outbox');
    expect(asked.request.urlWithParams).toContain('status=given-up');
    const delivery = { by: 'server', linksTo: 'https://strokes.example' };
    asked.flush({ items: [], nextCursor: null, total: 0, delivery });
    await test.settle();
    expect(test.text).toContain('No mail is in this state');
  });

  it('offers another try when the list cannot be read', async () => {
    test = await PageTest.open('club/outbox', OutboxPage, '/club/outbox', admin);
    await test.refuse('GET', '/api/outbox', 500, 'internal');
    expect(test.text).toContain('Refused: internal.');
    test.press('Try again');
    await test.request('GET', '/api/outbox');
  });

  it('has nothing for axe to find', async () => {
    await open([mail, refused], 'file');
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

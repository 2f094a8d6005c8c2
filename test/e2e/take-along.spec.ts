import { readFileSync } from 'node:fs';
import type { ExportFile } from '@stillstroke/contract/export';
import { exportTables } from '@stillstroke/contract/export-dictionary';
import { expect, test, type Page } from '@playwright/test';
import { strFromU8, unzipSync } from 'fflate';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { signInAs } from './sign-in';

/** Saves through the dialog that is open and reads what arrived. */
async function saved(
  page: Page,
  form: 'Tables' | 'One file',
): Promise<{ name: string; bytes: Buffer; path: string }> {
  const dialog = page.getByRole('dialog');
  await dialog.getByRole('radio', { name: new RegExp(form) }).check();
  const waiting = page.waitForEvent('download');
  await dialog.getByRole('button', { name: 'Save the file' }).click();
  const download = await waiting;
  const path = test.info().outputPath(download.suggestedFilename());
  await download.saveAs(path);
  await expect(dialog).toBeHidden();
  return { name: download.suggestedFilename(), bytes: readFileSync(path), path };
}

const untimed = ({ exportedAt: _, ...rest }: ExportFile) => rest;
const asFile = (bytes: Buffer) => JSON.parse(bytes.toString('utf8')) as ExportFile;

/** The newest session of the athlete with measured clips. */
async function openMeasuredSession(page: Page): Promise<string> {
  const { body } = await callApi(page, 'GET', '/api/athletes?limit=200');
  const athlete = (body as { items: { id: string; name: string }[] }).items.find(
    ({ name }) => name === 'Jakub Sorrel',
  );
  const listed = await callApi(page, 'GET', `/api/athletes/${athlete?.id}/sessions`);
  const session = (listed.body as { items: { id: string; clips: { strokeCount: number }[] }[] }).items.find(
    ({ clips }) => clips.some(({ strokeCount }) => strokeCount > 4),
  );
  await page.goto(`/sessions/${session?.id}`);
  await expect(page.getByRole('button', { name: 'Take it along' })).toBeVisible();
  return session?.id ?? '';
}

test('figures leave as a file, are lost, and come back the same', async ({ page }) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const sessionId = await openMeasuredSession(page);
  await page.getByRole('button', { name: 'Take it along' }).click();
  await expectAccessible(page, 'the dialog in which figures are taken along');
  const { name, bytes, path } = await saved(page, 'One file');
  expect(name).toMatch(/^stillstroke-jakub-sorrel-\d{4}-\d{2}-\d{2}\.json$/);
  const before = asFile(bytes);
  const clip = before.sessions[0]?.clips.find(({ strokes }) => strokes.length > 4);
  if (!clip) throw new Error('the session has no measured clip');

  await test.step('loses a stroke and all marks of an arm, and gets a mark of its own', async () => {
    for (const { arm, frame } of clip.marks.filter((mark) => mark.arm === 'left'))
      await callApi(page, 'DELETE', `/api/clips/${clip.id}/marks/${arm}/${frame}`);
    await callApi(page, 'DELETE', `/api/strokes/${clip.strokes[0]?.id}`);
    const [mark] = clip.marks;
    const free = clip.frameCount - 1;
    await callApi(page, 'PUT', `/api/clips/${clip.id}/marks/right/${free}`, {
      shoulder: mark?.shoulder,
      elbow: mark?.elbow,
      wrist: mark?.wrist,
    });
  });

  const dialog = page.getByRole('dialog');
  await test.step('shows what would change, and asks before anything does', async () => {
    await page.getByRole('button', { name: 'Bring in' }).click();
    await dialog.locator('input[type=file]').setInputFiles({
      name: 'notes.json',
      mimeType: 'application/json',
      buffer: Buffer.from('{"lanes":8}'),
    });
    await expect(dialog.getByRole('alert')).toContainText('not a file that Stillstroke exported');
    await dialog.locator('input[type=file]').setInputFiles(path);
    const section = dialog.getByRole('region', { name: clip.name });
    await expect(section).toContainText('1 new');
    await expect(section).toContainText('1 only here');
    await expect(section).toContainText('come out the same');
    await expect(dialog.getByRole('button', { name: 'Bring in' })).toBeDisabled();
    await expectAccessible(page, 'the dialog in which figures are brought in');
    await dialog.getByRole('radio', { name: /Make it as in the file/ }).check();
  });

  const exportNow = async () =>
    (await callApi(page, 'GET', `/api/sessions/${sessionId}/export`)).body as ExportFile;
  const spoilt = untimed(await exportNow());
  expect(spoilt).not.toEqual(untimed(before));

  await test.step('brings them in, the same to the last digit', async () => {
    await dialog.getByRole('button', { name: 'Bring in' }).click();
    await expect(dialog).toBeHidden();
    await expect(page.getByText('Brought in onto')).toBeVisible();
    expect(untimed(await exportNow())).toEqual(untimed(before));
  });

  await test.step('takes it back and does it again', async () => {
    await page.getByRole('button', { name: 'Undo' }).click();
    await expect(page.getByText('The session is as it was before.')).toBeVisible();
    expect(untimed(await exportNow())).toEqual(spoilt);
    await page.getByRole('button', { name: 'Bring in' }).click();
    await dialog.locator('input[type=file]').setInputFiles(path);
    await dialog.getByRole('radio', { name: /Make it as in the file/ }).check();
    await dialog.getByRole('button', { name: 'Bring in' }).click();
    await expect(dialog).toBeHidden();
    expect(untimed(await exportNow())).toEqual(untimed(before));
  });
});

test('tables come for an athlete, the athlete’s own as well, and every column is explained', async ({
  page,
}) => {
  await signInAs(page, 'athlete@tarnvalley.example');
  await page.getByRole('button', { name: 'Take it along' }).click();
  const { name, bytes } = await saved(page, 'Tables');
  expect(name).toMatch(/^stillstroke-[a-z-]+\.zip$/);
  const files = unzipSync(bytes);
  expect(Object.keys(files)).toEqual(Object.values(exportTables).map(({ file }) => file));
  const text = (file: string) => strFromU8(files[file] ?? new Uint8Array());
  expect(text('strokes.csv').split('\r\n')[0]).toContain('vertical_at_share,vertical_at_u_share');
  expect(text('readings.csv').split('\r\n').length).toBeGreaterThan(100);
  expect(text('trend.csv')).toContain('verticalAt,share,side-underwater,left,');

  await page.getByRole('button', { name: 'Take it along' }).click();
  await page.getByRole('link', { name: 'What every column means' }).click();
  await expect(page.getByRole('heading', { name: 'Data dictionary' })).toBeVisible();
  await page.getByText('readings.csv').click();
  await expect(page.getByText('forearm_deg', { exact: true })).toBeVisible();
  await expectAccessible(page, 'the data dictionary');
});

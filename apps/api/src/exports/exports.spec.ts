import { exportFileSchema, type ExportFile } from '@stillstroke/contract/export';
import { exportTables, type TableName } from '@stillstroke/contract/export-dictionary';
import { jsonFields } from '@stillstroke/contract/export-json-fields';
import { measureMeanings } from '@stillstroke/contract/measure-meanings';
import { measureSchema } from '@stillstroke/contract/measures';
import { athletes } from '@stillstroke/db/schema/club';
import { eq } from 'drizzle-orm';
import { strFromU8, unzipSync } from 'fflate';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import * as z from 'zod';
import { coachOf, enterStroke, STROKE_FRAMES } from '../measures/test-strokes';
import { unitOf } from '../measures/units';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { harmless } from './csv-text';
import { asBytes, parseCsv } from './test-csv';

describe('an export', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  let clipId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 900 }).id;
    const user = coachOf(club.ids);
    for (let n = 0; n < 4; n++)
      for (const arm of ['left', 'right'] as const)
        enterStroke(club.context, user, clipId, {
          arm,
          entry: 10 + n * STROKE_FRAMES,
          breath: n % 2 === 0,
          verticalAt: (arm === 'left' ? 0.4 : 0.6) + n * 0.01,
        });
    await coach
      .mutate('put', `/api/clips/${clipId}/calibration`)
      .send({ plumb: { top: { x: 100, y: 50 }, bottom: { x: 110, y: 650 } } });
  });
  afterEach(() => club.close());

  const path = (kind: string, id: string, format = 'json') => `/api/${kind}/${id}/export?format=${format}`;
  const json = async (kind: string, id: string) => {
    const answer = await coach.get(path(kind, id));
    expect(answer.status).toBe(200);
    return answer.body as ExportFile;
  };
  const tables = async (kind: string, id: string) => {
    const answer = await coach
      .get(path(kind, id, 'csv'))
      .buffer()
      .parse(asBytes);
    expect(answer.status).toBe(200);
    const files = unzipSync(answer.body as Uint8Array);
    return {
      names: Object.keys(files),
      of: (name: TableName) => parseCsv(strFromU8(files[exportTables[name].file] ?? new Uint8Array())),
    };
  };

  it('is a file of its own schema, for a clip, a session and an athlete', async () => {
    for (const [kind, id] of [
      ['clips', clipId],
      ['sessions', sessionId],
      ['athletes', club.ids.athletes.own],
    ] as const)
      expect(exportFileSchema.safeParse(await json(kind, id)).error).toBeUndefined();
    expect((await json('clips', clipId)).sessions[0]?.comparison).toEqual([]);
    expect((await json('athletes', club.ids.athletes.own)).trend).toHaveLength(
      // The index of coordination has one line, both arms together.
      2 * measureSchema.options.length + 1,
    );
  });

  it('has the figures that the pages show, and what they were computed from', async () => {
    const file = await json('sessions', sessionId);
    const clip = file.sessions[0]?.clips[0];
    const { items } = (await coach.get(`/api/clips/${clipId}/measures`)).body as {
      items: { strokeId: string; verticalAtShare: { value: number; uncertainty: number } }[];
    };
    expect(clip?.strokes.map(({ id, figures }) => [id, figures['verticalAt']?.value])).toEqual(
      items.map(({ strokeId, verticalAtShare }) => [strokeId, verticalAtShare.value]),
    );
    const marks = (await coach.get(`/api/clips/${clipId}/marks`)).body as {
      items: { arm: string; frame: number; angles: object }[];
    };
    for (const mark of clip?.marks ?? []) {
      const shown = marks.items.find(({ arm, frame }) => arm === mark.arm && frame === mark.frame);
      expect(mark.angles).toEqual(shown?.angles);
    }
    expect(clip?.marks).toHaveLength(16);
    expect(clip?.timesUs).toHaveLength(900);
    expect(clip?.timesUs[41]).toBe(41 * 20_000);
    const comparison = (await coach.get(`/api/sessions/${sessionId}/comparison`)).body as {
      splits: { all: { measure: string; difference: number; verdict: string }[] };
    };
    const shown = comparison.splits.all[0];
    expect(file.sessions[0]?.comparison[0]).toMatchObject({
      split: 'all',
      measure: shown?.measure,
      difference: shown?.difference,
      verdict: shown?.verdict,
    });
    expect(shown?.difference).toBeCloseTo(0.2, 2);
  });

  it('is the same byte for byte but for its time', async () => {
    for (const format of ['json', 'csv'] as const) {
      club.setNow(new Date('2026-04-01T10:00:00Z'));
      const read = async () =>
        (
          await coach
            .get(path('athletes', club.ids.athletes.own, format))
            .buffer()
            .parse(asBytes)
        ).body as Buffer;
      const first = await read();
      expect((await read()).equals(first)).toBe(true);
      club.setNow(new Date('2026-05-01T10:00:00Z'));
      const later = await read();
      expect(later.equals(first)).toBe(false);
      if (format === 'json')
        expect(later.toString().replace('2026-05-01T10', '2026-04-01T10')).toBe(first.toString());
      else
        for (const [name, bytes] of Object.entries(unzipSync(later)))
          if (name !== exportTables.about.file) expect(bytes).toEqual(unzipSync(first)[name]);
    }
  });

  it('comes as tables whose rows are those of the JSON file', async () => {
    const { names, of } = await tables('athletes', club.ids.athletes.own);
    expect(names).toEqual(Object.values(exportTables).map(({ file }) => file));
    const file = await json('athletes', club.ids.athletes.own);
    const clip = file.sessions[0]?.clips[0];
    const strokes = of('strokes');
    expect(strokes).toHaveLength(8);
    strokes.forEach((row, n) => {
      expect(row['stroke_id']).toBe(clip?.strokes[n]?.id);
      expect(Number(row['vertical_at_share'])).toBe(clip?.strokes[n]?.figures['verticalAt']?.value);
      expect(row['breath']).toBe(clip?.strokes[n]?.breath ? 'yes' : 'no');
    });
    of('readings').forEach((row, n) => {
      const mark = clip?.marks[n];
      expect([row['arm'], Number(row['frame'])]).toEqual([mark?.arm, mark?.frame]);
      expect(Number(row['time_us'])).toBe((mark?.frame ?? 0) * 20_000);
      expect(Number(row['forearm_deg'])).toBe(mark?.angles.forearmDeg);
      expect(Number(row['forearm_u_deg'])).toBe(mark?.uncertaintyDeg.forearmDeg);
    });
    expect(of('events')).toHaveLength(8 * 4);
    expect(of('events')[1]).toMatchObject({
      event: 'catch',
      frame: '30',
      time_us: '600000',
      world_time_s: '0.6',
    });
    expect(of('marks').some((row) => Number(row['wrist_x_px']) === clip?.marks[0]?.wrist.x)).toBe(true);
    expect(of('comparison')).toHaveLength(3 * measureSchema.options.length);
    expect(of('breath')).toHaveLength(3 * measureSchema.options.length);
    expect(of('change')).toHaveLength(2 * measureSchema.options.length + 1);
    expect(of('trend').length).toBeGreaterThan(0);
  });

  it('has every column in its dictionary, and every measure with its unit', async () => {
    const { of } = await tables('clips', clipId);
    const listed = of('dictionary').map((row) => `${row['file']} ${row['column']}`);
    const columns = Object.values(exportTables).flatMap(({ file, columns }) =>
      columns.map(({ name }) => `${file} ${name}`),
    );
    expect(listed).toEqual(columns);
    expect(new Set(columns).size).toBe(columns.length);
    for (const measure of measureSchema.options) {
      expect(measureMeanings[measure]?.meaning.length, measure).toBeGreaterThan(10);
      expect(measureMeanings[measure]?.unit, measure).toBe(unitOf[measure]);
    }
    for (const row of of('dictionary')) expect(row['meaning'], row['column']).not.toBe('');
  });

  it('has every field of the JSON file explained, and explains none besides', () => {
    const schema = z.toJSONSchema(exportFileSchema, { io: 'output', unrepresentable: 'any' });
    const paths = [...new Set(leaves(schema as Schema))].sort();
    expect(jsonFields.map(({ path: of }) => of).sort()).toEqual(paths);
  });

  it('names its file safely and is kept by no cache', async () => {
    club.context.db
      .update(athletes)
      .set({ name: 'Zoë "=cmd|\' /\r\nÅström' })
      .where(eq(athletes.id, club.ids.athletes.own))
      .run();
    const answer = await coach.get(path('sessions', sessionId));
    expect(answer.headers['content-disposition']).toBe(
      `attachment; filename="stillstroke-zoe-cmd-astrom-2026-03-02.json"; filename*=UTF-8''stillstroke-zoe-cmd-astrom-2026-03-02.json`,
    );
    expect(answer.headers['cache-control']).toBe('private, no-store');
    expect(answer.headers['content-type']).toBe('application/json; charset=utf-8');
    const zip = await coach
      .get(path('sessions', sessionId, 'csv'))
      .buffer()
      .parse(asBytes);
    expect(zip.headers['content-type']).toBe('application/zip');
    expect(zip.headers['content-disposition']).toContain('2026-03-02.zip');
  });

  it('turns words of people that begin like a formula into text, and leaves numbers alone', async () => {
    const place = '=HYPERLINK("http://x.example";"Lido")';
    await coach.mutate('patch', `/api/sessions/${sessionId}`).send({ place, note: '-1+1, "said"\nLars' });
    const { of } = await tables('sessions', sessionId);
    expect(of('sessions')[0]).toMatchObject({ place: `'${place}`, note: `'-1+1, "said"\nLars` });
    expect((await json('sessions', sessionId)).sessions[0]?.place).toBe(place);
    const negative = of('readings').find((row) => Number(row['forearm_deg']) < 0);
    expect(negative?.['forearm_deg']).toMatch(/^-\d/);
    for (const begin of ['=', '+', '-', '@', '\t', '\r', '＝', '＠'])
      expect(harmless(`${begin}1`)).toBe(`'${begin}1`);
    expect(harmless('Lido =1')).toBe('Lido =1');
  });

  it('leaves out what is deleted', async () => {
    await coach.mutate('delete', `/api/clips/${clipId}`);
    expect((await coach.get(path('clips', clipId))).status).toBe(404);
    expect((await json('sessions', sessionId)).sessions[0]?.clips).toEqual([]);
    await coach.mutate('delete', `/api/sessions/${sessionId}`);
    expect((await json('athletes', club.ids.athletes.own)).sessions).toEqual([]);
  });
});

interface Schema {
  readonly type?: string;
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly additionalProperties?: Schema | false;
  readonly items?: Schema;
  readonly anyOf?: readonly Schema[];
}

/** Paths of all plain values in a JSON schema. */
function leaves(schema: Schema, path = ''): string[] {
  if (schema.anyOf)
    return schema.anyOf.filter(({ type }) => type !== 'null').flatMap((one) => leaves(one, path));
  if (schema.items) return leaves(schema.items, `${path}[]`);
  if (schema.properties)
    return Object.entries(schema.properties).flatMap(([name, one]) =>
      leaves(one, path ? `${path}.${name}` : name),
    );
  if (schema.additionalProperties) return leaves(schema.additionalProperties, `${path}.*`);
  return [path];
}

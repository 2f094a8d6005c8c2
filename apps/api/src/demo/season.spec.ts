import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { checkOrder } from '@stillstroke/geometry/events/stroke';
import { FILM_NAMES, filmPath, readFilmTruth } from './film-truth';
import { marksFromTruth } from './marks-from-truth';
import { DEMO_CLUBS, type DemoClip, FIRST_CLIP } from './season';

const FOLDER = fileURLToPath(new URL('../../demo-media/', import.meta.url));
const athletes = DEMO_CLUBS.flatMap(({ athletes }) => athletes);
const clips: DemoClip[] = athletes.flatMap(({ sessions }) => sessions.flatMap((session) => session.clips));
const unique = (values: readonly unknown[]): boolean => new Set(values).size === values.length;

describe('the demo season', () => {
  it('names squads, athletes and people that exist, each once', () => {
    for (const club of DEMO_CLUBS) {
      const squads = club.squads.map(({ key }) => key);
      const keys = club.athletes.map(({ key }) => key);
      expect(unique(squads)).toBe(true);
      for (const { squad } of club.athletes) expect(squads).toContain(squad);
      for (const { coaches = [], athlete, guardianOf = [] } of club.people) {
        for (const squad of coaches) expect(squads).toContain(squad);
        for (const key of [...(athlete === undefined ? [] : [athlete]), ...guardianOf])
          expect(keys).toContain(key);
      }
    }
    expect(unique(athletes.map(({ key }) => key))).toBe(true);
    const emails = DEMO_CLUBS.flatMap(({ people }) => people.map(({ email }) => email));
    expect(unique(emails)).toBe(true);
    for (const email of emails) expect(email).toMatch(/^[a-z]+@(tarnvalley|northmere)\.example$/);
    for (const account of ['admin', 'coach', 'athlete', 'guardian']) {
      expect(emails).toContain(`${account}@tarnvalley.example`);
    }
    expect(emails).toContain('coach@northmere.example');
  });

  it('runs from June to November 2026, oldest first', () => {
    for (const { sessions } of athletes) {
      const dates = sessions.map(({ date }) => date);
      expect(dates).toEqual([...dates].sort());
      expect(unique(dates)).toBe(true);
      for (const date of dates) expect(date).toMatch(/^2026-(06|07|08|09|10|11)-(0[1-9]|[12]\d|30|31)$/);
    }
    expect(athletes.filter(({ sessions }) => sessions.length >= 5).length).toBeGreaterThanOrEqual(5);
  });

  it('uses every film, and no film of one athlete for another', () => {
    expect(new Set(clips.map(({ film }) => film))).toEqual(new Set(FILM_NAMES));
    for (const name of FILM_NAMES) {
      expect(existsSync(filmPath(FOLDER, name))).toBe(true);
      const shown = athletes.filter(({ sessions }) =>
        sessions.some((session) => session.clips.some(({ film }) => film === name)),
      );
      expect(shown).toHaveLength(1);
    }
  });

  it('marks every clip with strokes in order and joints within reach of the picture', () => {
    for (const { film, marking } of clips) {
      if (!marking) continue;
      const truth = readFilmTruth(FOLDER, film);
      const { strokes, marks } = marksFromTruth(truth, marking);
      for (const arm of ['left', 'right']) {
        expect(strokes.filter((stroke) => stroke.arm === arm).length).toBeGreaterThanOrEqual(2);
      }
      for (const stroke of strokes) expect(checkOrder(stroke, truth.frameCount).ok).toBe(true);
      expect(unique(strokes.map(({ arm, entry }) => `${arm} ${entry}`))).toBe(true);
      expect(unique(marks.map(({ arm, frame }) => `${arm} ${frame}`))).toBe(true);
      for (const { shoulder, elbow, wrist } of marks) {
        for (const { x, y } of [shoulder, elbow, wrist]) {
          expect(x > 0 && x < truth.width && y > 0 && y < truth.height).toBe(true);
        }
      }
    }
  });

  it('leads the first visit to a clip whose arms are both marked', () => {
    const athlete = athletes.find(({ key }) => key === FIRST_CLIP.athlete);
    const session = athlete?.sessions.find(({ date }) => date === FIRST_CLIP.date);
    const clip = session?.clips.find(({ film }) => film === FIRST_CLIP.film);
    expect(clip?.marking?.joints).toBe(true);
    expect(session).toBe(athlete?.sessions.at(-1));
  });

  it('leaves a clip to be marked for the coach who looks in', () => {
    expect(clips.some(({ marking }) => marking === null)).toBe(true);
  });
});

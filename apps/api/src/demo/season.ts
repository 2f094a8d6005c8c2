import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { createTarget } from '@stillstroke/contract/targets';
import type { StrokeKind } from '@stillstroke/contract/clip-facts';
import type { Role } from '@stillstroke/contract/roles';
import type { FilmName } from './film-truth';
import type { MarkingPlan } from './marks-from-truth';

/** One club of the demo with its people. Keys are unique within their kind and are never shown. All of it is invented. */
export interface DemoClub {
  readonly key: string;
  readonly name: string;
  readonly squads: readonly DemoSquad[];
  readonly people: readonly DemoPerson[];
  readonly athletes: readonly DemoAthlete[];
}

export interface DemoSquad {
  readonly key: string;
  readonly name: string;
}

export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  /** Keys of the squads they coach. */
  readonly coaches?: readonly string[];
  /** Key of the athlete that this account is. */
  readonly athlete?: string;
  /** Keys of the athletes in their care. */
  readonly guardianOf?: readonly string[];
}

export interface DemoAthlete {
  readonly key: string;
  readonly name: string;
  readonly squad: string;
  /** What their coach set for them after the last session, in the coach's words. */
  readonly targets?: readonly BodyOf<typeof createTarget>[];
  /** Oldest first. */
  readonly sessions: readonly DemoSession[];
}

export interface DemoSession {
  /** YYYY-MM-DD */
  readonly date: string;
  readonly place: string;
  readonly note: string | null;
  readonly clips: readonly DemoClip[];
}

/** A clip of a session; view, travel and size come with the film's true values. */
export interface DemoClip {
  readonly film: FilmName;
  /** The name of the file as it came from the camera. */
  readonly name: string;
  readonly stroke: StrokeKind;
  /** Null: not marked yet. */
  readonly marking: MarkingPlan | null;
  /** Seconds of the film at which the swimmer passes the first band of the pool wall; the next is 5 m further on. */
  readonly bandAtS?: number | undefined;
}

/** Every demo account signs in with this. */
export const DEMO_PASSWORD = 'stillwater-demo';

const BATHS = 'Tarn Valley Baths';
const LIDO = 'Ferrow Lido';
const NORTH_POOL = 'Northmere Pool';

/** Spread of the marking, pixels: what the product assumes of a coach at this picture size until it knows better. */
const SPREAD_PX = 1;

/** When the swimmers of these films pass a band of the pool wall, seconds of the film. */
const BAND_AT_S: Partial<Record<FilmName, number>> = {
  'ines-july': 2.63,
  'ines-october': 1,
  'ines-november': 2.97,
  'rhona-june': 1.45,
  'rhona-november': 3.42,
};

type Marked = Omit<MarkingPlan, 'spreadPx' | 'joints'> & Partial<MarkingPlan>;

function clip(film: FilmName, name: string, marking: Marked | null): DemoClip {
  return {
    film,
    name,
    stroke: 'full',
    marking: marking && { spreadPx: SPREAD_PX, joints: true, ...marking },
    ...(marking && film in BAND_AT_S && { bandAtS: BAND_AT_S[film] }),
  };
}

function session(
  date: string,
  place: string,
  note: string | null,
  ...clips: readonly DemoClip[]
): DemoSession {
  return { date, place, note, clips };
}

const INES: DemoAthlete = {
  key: 'ines-corrow',
  name: 'Ines Corrow',
  squad: 'masters',
  targets: [
    {
      measure: 'verticalAt',
      arm: 'both',
      low: null,
      high: 0.45,
      words: 'Fingertips down before the head turns',
    },
    { measure: 'peakDrop', arm: 'right', low: null, high: 15, words: 'Elbow stays in front of the hand' },
  ],
  sessions: [
    session(
      '2026-06-13',
      BATHS,
      'First film under water.',
      clip('ines-july', 'IC_0613_side.mp4', { seed: 101, strokes: [0, 3] }),
    ),
    session(
      '2026-07-04',
      BATHS,
      'Right hand stays long in front, most of all when breathing to the left.',
      clip('ines-july', 'IC_0704_side.mp4', { seed: 102 }),
    ),
    session('2026-07-25', LIDO, null, clip('ines-july', 'IC_0725_side.mp4', { seed: 103, strokes: [1, 4] })),
    session('2026-08-16', BATHS, null, clip('ines-july', 'IC_0816_side.mp4', { seed: 104 })),
    session(
      '2026-09-12',
      BATHS,
      'After two weeks of sculling in front.',
      clip('ines-october', 'IC_0912_side.mp4', { seed: 105, strokes: [0, 3] }),
    ),
    session('2026-10-10', BATHS, null, clip('ines-october', 'IC_1010_side.mp4', { seed: 106 })),
    session(
      '2026-10-31',
      LIDO,
      null,
      clip('ines-october', 'IC_1031_side.mp4', { seed: 107, strokes: [1, 4] }),
    ),
    session(
      '2026-11-28',
      BATHS,
      'Steady 200, third 50.',
      clip('ines-november', 'IC_1128_side.mp4', { seed: 108 }),
      clip('ines-november-back', 'IC_1128_side_back.mp4', null),
    ),
  ],
};

const TOMAS: DemoAthlete = {
  key: 'tomas-vell',
  name: 'Tomas Vell',
  squad: 'masters',
  sessions: [
    session(
      '2026-06-18',
      BATHS,
      null,
      clip('tomas-autumn', 'vell-18jun.mp4', { seed: 201, strokes: [0, 3] }),
    ),
    session('2026-07-09', BATHS, null, clip('tomas-autumn', 'vell-9jul.mp4', { seed: 202 })),
    session(
      '2026-08-20',
      LIDO,
      'Back from a month in the lake.',
      clip('tomas-autumn', 'vell-20aug.mp4', { seed: 203, strokes: [1, 4] }),
    ),
    session('2026-09-17', BATHS, null, clip('tomas-autumn', 'vell-17sep.mp4', { seed: 204 })),
    session(
      '2026-10-22',
      BATHS,
      null,
      clip('tomas-autumn', 'vell-22oct.mp4', { seed: 205, strokes: [0, 4] }),
    ),
    session(
      '2026-11-26',
      BATHS,
      'Both arms alike; works on entering in front of the shoulder.',
      clip('tomas-autumn', 'vell-26nov.mp4', { seed: 206 }),
    ),
  ],
};

const RHONA: DemoAthlete = {
  key: 'rhona-blythe',
  name: 'Rhona Blythe',
  squad: 'masters',
  sessions: [
    session(
      '2026-06-20',
      BATHS,
      'Both elbows sink as the pull begins.',
      clip('rhona-june', 'RB-01.mp4', { seed: 301 }),
    ),
    session('2026-07-11', BATHS, null, clip('rhona-june', 'RB-02.mp4', { seed: 302, strokes: [1, 4] })),
    session('2026-08-08', LIDO, null, clip('rhona-august', 'RB-03.mp4', { seed: 303 })),
    session('2026-09-05', BATHS, null, clip('rhona-august', 'RB-04.mp4', { seed: 304, strokes: [0, 3] })),
    session('2026-10-03', BATHS, null, clip('rhona-august', 'RB-05.mp4', { seed: 305 })),
    session(
      '2026-10-24',
      BATHS,
      'Holds the elbow up now, also when tired.',
      clip('rhona-november', 'RB-06.mp4', { seed: 306, strokes: [0, 3] }),
    ),
    session('2026-11-21', BATHS, null, clip('rhona-november', 'RB-07.mp4', { seed: 307 })),
  ],
};

const JAKUB: DemoAthlete = {
  key: 'jakub-sorrel',
  name: 'Jakub Sorrel',
  squad: 'masters',
  sessions: [
    session('2026-06-27', LIDO, null, clip('jakub-autumn', 'GX010041.mp4', { seed: 401, strokes: [0, 3] })),
    session('2026-08-01', LIDO, null, clip('jakub-autumn', 'GX010058.mp4', { seed: 402 })),
    session(
      '2026-09-19',
      BATHS,
      'Every stroke a little different.',
      clip('jakub-autumn', 'GX010077.mp4', { seed: 403, strokes: [1, 4] }),
    ),
    session('2026-10-17', BATHS, null, clip('jakub-autumn', 'GX010093.mp4', { seed: 404 })),
    session('2026-11-14', BATHS, null, clip('jakub-autumn', 'GX010112.mp4', { seed: 405 })),
    session(
      '2026-11-29',
      BATHS,
      'Sent by Jakub: is the left getting later when I am tired?',
      clip('jakub-autumn', 'GX010120.mp4', null),
    ),
  ],
};

const MINA: DemoAthlete = {
  key: 'mina-okafor',
  name: 'Mina Okafor',
  squad: 'masters',
  sessions: [
    session(
      '2026-09-14',
      BATHS,
      'Front view only: the side window was taken.',
      clip('mina-front', 'mina-front-1.mp4', { seed: 501, joints: false, strokes: [0, 2] }),
    ),
    session(
      '2026-11-02',
      BATHS,
      'Head lifts before the breath.',
      clip('mina-front', 'mina-front-2.mp4', { seed: 502, joints: false }),
    ),
  ],
};

const WREN: DemoAthlete = {
  key: 'wren-tallis',
  name: 'Wren Tallis',
  squad: 'juniors',
  sessions: [
    session('2026-09-26', BATHS, null, clip('wren-autumn', 'wren-a.mp4', { seed: 601, strokes: [0, 3] })),
    session('2026-10-24', BATHS, null, clip('wren-autumn', 'wren-b.mp4', { seed: 602 })),
    session(
      '2026-11-21',
      BATHS,
      'Breathes to both sides now.',
      clip('wren-autumn', 'wren-c.mp4', { seed: 603 }),
    ),
  ],
};

const PETRA: DemoAthlete = {
  key: 'petra-lind',
  name: 'Petra Lind',
  squad: 'mornings',
  sessions: [
    session(
      '2026-06-16',
      NORTH_POOL,
      null,
      clip('petra-autumn', 'P-jun.mp4', { seed: 701, strokes: [0, 3] }),
    ),
    session('2026-07-21', NORTH_POOL, null, clip('petra-autumn', 'P-jul.mp4', { seed: 702 })),
    session(
      '2026-09-08',
      NORTH_POOL,
      null,
      clip('petra-autumn', 'P-sep.mp4', { seed: 703, strokes: [1, 4] }),
    ),
    session('2026-10-13', NORTH_POOL, null, clip('petra-autumn', 'P-oct.mp4', { seed: 704 })),
    session(
      '2026-11-24',
      NORTH_POOL,
      'Left arm slower to vertical.',
      clip('petra-autumn', 'P-nov.mp4', { seed: 705 }),
    ),
  ],
};

/** The demo's season, June to November 2026. The first club is the one that visitors meet. */
export const DEMO_CLUBS: readonly DemoClub[] = [
  {
    key: 'tarn-valley',
    name: 'Tarn Valley Swim Club',
    squads: [
      { key: 'masters', name: 'Masters squad' },
      { key: 'juniors', name: 'Junior squad' },
    ],
    people: [
      { name: 'Lowri Penn', email: 'admin@tarnvalley.example', role: 'admin' },
      { name: 'Owen Hale', email: 'coach@tarnvalley.example', role: 'coach', coaches: ['masters'] },
      { name: 'Hedda Rook', email: 'hedda@tarnvalley.example', role: 'coach', coaches: ['juniors'] },
      { name: 'Ines Corrow', email: 'athlete@tarnvalley.example', role: 'athlete', athlete: 'ines-corrow' },
      {
        name: 'Asta Tallis',
        email: 'guardian@tarnvalley.example',
        role: 'guardian',
        guardianOf: ['wren-tallis'],
      },
    ],
    athletes: [
      INES,
      TOMAS,
      RHONA,
      JAKUB,
      MINA,
      { key: 'sefa-brandt', name: 'Sefa Brandt', squad: 'masters', sessions: [] },
      WREN,
    ],
  },
  {
    key: 'northmere',
    name: 'Northmere Swim Club',
    squads: [{ key: 'mornings', name: 'Morning squad' }],
    people: [
      { name: 'Una Stray', email: 'admin@northmere.example', role: 'admin' },
      { name: 'Bram Keld', email: 'coach@northmere.example', role: 'coach', coaches: ['mornings'] },
    ],
    athletes: [PETRA, { key: 'joss-arden', name: 'Joss Arden', squad: 'mornings', sessions: [] }],
  },
];

/** The clip that the first visit is led to: both arms marked, the right one late and dropped on breathing strokes. */
export const FIRST_CLIP = { athlete: 'ines-corrow', date: '2026-11-28', film: 'ines-november' } as const;

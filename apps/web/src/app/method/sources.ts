/**
 * How well a source is known to us. `seen`: the words or numbers were read, most often in the abstract; `from-memory`: the
 * citation was not checked against the paper; `computed`: worked out by us; `common-practice`: what people of the trade do,
 * without a published source; `own-choice`: decided by us.
 */
export type Provenance = 'seen' | 'from-memory' | 'computed' | 'common-practice' | 'own-choice';

export interface Source {
  readonly authors: string;
  /** Null where there is no publication. */
  readonly year: number | null;
  readonly title: string;
  /** Journal, volume and pages, or publisher. */
  readonly published: string | null;
  readonly provenance: Provenance;
  /** How far it was read, or what is doubtful about it. */
  readonly note: string | null;
}

export const provenanceWords: Readonly<Record<Provenance, string>> = {
  seen: 'seen',
  'from-memory': 'from memory',
  computed: 'computed by us',
  'common-practice': 'common practice, no source',
  'own-choice': 'our own choice, no source',
};

const paper = (
  authors: string,
  year: number,
  title: string,
  published: string,
  provenance: Provenance,
  note: string | null = null,
): Source => ({ authors, year, title, published, provenance, note });

/** Everything that the method refers to, by a short name. */
export const sources = {
  chollet2000: paper(
    'Chollet D, Chalies S, Chatard JC',
    2000,
    'A new index of coordination for the crawl: description and usefulness',
    'Int J Sports Med 21(1):54–59',
    'from-memory',
    'Its events agree with those in the abstract of Seifert, Delignières and others 2007, which was read.',
  ),
  seifertEvents2007: paper(
    'Seifert L, Delignières D, Boulesteix L, Chollet D',
    2007,
    'Paper on arm coordination in butterfly',
    'J Sports Sci 25:131–141',
    'seen',
    'The abstract, which names the same four events of the hand.',
  ),
  millet2002: paper(
    'Millet GP, Chollet D, Chalies S, Chatard JC',
    2002,
    'Paper on front-crawl coordination in triathletes and swimmers',
    'Int J Sports Med 23:99–104',
    'seen',
    'A published summary; the paper’s title is from memory.',
  ),
  seifertModes2007: paper(
    'Seifert L, Chollet D, Rouard A',
    2007,
    'Paper on constraints and arm coordination',
    'Hum Mov Sci 26:68–86',
    'seen',
    'A published summary, which names the three modes; the paper’s title is from memory.',
  ),
  schnitzler2010: paper(
    'Schnitzler C, Seifert L, Alberty M, Chollet D',
    2010,
    'Hip velocity and arm coordination in front crawl swimming',
    'Int J Sports Med, doi 10.1055/s-0030-1265149',
    'seen',
    'The abstract; the list of authors is from memory.',
  ),
  craig1979: paper(
    'Craig AB Jr, Pendergast DR',
    1979,
    'Relationships of stroke rate, distance per stroke, and velocity in competitive swimming',
    'Med Sci Sports 11(3):278–283',
    'seen',
    'The abstract.',
  ),
  costill1985: paper(
    'Costill DL, Kovaleski J, Porter D, Kirwan J, Fielding R, King D',
    1985,
    'Energy expenditure during front crawl swimming: predicting success in middle-distance events',
    'Int J Sports Med 6(5):266–270',
    'seen',
    'The abstract; the formula of the index is from memory.',
  ),
  virag2014: paper(
    'Virag B, Hibberd EE, Oyama S, Padua DA, Myers JB',
    2014,
    'Paper on stroke errors in collegiate swimmers',
    'Sports Health 6(3):218–224, doi 10.1177/1941738114527056',
    'seen',
    'The abstract: dropped elbows are rated by eye, and no cause of shoulder pain is proven. Title, volume and pages are from memory.',
  ),
  yanaiHay2000: paper(
    'Yanai T, Hay JG',
    2000,
    'Shoulder impingement in front-crawl swimming: II',
    'Med Sci Sports Exerc 32(1):30–40',
    'seen',
    'The abstract: inward rotation of the upper arm during the pull is among what loads the shoulder.',
  ),
  osborough2010: paper(
    'Osborough CD, Payton CJ, Daly DJ',
    2010,
    'Paper on arm coordination and upper-arm angle, marked by hand',
    'Hum Mov Sci 29:921–931',
    'from-memory',
    'A methods section was read (repeatability 1.4° of one person, 1.3° between two, marked skin); that it is this paper is from memory.',
  ),
  gum2008: paper(
    'JCGM',
    2008,
    'Evaluation of measurement data: guide to the expression of uncertainty in measurement (JCGM 100:2008)',
    'Joint Committee for Guides in Metrology',
    'seen',
    'Section 5 was read; of annex G the formula, not its worked example.',
  ),
  weir2005: paper(
    'Weir JP',
    2005,
    'Quantifying test–retest reliability using the intraclass correlation coefficient and the SEM',
    'J Strength Cond Res 19(1):231–240, doi 10.1519/15184.1',
    'seen',
    'The abstract, and one of its data sets in a package’s tests.',
  ),
  hopkins2000: paper(
    'Hopkins WG',
    2000,
    'Measures of reliability in sports medicine and science',
    'Sports Med 30(1):1–15',
    'seen',
    'The abstract.',
  ),
  blandAltman1986: paper(
    'Bland JM, Altman DG',
    1986,
    'Statistical methods for assessing agreement between two methods of clinical measurement',
    'Lancet 327(8476):307–310',
    'seen',
    'Its data and limits, as others print them; some of its intervals are from memory.',
  ),
  welch1947: paper(
    'Welch BL',
    1947,
    'The generalization of “Student’s” problem when several different population variances are involved',
    'Biometrika 34:28–35',
    'from-memory',
    'Checked against data sets of other programs’ tests.',
  ),
  holm1979: paper(
    'Holm S',
    1979,
    'A simple sequentially rejective multiple test procedure',
    'Scand J Statist 6:65–70',
    'from-memory',
  ),
  sen1968: paper(
    'Sen PK',
    1968,
    'Estimates of the regression coefficient based on Kendall’s tau',
    'J Am Stat Assoc 63:1379–1389',
    'from-memory',
    'After Theil (1950).',
  ),
  robinson1987: paper(
    'Robinson RO, Herzog W, Nigg BM',
    1987,
    'Use of force platform variables to quantify the effects of chiropractic manipulation on gait symmetry',
    'J Manipulative Physiol Ther 10(4):172–176',
    'seen',
    'The citation; the formula of the symmetry percentage is from memory.',
  ),
  roislien2012: paper(
    'Røislien J and others',
    2012,
    'Paper on the coefficient of multiple correlation of waveforms',
    'J Biomech 45(11):2014–2018',
    'seen',
    'The abstract, which advises against the coefficient; the first author is from memory.',
  ),
  photography: {
    authors: 'Governing bodies’ guidance on photography',
    year: null,
    title: 'Club copies of national guidance on filming swimmers under 18',
    published: null,
    provenance: 'seen',
    note: 'In general terms; the rules of your pool and your governing body come first.',
  },
  plane: {
    authors: 'Stillstroke',
    year: null,
    title: 'Plane geometry of the joints in the picture',
    published: null,
    provenance: 'computed',
    note: 'Definitions of our own in the terms of the trade, checked on rendered swimmers with known angles.',
  },
  projection: {
    authors: 'Stillstroke',
    year: null,
    title: 'What a tilt out of the picture’s plane does to an angle',
    published: null,
    provenance: 'computed',
    note: 'Orthographic projection.',
  },
  simulation: {
    authors: 'Stillstroke',
    year: null,
    title: 'Rendered strokes marked many times with a known spread',
    published: null,
    provenance: 'computed',
    note: null,
  },
  ownChoice: {
    authors: 'Stillstroke',
    year: null,
    title: 'A choice of our own',
    published: null,
    provenance: 'own-choice',
    note: null,
  },
  oneThird: {
    authors: 'Coaches',
    year: null,
    title: 'Forearm vertical within the first third of the pull',
    published: null,
    provenance: 'common-practice',
    note: 'No published norm exists for these angles, so none is shipped.',
  },
} as const satisfies Record<string, Source>;

export type SourceId = keyof typeof sources;

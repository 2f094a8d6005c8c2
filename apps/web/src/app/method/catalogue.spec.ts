import { measureSchema } from '@stillstroke/contract/measures';
import { strokeMeasureNames } from '@stillstroke/geometry/measures/measured-by-name';
import { measureWords } from '../ui/figure/measure-words';
import { catalogue, entriesOf, entryOf } from './catalogue';
import type { MethodEntry } from './method-entry';
import { provenanceWords, sources, type Source } from './sources';

const all = Object.entries<MethodEntry>(catalogue);
/** What Compare, Trend and the curves say of several strokes or sessions. */
const statistics = [
  'uncertainty',
  'projected',
  'armMean',
  'difference',
  'breath',
  'holm',
  'strokesToSettle',
  'sessionMean',
  'change',
  'slope',
  'robustSlope',
  'repeatability',
  'agreement',
  'curves',
];

describe('the catalogue of methods', () => {
  it.each([...measureSchema.options, ...strokeMeasureNames])('says how %s is computed', (measure) => {
    const entry = entryOf(measure);
    expect(
      entry,
      `${measure} has no entry: add one to method/measure-entries.ts with its formula in words, unit, interval, sources and limits`,
    ).toBeDefined();
    expect(entry?.kind).toBe('measure');
    expect(entry?.name, 'one name on every page').toBe(measureWords[measure].name);
  });

  it.each(['forearm', 'upperArm', 'elbow', 'elbowDrop'])('says how the angle %s is computed', (angle) => {
    expect(entryOf(angle)?.kind).toBe('angle');
  });

  it.each(['idc', 'reachAtEntry', 'handDepth'])(
    'says how %s is computed, which is no measure of Trend',
    (name) => {
      expect(entryOf(name)?.kind).toBe('measure');
    },
  );

  it.each(statistics)('says how the statistic %s is computed', (name) => {
    expect(entryOf(name)?.kind).toBe('statistic');
  });

  it.each(all)('leaves nothing out of %s', (_, entry) => {
    expect(entry.what).toMatch(/\.$/);
    expect(entry.steps.length).toBeGreaterThan(0);
    expect(entry.sources.length).toBeGreaterThan(0);
    expect(entry.limits.length).toBeGreaterThan(0);
    for (const text of [entry.unit, entry.interval, ...entry.steps, ...entry.limits])
      expect(text.trim()).not.toBe('');
    for (const { source, where } of entry.sources) {
      expect(Object.keys(sources)).toContain(source);
      expect(where.trim()).not.toBe('');
    }
  });

  it('knows every source by how well it is known, and uses every one', () => {
    const used = new Set<string>(all.flatMap(([, entry]) => entry.sources.map(({ source }) => source)));
    // Named on the method page alone.
    const elsewhere = ['photography', 'blandAltman1986'];
    for (const [id, source] of Object.entries<Source>(sources)) {
      expect(Object.keys(provenanceWords)).toContain(source.provenance);
      expect(used.has(id) || elsewhere.includes(id), `${id} is not cited`).toBe(true);
      // A publication names where it was published; what is not published has no year.
      expect(source.year === null, id).toBe(source.published === null);
    }
  });

  it('lists every entry once', () => {
    const listed = (['angle', 'measure', 'statistic'] as const).flatMap(entriesOf).map(({ id }) => id);
    expect([...listed].sort()).toEqual(Object.keys(catalogue).sort());
  });
});

import { pageFindings } from '../core/testing/page-findings';
import { athlete, PageTest } from '../core/testing/page-test';
import { catalogue } from './catalogue';
import { MethodPage } from './method-page';

describe('the method page', () => {
  it('has a place for every entry, the sources, the rules and the care, and is accessible', async () => {
    const test = await PageTest.open('method', MethodPage, '/method', athlete);
    await test.settle();
    for (const [id, entry] of Object.entries(catalogue))
      expect(test.element.querySelector(`[id="${id}"]`)?.textContent).toBe(entry.name);
    expect(test.text).toContain('No published norm exists for these angles');
    expect(test.text).toContain('common practice, no source');
    expect(test.text).toContain('Chollet D, Chalies S, Chatard JC (2000)');
    expect(test.text).toContain('Stop for pain, numbness or weakness');
    expect(await pageFindings(test.element)).toEqual([]);
  });
});

import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { provideRouter } from '@angular/router';
import { pageFindings } from '../core/testing/page-findings';
import { AthleteCards } from './athlete-cards';
import type { SortChoice } from './athlete-table';

async function cards() {
  TestBed.configureTestingModule({ providers: [provideRouter([])] });
  const fixture = TestBed.createComponent(AthleteCards);
  fixture.componentRef.setInput('sort', 'name');
  fixture.componentRef.setInput('direction', 'asc');
  fixture.componentRef.setInput('athletes', [
    {
      id: 'ines',
      name: 'Ines Corrow',
      squadId: 'm',
      squadName: 'Masters squad',
      lastSession: null,
      sessionCount: 0,
      clipsToMark: 3,
      verticalAt: { left: null, right: null },
      deactivated: false,
    },
  ]);
  await fixture.whenStable();
  return fixture;
}

describe('AthleteCards', () => {
  it('say as much as the table does', async () => {
    const element = (await cards()).nativeElement as HTMLElement;
    expect(element.querySelector('a')?.getAttribute('href')).toBe('/athletes/ines');
    for (const words of ['Ines Corrow', 'no session yet', 'not measured', '3 to mark']) {
      expect(element.textContent).toContain(words);
    }
    expect(await pageFindings(element)).toEqual([]);
  });

  it('ask for another order', async () => {
    const fixture = await cards();
    const asked: SortChoice[] = [];
    fixture.componentInstance.sorted.subscribe((choice) => asked.push(choice));
    const order = await TestbedHarnessEnvironment.loader(fixture).getHarness(MatSelectHarness);
    await order.clickOptions({ text: 'Clips to mark, most first' });
    expect(asked).toEqual([{ sort: 'clipsToMark', direction: 'desc' }]);
  });
});

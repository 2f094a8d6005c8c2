import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { HttpErrorResponse } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { StrokeExplanation } from '@stillstroke/contract/explanation';
import { firstValueFrom, throwError } from 'rxjs';
import { pageFindings } from '../../core/testing/page-findings';
import { explainMeasure } from './explain-measure';
import type { Explain } from './explanation';
import { How } from './how';
import { ExplainHarness, HowHarness } from './testing';

const clipId = '00000000-0000-4000-8000-000000000005';
const point = (x: number, y: number) => ({ x, y });

const said: StrokeExplanation = {
  strokeId: '00000000-0000-4000-8000-000000000009',
  clipId,
  arm: 'right',
  breath: true,
  measure: 'verticalAt',
  unit: 'share',
  figure: { value: 0.58, uncertainty: 0.031, reason: null, frame: 143, frames: [120, 140, 146, 160] },
  interval: { low: 0.519, high: 0.641 },
  parts: [
    { source: 'exit-frame', alone: 0.025, share: 0.65 },
    { source: 'wrist-mark', alone: 0.017, share: 0.3 },
    { source: 'roll', alone: 0.007, share: 0.05 },
  ],
  events: [
    { event: 'entry', frame: 100, timeUs: 2_000_000 },
    { event: 'catch', frame: 120, timeUs: 2_400_000 },
    { event: 'exit', frame: 160, timeUs: 3_200_000 },
  ],
  marks: [
    { frame: 140, shoulder: point(900, 300), elbow: point(1000, 420), wrist: point(1010, 600.5) },
    { frame: 146, shoulder: point(902, 300), elbow: point(990, 430), wrist: point(980, 610) },
  ],
  plumb: { top: point(640, 100), bottom: point(640, 700) },
  travel: 'right',
  captureRateFactor: 1,
  verticalToleranceDeg: 15,
  jointUncertaintyPx: { shoulder: 3, elbow: 2, wrist: 2 },
  jointUncertaintyOwn: false,
  eventErrorFrames: 1,
};

@Component({
  selector: 'st-figure-under-test',
  imports: [How],
  template: '<p>58 % <st-how about="Vertical at" [explain]="explain()" /></p>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class FigureUnderTest {
  readonly explain = signal<Explain>(() => explainMeasure(said));
}

describe('a figure opened up', () => {
  async function open(explain?: Explain) {
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    const fixture = TestBed.createComponent(FigureUnderTest);
    if (explain) fixture.componentInstance.explain.set(explain);
    const how = await TestbedHarnessEnvironment.loader(fixture).getHarness(HowHarness);
    await how.open();
    const overlays = TestbedHarnessEnvironment.documentRootLoader(fixture);
    const dialog = await vi.waitFor(() => overlays.getHarness(ExplainHarness));
    await fixture.whenStable();
    return { how, dialog };
  }

  it('says formula, inputs, frames, parts largest first, meaning, limits and sources', async () => {
    const { how, dialog } = await open();
    expect(await how.about()).toBe('Vertical at');
    const text = await dialog.text();
    expect(text).toContain('Right arm, one breathing stroke');
    expect(text).toContain('58 % ± 3 %');
    expect(text).toContain('95 %: 52 to 64');
    expect(text).toContain('divide it by the time from catch to exit');
    expect(text).toContain('frame 120, at 2.400 s of the file');
    expect(text).toContain('shoulder (900.0, 300.0), elbow (1000.0, 420.0), wrist (1010.0, 600.5)');
    expect(text).toContain('(640.0, 100.0) to (640.0, 700.0), 600 pixels long');
    expect(text).toContain('15°');
    expect(text).toContain('JCGM 2008: §5.1.2, eq. (10)');
    expect(text).toContain('common practice, no source');
    expect(await dialog.parts()).toEqual([
      'choosing the exit frame',
      'placing the wrist',
      'the plumb: the camera’s lean',
    ]);
    expect(await dialog.shares()).toEqual(['65 %', '30 %', '5 %']);
    expect(await dialog.frames()).toEqual(
      [120, 140, 146, 160].map((frame) => `/clips/${clipId}?frame=${frame}&arm=right`),
    );
    expect(await pageFindings(document.querySelector('st-explain-dialog') ?? document.body)).toEqual([]);
  });

  it('says why there is no figure', async () => {
    const none = { value: null, uncertainty: null, reason: 'vertical-not-reached', frame: null, frames: [] };
    const { dialog } = await open(() => explainMeasure({ ...said, figure: none, interval: null, parts: [] }));
    expect(await dialog.text()).toContain('No figure: not reached in this pull');
    expect(await dialog.parts()).toEqual([]);
  });

  it('says what the server refused', async () => {
    const refusal = new HttpErrorResponse({
      status: 404,
      error: {
        type: 'about:blank',
        title: 'x',
        status: 404,
        detail: 'There is no such stroke.',
        code: 'not-found',
      },
    });
    const { dialog } = await open(() => firstValueFrom(throwError(() => refusal)));
    await vi.waitFor(async () => expect(await dialog.text()).toContain('There is no such stroke.'));
  });
});

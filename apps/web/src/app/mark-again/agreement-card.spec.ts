import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { Agreements, MeasureAgreement } from '@stillstroke/contract/repeatability';
import { AgreementCard } from './agreement-card';
import { sayAgreement, sayRepeatability } from './marking-words';

const measure = (bias: number, half: number): MeasureAgreement => ({
  bias,
  biasInterval: { low: bias - half, high: bias + half },
  sd: 2,
  limits: { low: bias - 3.92, high: bias + 3.92 },
  lowerLimitInterval: { low: bias - 6, high: bias - 2 },
  upperLimitInterval: { low: bias + 2, high: bias + 6 },
  marking: 2,
  verdict: Math.abs(bias) <= half ? 'no-shift' : Math.abs(bias) <= 2 ? 'small' : 'large',
  points: [
    { arm: 'left', frame: 40, mean: 10, difference: 1 },
    { arm: 'right', frame: 70, mean: 30, difference: 3 },
    { arm: 'right', frame: 90, mean: 60, difference: -1 },
  ],
});
const pair = (of: MeasureAgreement | null): Agreements['items'][number] => ({
  first: { id: 'a', name: 'Owen Hale' },
  second: { id: 'b', name: 'Petra Lund' },
  frames: of ? 3 : 2,
  measures: of && { forearmDeg: of, upperArmDeg: of, elbowDeg: of, elbowDropDeg: of },
});

describe('the agreement of two coaches', () => {
  it('claims a steady difference only where the interval leaves nothing out', () => {
    expect(sayAgreement(pair(measure(1, 2)), 'forearmDeg')).toContain('no steady difference can be told');
    expect(sayAgreement(pair(measure(3, 2)), 'forearmDeg')).toContain(
      'Owen Hale reads the forearm 3.0° larger on average (95 % interval 1.0° to 5.0°)',
    );
    expect(sayAgreement(pair(measure(-3, 2)), 'elbowDeg')).toContain(
      'Petra Lund reads the elbow 3.0° larger',
    );
    expect(sayAgreement(pair(null), 'forearmDeg')).toContain('too few to say');
  });

  it('weighs a steady difference against placing, and warns where limits are rough', () => {
    const say = (bias: number) => sayAgreement(pair(measure(bias, 1)), 'forearmDeg');
    expect(say(0.5)).not.toContain('placing');
    expect(say(1.5)).toContain('which is small: placing the joints twice alone leaves ± 2.0°');
    expect(say(3)).toContain('more than placing the joints twice leaves (± 2.0°)');
    expect(say(3)).toContain('these limits are rough');
    const many = { ...pair(measure(3, 1)), frames: 10 };
    expect(sayAgreement(many, 'forearmDeg')).not.toContain('rough');
  });

  it('draws each frame with the way to it, between the limits', async () => {
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    const fixture = TestBed.createComponent(AgreementCard);
    fixture.componentRef.setInput('pair', pair(measure(1, 2)));
    fixture.componentRef.setInput('clipId', 'clip-1');
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    const links = [...host.querySelectorAll('svg a')].map((link) => link.getAttribute('href'));
    expect(links).toEqual([
      '/clips/clip-1?frame=40&arm=left',
      '/clips/clip-1?frame=70&arm=right',
      '/clips/clip-1?frame=90&arm=right',
    ]);
    const [low, high] = [...host.querySelectorAll('.limit')].map((line) => Number(line.getAttribute('y1')));
    const dots = [...host.querySelectorAll('.point')].map((dot) => Number(dot.getAttribute('cy')));
    for (const y of dots) expect(y > (high ?? NaN) && y < (low ?? NaN)).toBe(true);
    expect(host.querySelectorAll('tbody tr')).toHaveLength(4);
  });
});

describe('how closely a coach repeats a mark', () => {
  const figures = {
    spreadAt1080: { shoulder: 2.14, elbow: 1.4, wrist: 1.5 },
    degreesOfFreedom: 24,
    frames: 12,
    rounds: 1,
    measuredAt: '2026-03-03T18:00:00.000Z',
    inUse: true,
    typicalErrors: null,
  };
  const given = { defaultAt1080: { shoulder: 3, elbow: 2, wrist: 2 }, framesNeeded: 10, rounds: [] };

  it('says what is missing while it does not count', () => {
    expect(sayRepeatability({ ...given, figures: null })).toContain('not known yet');
    expect(sayRepeatability({ ...given, figures: { ...figures, frames: 9, inUse: false } })).toContain(
      '1 frame more and it counts',
    );
    expect(sayRepeatability({ ...given, figures })).toContain('within about 2.1 px at the shoulder');
  });
});

import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import type { DeskState } from '../state/desk-state';
import { bareDesk } from '../state/testing';
import { ClipOpener } from './clip-frames';
import type { TheirMark } from './desk-stage';
import type { PicturePoint } from './spaces';
import { Stage } from './stage';
import { StageController } from './stage-controller';
import { stageProviders } from './stage-providers';
import { PaintedSource } from './testing';
import { toStage } from './view-transform';

@Component({
  selector: 'st-stage-host',
  imports: [Stage],
  template: `<div style="width: 800px; height: 450px">
    <st-stage [state]="state()" [theirs]="theirs()" />
  </div>`,
  providers: [stageProviders],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class StageHost {
  readonly state = signal<DeskState>(bareDesk());
  readonly theirs = signal<readonly TheirMark[]>([]);
}

let host: ComponentFixture<StageHost> | null = null;
let painted = new PaintedSource();

/** What the newest `show` has put on the page. */
export function fixture(): ComponentFixture<StageHost> {
  if (!host) throw new Error('no stage is shown');
  return host;
}

export function source(): PaintedSource {
  return painted;
}

export function controller(): StageController {
  return fixture().debugElement.injector.get(StageController);
}

/** Puts a stage of 800 × 450 on the page, with a source of painted frames. */
export async function show(desk: DeskState, from = new PaintedSource()): Promise<void> {
  painted = from;
  TestBed.configureTestingModule({
    providers: [{ provide: ClipOpener, useValue: { open: () => Promise.resolve(from) } }],
  });
  host = TestBed.createComponent(StageHost);
  host.componentInstance.state.set(desk);
  await settle();
}

/** Until every signal is drawn: ResizeObserver and pictures answer after the frame in which they were asked. */
export async function settle(): Promise<void> {
  for (let turn = 0; turn < 4; turn++) {
    await fixture().whenStable();
    await new Promise(requestAnimationFrame);
  }
}

export function element<E extends HTMLElement>(selector: string): E {
  const found = (fixture().nativeElement as HTMLElement).querySelector<E>(selector);
  if (!found) throw new Error(`no ${selector}`);
  return found;
}

export function fire(type: string, point: PicturePoint, init: PointerEventInit = {}): void {
  const target = element('.pointers');
  const { left, top } = target.getBoundingClientRect();
  const at = toStage(controller().view(), point);
  // Constructed events have no live pointer to capture.
  target.setPointerCapture = () => undefined;
  target.dispatchEvent(
    new PointerEvent(type, {
      bubbles: true,
      cancelable: true,
      pointerId: 1,
      pointerType: 'mouse',
      clientX: left + at.x,
      clientY: top + at.y,
      ...init,
    }),
  );
}

export async function click(point: PicturePoint): Promise<void> {
  fire('pointermove', point);
  fire('pointerdown', point);
  fire('pointerup', point);
  await settle();
}

/** The pixel at a picture point on a sheet of marks: 0 is the resting one, 1 the moving one. */
export function drawnAt(layer: 0 | 1, point: PicturePoint): readonly [number, number, number, number] {
  const canvas = (fixture().nativeElement as HTMLElement).querySelectorAll<HTMLCanvasElement>(
    '.konvajs-content canvas',
  )[layer];
  const context = canvas?.getContext('2d');
  if (!canvas || !context) throw new Error('no marks');
  const ratio = canvas.width / 800;
  const at = toStage(controller().view(), point);
  const [x, y] = [Math.round(at.x * ratio), Math.round(at.y * ratio)];
  const { data } = context.getImageData(x, y, 1, 1);
  return [data[0] ?? 0, data[1] ?? 0, data[2] ?? 0, data[3] ?? 0];
}

export function pictureAt(point: PicturePoint): number {
  const canvas = element<HTMLCanvasElement>('canvas.sheet');
  const at = toStage(controller().view(), point);
  const ratio = canvas.width / 800;
  const pixel = canvas
    .getContext('2d')
    ?.getImageData(Math.floor(at.x * ratio), Math.floor(at.y * ratio), 1, 1);
  return pixel?.data[0] ?? -1;
}

/** Takes the stage off the page; call it after each test. */
export function takeDown(): void {
  host?.destroy();
  host = null;
}

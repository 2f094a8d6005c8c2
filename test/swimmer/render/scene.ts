import { type Camera, cameraDrift } from '../model/camera';
import { type SwimmerMotion, swimmerMotion } from '../model/swimmer-motion';
import type { SwimmerStyle } from '../model/style';
import { bodyMesh } from './body';
import { BODY_FRAGMENT, BODY_VERTEX, BUBBLE_FRAGMENT, BUBBLE_VERTEX } from './body-shader';
import { bubblesAt } from './bubbles';
import { BACKDROP_SCALE, Canvas3d, type Programme } from './canvas3d';
import { VERTEX_FLOATS } from './loft';
import { type Look, POOL } from './look';
import { BACKDROP_FRAGMENT, FINISH_FRAGMENT, SCREEN_VERTEX } from './water-shader';

/** All that a film is drawn from. */
export interface FilmPlan {
  readonly style: SwimmerStyle;
  readonly camera: Camera;
  readonly look: Look;
  readonly frames: number;
  readonly framesPerSecond: number;
  /** Level pixels from the picture's middle of the lower end of the cord; null without a cord. */
  readonly cord: { readonly x: number; readonly y: number } | null;
}

/** Draws any frame of a film on a canvas, in any order. Runs in the page. */
export class Scene {
  private readonly canvas3d: Canvas3d;
  private readonly motion: SwimmerMotion;
  private readonly body: Programme;
  private readonly bubbles: Programme;
  private readonly backdrop: Programme;
  private readonly finish: Programme;

  constructor(
    canvas: HTMLCanvasElement | OffscreenCanvas,
    private readonly plan: FilmPlan,
  ) {
    const { width, height } = plan.camera;
    this.canvas3d = new Canvas3d(canvas, width, height);
    this.motion = swimmerMotion(plan.style, plan.frames / plan.framesPerSecond);
    this.body = this.canvas3d.programme(BODY_VERTEX, BODY_FRAGMENT);
    this.bubbles = this.canvas3d.programme(BUBBLE_VERTEX, BUBBLE_FRAGMENT);
    const places = {
      SWIMMER: POOL.swimmerAt,
      WALL: POOL.farWallAt,
      ENDWALL: POOL.endWallAt,
      FLOOR: POOL.floorDepth,
      LANE: POOL.laneLineAt,
    };
    this.backdrop = this.canvas3d.programme(SCREEN_VERTEX, BACKDROP_FRAGMENT(places));
    this.finish = this.canvas3d.programme(SCREEN_VERTEX, FINISH_FRAGMENT);
  }

  /** Draws frame n and answers its pixels: RGBA rows, the lowest first. */
  draw(frame: number): Uint8Array {
    const timeS = frame / this.plan.framesPerSecond;
    this.drawSwimmer(timeS);
    this.drawPool(timeS);
    return this.canvas3d.pixels();
  }

  private shared(programme: Programme, timeS: number): void {
    const { camera, look } = this.plan;
    const roll = (camera.rollDeg * Math.PI) / 180;
    const travel = camera.travel === 'right' ? 1 : -1;
    programme.set('size', camera.width, camera.height);
    programme.set(
      'frame',
      camera.pixelsPerM,
      camera.depthM,
      (camera.aheadShare - 0.5) * camera.width,
      cameraDrift(timeS),
    );
    programme.set('facing', travel, travel, camera.view === 'front-underwater' ? 1 : 0);
    programme.set('roll', Math.cos(roll), Math.sin(roll));
    programme.set('time', timeS + this.plan.style.seed * 3.7);
    programme.set('green', look.green);
  }

  private drawSwimmer(timeS: number): void {
    const { look } = this.plan;
    const mesh = bodyMesh(this.motion.poseAt(timeS), look);
    this.canvas3d.intoTexture();
    this.body.use();
    this.shared(this.body, timeS);
    this.body.set('suit', ...look.suit);
    this.body.set('cap', ...look.cap);
    this.body.set('suitCut', look.suitCut === 'trunks' ? 1 : 0);
    this.body.set('ahead', POOL.swimSpeed * timeS);
    this.body.drawTriangles(mesh.vertices, mesh.triangles, VERTEX_FLOATS, {
      place: 3,
      normal: 3,
      colour: 3,
      material: 1,
      local: 3,
    });
    this.bubbles.use();
    this.shared(this.bubbles, timeS);
    const points = bubblesAt(this.motion, timeS).flatMap(({ f, d, r, radius, solid }) => [
      f,
      d,
      r,
      radius,
      solid,
    ]);
    this.bubbles.drawPoints(points, 5, { place: 3, looks: 2 });
    this.canvas3d.resolve();
  }

  private drawPool(timeS: number): void {
    const { look, cord } = this.plan;
    this.canvas3d.intoBackdrop();
    this.screen(this.backdrop, timeS);
    this.backdrop.set('coarse', BACKDROP_SCALE);
    this.backdrop.set('laneLine', ...look.laneLine);
    this.backdrop.set('laneMark', ...look.laneMark);
    this.backdrop.drawTriangles([-1, -1, 3, -1, -1, 3], [0, 1, 2], 2, { corner: 2 });
    this.canvas3d.intoPicture();
    this.screen(this.finish, timeS);
    this.finish.setUnit('body', 0);
    this.finish.setUnit('backdrop', 1);
    this.finish.set('cord', cord?.x ?? 1e4, cord?.y ?? 1e4);
    this.finish.drawTriangles([-1, -1, 3, -1, -1, 3], [0, 1, 2], 2, { corner: 2 });
  }

  private screen(programme: Programme, timeS: number): void {
    const { camera, style } = this.plan;
    programme.use();
    this.shared(programme, timeS);
    programme.set('travelled', POOL.swimSpeed * timeS - cameraDrift(timeS) + style.seed * 1.13);
    programme.set('side', camera.travel === 'right' ? 1 : -1);
    programme.setFlag('front', camera.view === 'front-underwater');
    programme.set('lensDepth', camera.depthM);
  }
}

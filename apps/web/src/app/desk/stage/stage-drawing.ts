import { drawLoupeCross, LOUPE_SIDE } from './loupe';
import { movingNodes, restingNodes, type ScenePlace } from './mark-scene';
import type { MarkSurface } from './mark-surface';
import type { Size } from './spaces';
import type { StageModel } from './stage-model';

/** Draws the shown frame. */
export function drawPicture(model: StageModel, element: HTMLCanvasElement): void {
  const [size, ratio, picture] = [model.size(), model.ratio(), model.picture()];
  const [view, canvas] = [model.controller.view(), model.canvas()];
  fitCanvas(element, size, ratio);
  const context = element.getContext('2d');
  if (context) canvas?.draw(context, picture, view, size, ratio);
}

/** Draws what keeps still while a joint of the chosen arm is dragged. */
export function drawResting(model: StageModel, surface: MarkSurface): void {
  const [place, desk] = [scenePlace(model), model.desk()];
  if (!place) return;
  const chosen = desk.arm();
  const scene = {
    other: desk.armOn(chosen === 'left' ? 'right' : 'left'),
    chosen,
    trail: model.controller.trailWanted() ? desk.neighbours() : [],
    plumb: desk.task().kind === 'plumb' ? null : desk.plumb(),
  };
  surface.resize(place.stage, model.ratio());
  surface.drawResting(restingNodes(scene, place));
}

/** Draws the chosen arm, its angles and what hangs on the pointer. */
export function drawMoving(model: StageModel, surface: MarkSurface): void {
  const [place, desk, bench] = [scenePlace(model), model.desk(), model.bench()];
  if (!place) return;
  const [chosen, tool] = [desk.arm(), bench.tool()];
  const scene = {
    arm: desk.armOn(chosen),
    chosen,
    chosenJoint: desk.canEdit() ? desk.joint() : null,
    angles: desk.angles(),
    plumb: bench.plumb(),
    drawsPlumb: desk.task().kind === 'plumb',
    tool,
    aim: bench.inspected()?.point ?? null,
    crosshair: model.crosshair(),
    hovered: tool.name === 'dragging-joint' ? null : bench.hovered(),
  };
  surface.resize(place.stage, model.ratio());
  surface.drawMoving(movingNodes(scene, place));
}

/** Draws the pixels round the joint being placed or dragged. */
export function drawLoupe(model: StageModel, element: HTMLCanvasElement): void {
  const [loupe, canvas, colours, ratio] = [model.loupe(), model.canvas(), model.colours(), model.ratio()];
  if (!loupe || !canvas || !colours || !model.picture()) return;
  fitCanvas(element, { width: LOUPE_SIDE, height: LOUPE_SIDE }, ratio);
  const context = element.getContext('2d');
  if (!context) return;
  canvas.drawAround(context, loupe.point, element.width, loupe.scale * ratio);
  drawLoupeCross(context, colours.arm[model.desk().arm()], colours.casing, ratio);
}

function scenePlace(model: StageModel): ScenePlace | null {
  const [colours, stage] = [model.colours(), model.size()];
  if (!colours || stage.width === 0) return null;
  return { view: model.controller.view(), stage, colours, taken: model.taken() };
}

/** Gives a canvas one pixel of its own for every device pixel. */
function fitCanvas(element: HTMLCanvasElement, { width, height }: Size, ratio: number): void {
  const wide = Math.round(width * ratio);
  const high = Math.round(height * ratio);
  if (element.width !== wide) element.width = wide;
  if (element.height !== high) element.height = high;
}

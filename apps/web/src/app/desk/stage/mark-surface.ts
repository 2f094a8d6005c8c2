import { type Group, KonvaStage, Layer, type Shape } from './konva-core';
import type { Size } from './spaces';

/** The two sheets over the picture: what rests while a joint is dragged, and what moves. */
export class MarkSurface {
  private readonly stage: KonvaStage;
  private readonly resting = new Layer({ listening: false });
  private readonly moving = new Layer({ listening: false });

  /** @param container element whose content it becomes; it takes no pointer events */
  constructor(container: HTMLDivElement) {
    this.stage = new KonvaStage({ container, width: 1, height: 1, listening: false });
    this.stage.add(this.resting, this.moving);
  }

  /** CSS pixels, and device pixels per CSS pixel. A change empties both sheets. */
  resize({ width, height }: Size, ratio: number): void {
    if (this.stage.width() !== width || this.stage.height() !== height) this.stage.size({ width, height });
    for (const layer of [this.resting, this.moving]) {
      if (layer.getCanvas().getPixelRatio() !== ratio) layer.getCanvas().setPixelRatio(ratio);
    }
  }

  drawResting(nodes: readonly (Group | Shape)[]): void {
    redraw(this.resting, nodes);
  }

  drawMoving(nodes: readonly (Group | Shape)[]): void {
    redraw(this.moving, nodes);
  }

  destroy(): void {
    this.stage.destroy();
  }
}

function redraw(layer: Layer, nodes: readonly (Group | Shape)[]): void {
  layer.destroyChildren();
  for (const node of nodes) layer.add(node);
  layer.draw();
}

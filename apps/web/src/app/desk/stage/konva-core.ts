import { Konva } from 'konva/lib/Core';

/**
 * Konva draws when the stage says so: on its own it would draw one display frame after a change, and a dragged joint
 * would trail the pointer.
 */
Konva.autoDrawEnabled = false;

export { Group } from 'konva/lib/Group';
export { Layer } from 'konva/lib/Layer';
export { Shape } from 'konva/lib/Shape';
export { Arc } from 'konva/lib/shapes/Arc';
export { Circle } from 'konva/lib/shapes/Circle';
export { Line } from 'konva/lib/shapes/Line';
export { Rect } from 'konva/lib/shapes/Rect';
export { Text } from 'konva/lib/shapes/Text';
export { Stage as KonvaStage } from 'konva/lib/Stage';

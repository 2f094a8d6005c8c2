import type { MarkingContext } from '../uncertainty/arm-uncertainty';

/** Where the camera stands: from the side or from the front, under water or above it, or anywhere on the deck. */
export type CameraView = 'side-underwater' | 'front-underwater' | 'side-above' | 'front-above' | 'deck';

/** Angle between the left and the right edge of the picture, degrees, measured in water or in air. */
export interface FieldOfView {
  readonly deg: number;
  readonly medium: 'water' | 'air';
}

/** What the view checks of a clip depend on beside its marks. */
export interface ViewContext extends MarkingContext {
  readonly view: CameraView;
  /** Pixels as shown. */
  readonly picture: { readonly width: number; readonly height: number };
  /** Null while nobody has said it. */
  readonly fieldOfView: FieldOfView | null;
}

export function isUnderwater(view: CameraView): boolean {
  return view === 'side-underwater' || view === 'front-underwater';
}

export function isFromTheSide(view: CameraView): boolean {
  return view === 'side-underwater' || view === 'side-above';
}

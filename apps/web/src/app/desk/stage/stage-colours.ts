import type { ArmSide } from '@stillstroke/geometry/arm';

/** Colours of what is drawn on the picture. */
export interface StageColours {
  readonly arm: Readonly<Record<ArmSide, string>>;
  /** Dark edge that parts every line from the water. */
  readonly casing: string;
  /** Plumb lines, arcs and numbers. */
  readonly plumb: string;
}

/** The theme's colours as they apply to an element. */
export function stageColours(element: Element): StageColours {
  const style = getComputedStyle(element);
  const token = (name: string, fallback: string) => style.getPropertyValue(name).trim() || fallback;
  return {
    arm: {
      left: token('--st-left-on-picture', '#ffb733'),
      right: token('--st-right-on-picture', '#4ba3db'),
    },
    casing: token('--st-ink', '#10222b'),
    plumb: '#ffffff',
  };
}

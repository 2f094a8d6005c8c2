import type { View } from '@stillstroke/contract/clip-facts';

/** Views from the side, in which the arm's angles mean what their definitions say; the first is preferred. */
export const sideViews = ['side-underwater', 'side-above'] as const satisfies readonly View[];
export type SideView = (typeof sideViews)[number];

/** The one view out of those there that is compared, since figures of different views are never mixed. */
export function comparedView(there: readonly View[]): SideView | null {
  return sideViews.find((view) => there.includes(view)) ?? null;
}

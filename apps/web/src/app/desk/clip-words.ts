import type { Travel, View } from '@stillstroke/contract/clip-facts';

export const viewWords: Readonly<Record<View, string>> = {
  'side-underwater': 'side, under water',
  'front-underwater': 'front, under water',
  'side-above': 'side, above water',
  'front-above': 'front, above water',
  deck: 'from the deck',
};

export const travelWords: Readonly<Record<Travel, string>> = {
  left: 'to the left',
  right: 'to the right',
};

/** `28 Nov 2026` for a date `YYYY-MM-DD`. */
export function sayDate(date: string): string {
  const day = new Date(`${date}T00:00:00Z`);
  return day.toLocaleDateString('en-GB', {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    timeZone: 'UTC',
  });
}

import type { SignedInUser } from '@stillstroke/contract/auth';

export interface Destination {
  readonly label: string;
  readonly address: string;
}

/** The areas a person can go to, in the order of the bar. */
export function destinationsOf(user: SignedInUser | null): readonly Destination[] {
  switch (user?.role) {
    case 'admin':
      return [
        { label: 'Squad', address: '/squad' },
        { label: 'Club', address: '/club' },
      ];
    case 'coach':
      return [{ label: 'Squad', address: '/squad' }];
    case 'athlete':
      return user.athleteId
        ? [
            { label: 'My sessions', address: `/athletes/${user.athleteId}` },
            { label: 'My trend', address: `/athletes/${user.athleteId}/trend` },
          ]
        : [];
    default:
      return [];
  }
}

/** Whether an address lies in an area: athletes, their sessions and clips belong to "Squad" for those who have one. */
export function liesIn(destination: Destination, url: string, user: SignedInUser | null): boolean {
  const path = url.replace(/[?#].*$/, '');
  if (path === destination.address) return true;
  if (user?.role === 'athlete') {
    return destination.label === 'My sessions' && /^\/(sessions|reviews)\//.test(path);
  }
  if (destination.address === '/squad') return /^\/(squad|athletes|sessions|clips|reviews)(\/|$)/.test(path);
  return path.startsWith(`${destination.address}/`);
}

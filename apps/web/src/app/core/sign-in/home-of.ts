import type { SignedInUser } from '@stillstroke/contract/auth';

/** The page where a person's work starts. */
export function homeOf(user: SignedInUser | null): string {
  if (!user) return '/sign-in';
  if (user.role === 'coach' || user.role === 'admin') return '/squad';
  return user.athleteId ? `/athletes/${user.athleteId}` : '/nothing-yet';
}

/** Where to go after signing in: the address asked for at first, if it is one of ours, else home. */
export function addressAfterSignIn(back: string | null | undefined, user: SignedInUser): string {
  const ours = back?.startsWith('/') && !back.startsWith('//') && !back.startsWith('/sign-in');
  return ours && back !== '/' && back ? back : homeOf(user);
}

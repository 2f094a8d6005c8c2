import type { SignedInUser } from '@stillstroke/contract/auth';
import { addressAfterSignIn, homeOf } from './home-of';

const coach: SignedInUser = {
  id: '6a0f7a52-7c57-4a3b-9a5e-0c5f9f1c2d01',
  name: 'Owen Hale',
  email: 'coach@tarnvalley.example',
  role: 'coach',
  clubId: '6a0f7a52-7c57-4a3b-9a5e-0c5f9f1c2d02',
  clubName: 'Tarn Valley Swim Club',
  athleteId: null,
};

describe('homeOf', () => {
  it('leads each role to where its work starts', () => {
    expect(homeOf(null)).toBe('/sign-in');
    expect(homeOf(coach)).toBe('/squad');
    expect(homeOf({ ...coach, role: 'admin' })).toBe('/squad');
    expect(homeOf({ ...coach, role: 'athlete', athleteId: 'a1' })).toBe('/athletes/a1');
    expect(homeOf({ ...coach, role: 'guardian' })).toBe('/nothing-yet');
  });
});

describe('addressAfterSignIn', () => {
  it('goes back to the address that was asked for', () => {
    expect(addressAfterSignIn('/clips/c1?frame=12', coach)).toBe('/clips/c1?frame=12');
  });

  it('goes home for no address, the bare one, the sign-in page, and addresses of other hosts', () => {
    for (const back of [
      undefined,
      null,
      '',
      '/',
      '/sign-in?back=%2F',
      '//evil.example',
      'https://evil.example',
    ]) {
      expect(addressAfterSignIn(back, coach)).toBe('/squad');
    }
  });
});

import type {} from 'passport';
import type { SignedInUser } from '@stillstroke/contract/auth';

declare global {
  namespace Express {
    // Passport puts who is signed in on the request under this name.
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type
    interface User extends SignedInUser {}
  }
}

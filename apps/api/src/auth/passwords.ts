import { hash, verify } from '@node-rs/argon2';

/** argon2id (the library's default algorithm) with the smallest cost that the OWASP password storage sheet names for it. */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(normalized(password), cost);

/**
 * Whether the password belongs to the hash. Without a hash (no such account, none set yet) it works as long as with one
 * and answers false, so that the time taken does not tell which accounts there are.
 */
export async function passwordMatches(passwordHash: string | null, password: string): Promise<boolean> {
  const matches = await verify(passwordHash ?? (await hashOfNothing()), normalized(password));
  return passwordHash !== null && matches;
}

/** One letter may be typed as different code points on different keyboards. */
const normalized = (password: string) => password.normalize('NFKC');

let nothing: Promise<string> | undefined;
/** A hash that is as dear to check as a real one; made once. */
export function hashOfNothing(): Promise<string> {
  nothing ??= hashPassword(crypto.randomUUID());
  return nothing;
}

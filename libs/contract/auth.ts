import * as z from 'zod';
import { endpoint } from './endpoint';
import { emailSchema, idSchema, nameSchema } from './fields';
import { roleSchema } from './roles';

export const passwordMinimum = 12;
/** Longer than any passphrase, short enough that hashing it is no attack. */
export const newPasswordSchema = z
  .string()
  .min(passwordMinimum, `Use at least ${passwordMinimum} characters.`)
  .max(256, 'Use at most 256 characters.');

export const signedInUserSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  clubId: idSchema,
  clubName: z.string(),
  /** The athlete that this account is, for the role athlete. */
  athleteId: idSchema.nullable(),
});
export type SignedInUser = z.infer<typeof signedInUserSchema>;

export const userAnswer = z.strictObject({ user: signedInUserSchema });

export const signIn = endpoint({
  method: 'post',
  path: '/api/auth/sign-in',
  access: 'public',
  summary: 'Sign in with e-mail and password',
  body: z.strictObject({ email: emailSchema, password: z.string().min(1).max(256) }),
  answer: userAnswer,
});

export const signOut = endpoint({
  method: 'post',
  path: '/api/auth/sign-out',
  access: 'signed-in',
  summary: 'Sign out; the sign-in cookie is worthless afterwards',
  status: 204,
  answerKind: 'none',
});

export const getMe = endpoint({
  method: 'get',
  path: '/api/auth/me',
  access: 'signed-in',
  summary: 'Who is signed in',
  answer: userAnswer,
});

/** Facts the sign-in page needs before anybody is signed in. */
export const getSignInPage = endpoint({
  method: 'get',
  path: '/api/auth/page',
  access: 'public',
  summary: 'The demo accounts while the demo is on; sets the CSRF cookie',
  answer: z.strictObject({
    demo: z
      .strictObject({
        password: z.string(),
        accounts: z.array(
          z.strictObject({ email: z.string(), name: z.string(), role: roleSchema, clubName: z.string() }),
        ),
      })
      .nullable(),
  }),
});

export const tokenParams = z.strictObject({ token: z.string().regex(/^[A-Za-z0-9_-]{20,100}$/) });

export const getInvitation = endpoint({
  method: 'get',
  path: '/api/invitations/:token',
  access: 'public',
  summary: 'Whom an invitation link is for; 404 when spent or expired',
  params: tokenParams,
  answer: z.strictObject({ name: nameSchema, email: z.string(), clubName: z.string(), role: roleSchema }),
});

export const acceptInvitation = endpoint({
  method: 'post',
  path: '/api/invitations/:token/accept',
  access: 'public',
  summary: 'Set the own password and sign in',
  params: tokenParams,
  body: z.strictObject({ password: newPasswordSchema }),
  answer: userAnswer,
});

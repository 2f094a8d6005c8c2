import * as z from 'zod';

/** `guardian` has an account and may sign in; what a guardian may read is granted with consent, not yet here. */
export const roleSchema = z.enum(['admin', 'coach', 'athlete', 'guardian']);
export type Role = z.infer<typeof roleSchema>;

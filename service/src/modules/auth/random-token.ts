import { createHash, randomBytes } from 'node:crypto';

/** An unguessable token as shown once to its owner. */
export const randomToken = (): string => randomBytes(32).toString('base64url');

/** What is stored of a token. It is random and long, so a plain hash suffices. */
export const tokenHash = (token: string): string => createHash('sha256').update(token).digest('hex');

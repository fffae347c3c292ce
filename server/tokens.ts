import { createHash, randomBytes } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { z } from 'zod';
import { services } from './runtime';

const ISSUER = 'cragline';
const ACCESS_MINUTES = 15;
const LEEWAY_S = 60;

const claimsSchema = z.object({
  sub: z.string().regex(/^\d+$/),
  sid: z.number().int().positive(),
  iat: z.number(),
});

export interface AccessClaims {
  readonly personId: number;
  readonly sessionId: number;
}

/** A signed access token of 15 minutes; kept in memory by the page and sent as Bearer. */
export function signAccessToken({ personId, sessionId }: AccessClaims): string {
  return jwt.sign({ sid: sessionId }, services().config.tokenKey, {
    algorithm: 'HS256',
    subject: String(personId),
    issuer: ISSUER,
    audience: 'api',
    expiresIn: ACCESS_MINUTES * 60,
  });
}

/** The claims of a token that is ours, current and whole; null for any other. */
export function readAccessToken(token: string): AccessClaims | null {
  try {
    const decoded = jwt.verify(token, services().config.tokenKey, {
      algorithms: ['HS256'],
      issuer: ISSUER,
      audience: 'api',
    });
    const claims = claimsSchema.parse(decoded);
    // jsonwebtoken takes a token from the future as it comes
    if (claims.iat > Date.now() / 1000 + LEEWAY_S) return null;
    return { personId: Number(claims.sub), sessionId: claims.sid };
  } catch (error) {
    if (error instanceof jwt.JsonWebTokenError || error instanceof z.ZodError) return null;
    throw error;
  }
}

/** 256 random bits for a link or a cookie. */
export const randomToken = () => randomBytes(32).toString('base64url');

/** What is stored of such a token. It is random, so a plain hash is enough. */
export const tokenHash = (token: string) => createHash('sha256').update(token).digest('hex');

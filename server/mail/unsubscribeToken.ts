import { createHmac, timingSafeEqual } from 'node:crypto';
import { env } from '../config/runtime.ts';

function sign(membershipId: string, kind: string): string {
  return createHmac('sha256', env.sessionSecret)
    .update(`unsubscribe:${membershipId}:${kind}`)
    .digest('base64url');
}

/** Path of the page that turns one kind of notice off for one member, without sign-in. */
export function unsubscribePath(membershipId: string, kind: string): string {
  return `/unsubscribe/${membershipId}.${kind}.${sign(membershipId, kind)}`;
}

/** What an unsubscribe token names, or null when it was not made here. */
export function readUnsubscribeToken(token: string): { membershipId: string; kind: string } | null {
  const [membershipId, kind, signature] = token.split('.');
  if (!membershipId || !kind || !signature) return null;
  const right = Buffer.from(sign(membershipId, kind));
  const given = Buffer.from(signature);
  return right.length === given.length && timingSafeEqual(right, given)
    ? { membershipId, kind }
    : null;
}

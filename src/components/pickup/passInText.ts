import { readPass } from '#shared/domain/pickup/passCode.ts';

const mark = '#pass=';

/** The pass in what was typed, or in the address that its square holds; null when there is none, or it was mistyped. */
export function passInText(text: string): string | null {
  const at = text.indexOf(mark);
  return readPass(at < 0 ? text : text.slice(at + mark.length));
}

/** What a pass's square holds: scanned with any camera it opens the desk, for who is signed in and hands over. */
export const passAddress = (pickupUrl: string, pass: string) => `${pickupUrl}${mark}${pass}`;

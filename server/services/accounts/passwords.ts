import { hash, verify } from '@node-rs/argon2';

const options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };
let decoy: Promise<string> | undefined;

/** argon2id hash (OWASP's minimum: 19 MiB, 2 passes, 1 lane). */
export function hashPassword(password: string): Promise<string> {
  return hash(password.normalize('NFC'), options);
}

/** Whether a password fits; without a hash it takes the same time, so that nobody learns whether an account exists. */
export async function verifyPassword(
  stored: string | undefined,
  password: string,
): Promise<boolean> {
  decoy ??= hashPassword('a decoy that no account has');
  const right = await verify(stored ?? (await decoy), password.normalize('NFC'));
  return stored !== undefined && right;
}

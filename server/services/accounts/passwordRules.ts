import { readFileSync } from 'node:fs';
import path from 'node:path';
import { invalid } from '../problem.ts';

const file = path.join(import.meta.dirname, 'data', 'commonPasswords.txt');
let common: ReadonlySet<string> | undefined;

function commonPasswords(): ReadonlySet<string> {
  common ??= new Set(
    readFileSync(file, 'utf8')
      .split('\n')
      .filter((line) => line !== '' && !line.startsWith('#')),
  );
  return common;
}

/** Whether a password is among the commonest, whatever its case. */
export function isCommonPassword(password: string): boolean {
  const plain = password.normalize('NFC').toLowerCase();
  // "aaaaaaaaaa" and the like are no better than what the list holds.
  return commonPasswords().has(plain) || /^(.)\1*$/u.test(plain);
}

/**
 * Refuses a new password that is easily guessed; its length is checked by the schema.
 * @throws DomainProblem 422 at the field `password`
 */
export function requireGoodPassword(password: string): void {
  if (isCommonPassword(password)) {
    throw invalid({
      password: 'Many people use this one, so it is guessed first. Choose another.',
    });
  }
}

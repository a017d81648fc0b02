import path from 'node:path';
import type { Person } from './instance.ts';

/** Keeps pictures of what everybody saw when a test failed, in the folder that E2E_SHOTS names. */
export async function keepShots(people: Record<string, Person>): Promise<void> {
  const folder = process.env.E2E_SHOTS;
  if (!folder) return;
  for (const [name, { page }] of Object.entries(people)) {
    await page.screenshot({ path: path.join(folder, `${name}.png`) }).catch(() => undefined);
  }
}

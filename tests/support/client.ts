import type { Express } from 'express';
import supertest from 'supertest';
import { createApp } from '#server/app.ts';

let app: Express | undefined;

/** The app of this test file. */
export function testApp(): Express {
  app ??= createApp();
  return app;
}

export type Agent = ReturnType<typeof supertest.agent>;

/** A browser of this origin, signed out, with its own cookies. Paths are below the root: `/api/v1/...`. */
export function browser(): Agent {
  return supertest.agent(testApp()).set('Sec-Fetch-Site', 'same-origin');
}

export const testPassword = 'a password for tests';

/** A browser in which the account with this address (made with testPassword) is signed in. */
export async function signedIn(email: string): Promise<Agent> {
  const agent = browser();
  await agent.post('/api/v1/session').send({ email, password: testPassword }).expect(200);
  return agent;
}

import { readEnv } from './env.ts';

/** The checked environment of this process. */
export const env = readEnv(process.env);

let listeningAt = env.publicUrl ?? `http://${env.host}:${env.port}`;

/** Where links in mails lead: PUBLIC_URL, or the address this process listens on. No trailing slash. */
export function publicUrl(): string {
  return listeningAt;
}

/** Told once by main when the port is known. */
export function setListeningUrl(url: string): void {
  if (!env.publicUrl) listeningAt = url;
}

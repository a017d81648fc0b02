import { spawn } from 'node:child_process';
import path from 'node:path';
import { env } from '#server/config/runtime.ts';

/** A second server on the same database, in a process of its own. */
export async function startProcess(): Promise<{ origin: string; stop(): Promise<void> }> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: path.join(import.meta.dirname, '..', '..'),
    env: {
      ...process.env,
      PORT: '0',
      SESSION_SECRET: env.sessionSecret,
      TAREWELL_DEMO: '0',
    },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const origin = await new Promise<string>((resolve, reject) => {
    let text = '';
    child.stdout.on('data', (chunk: Buffer) => {
      text += chunk.toString();
      const ready = /ready at (http:\/\/\S+)/.exec(text);
      if (ready?.[1]) resolve(ready[1]);
    });
    child.once('exit', (code) => reject(new Error(`the other process ended with ${code}`)));
  });
  return {
    origin,
    stop: async () => {
      const gone = new Promise((resolve) => child.once('exit', resolve));
      child.kill('SIGTERM');
      await gone;
    },
  };
}

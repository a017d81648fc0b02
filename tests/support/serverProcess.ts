import { spawn, type ChildProcess } from 'node:child_process';
import path from 'node:path';

/** A server that runs, with its address. */
export interface Server {
  readonly url: string;
  /** Ends it by a signal; resolves once it is gone. */
  end(signal: 'SIGTERM' | 'SIGKILL'): Promise<void>;
}

const startMs = 120_000;
const project = path.join(import.meta.dirname, '..', '..');

function waitReady(server: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = '';
    const timer = setTimeout(() => reject(new Error(`server not ready:\n${said}`)), startMs);
    const listen = (chunk: Buffer) => {
      said += chunk.toString();
      const url = /Tarewell is ready at (\S+)/.exec(said)?.[1];
      if (!url) return;
      clearTimeout(timer);
      resolve(url);
    };
    server.stdout?.on('data', listen);
    server.stderr?.on('data', listen);
    server.once('exit', (code) => {
      clearTimeout(timer);
      reject(new Error(`server ended with ${code}:\n${said}`));
    });
  });
}

/** Starts the real server as a process of its own and waits until it is ready. */
export async function startServer(env: Record<string, string>): Promise<Server> {
  const server = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: project,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: { ...process.env, NODE_ENV: 'test', HOST: '127.0.0.1', LOG_LEVEL: 'warn', ...env },
  });
  const gone = new Promise<void>((resolve) => server.once('exit', () => resolve()));
  const end = (signal: 'SIGTERM' | 'SIGKILL') => {
    server.kill(signal);
    return gone;
  };
  try {
    return { url: await waitReady(server), end };
  } catch (error) {
    await end('SIGKILL');
    throw error;
  }
}

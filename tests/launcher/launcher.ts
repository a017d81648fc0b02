import { spawn, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const folder = new URL('../../server/launcher/', import.meta.url);

/** Loads one of the launcher's plain modules, which carry no types. */
export async function load<T>(name: string): Promise<T> {
  return (await import(new URL(name, folder).href)) as T;
}

/** One of the launcher's commands, running, with all it has printed so far. */
export interface Command {
  readonly child: ChildProcess;
  printed(): string;
  /** Waits for a text in what it prints. @throws Error when it ends or 60 s pass without it */
  until(text: string | RegExp): Promise<void>;
  /** @returns its exit code, null when a signal ended it */
  readonly ended: Promise<number | null>;
}

/** Starts a command with the given settings on top of an environment without any. */
export async function start(
  name: string,
  env: Record<string, string>,
  args: string[] = [],
): Promise<Command> {
  const { cleanEnvironment } = await load<{ cleanEnvironment(): NodeJS.ProcessEnv }>(
    'cleanEnvironment.mjs',
  );
  const child = spawn(process.execPath, [fileURLToPath(new URL(name, folder)), ...args], {
    env: { ...cleanEnvironment(), npm_lifecycle_event: '', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  for (const stream of [child.stdout, child.stderr])
    stream.setEncoding('utf8').on('data', (text: string) => (output += text));
  const ended = new Promise<number | null>((resolve) => child.once('close', resolve));
  const until = (text: string | RegExp) =>
    new Promise<void>((resolve, reject) => {
      const fail = (why: string) => reject(new Error(`${why} before ${text}:\n${output}`));
      const timer = setTimeout(() => fail('60 s passed'), 60_000);
      const look = () => {
        if (output.search(text) < 0) return;
        clearTimeout(timer);
        resolve();
      };
      child.stdout.on('data', look);
      child.stderr.on('data', look);
      child.once('close', () => fail('It ended'));
      look();
    });
  return { child, printed: () => output, until, ended };
}

/** Runs a command to its end. */
export async function runToEnd(name: string, env: Record<string, string>, args: string[] = []) {
  const command = await start(name, env, args);
  const code = await command.ended;
  return { code, output: command.printed() };
}

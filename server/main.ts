import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createApp } from './app.ts';
import { pool, sequelize } from './config/database.ts';
import { logger } from './config/logger.ts';
import { migrate } from './config/migrate.ts';
import { env, publicUrl, setListeningUrl } from './config/runtime.ts';
import { closeMail, openMail } from './mail/transport.ts';
import { startJobs } from './jobs/index.ts';
import { attachSockets } from './sockets/index.ts';

const stopDeadlineMs = 3_000;

async function start(): Promise<void> {
  const applied = await migrate(sequelize);
  if (applied.length > 0) logger.info({ applied }, 'schema brought forward');
  await openMail();
  const app = createApp();
  let open = false;
  const http = createServer((req, res) => {
    if (open) app(req, res);
    else res.writeHead(503, { 'Retry-After': '5' }).end('Tarewell is starting.');
  });
  const io = attachSockets(http);
  await new Promise<void>((resolve, reject) => {
    http.once('error', reject);
    http.listen(env.port, env.host, resolve);
  });
  setListeningUrl(`http://${env.host}:${(http.address() as AddressInfo).port}`);
  if (env.demo) {
    const { loadDemo } = await import('#seeds/index.ts');
    await loadDemo();
  }
  open = true;
  const stopJobs = await startJobs();
  process.stdout.write(`Tarewell is ready at ${publicUrl()}\n`);

  let stopping = false;
  const stop = (signal: string) => {
    if (stopping) return;
    stopping = true;
    logger.info({ signal }, 'stopping');
    // The socket adapter can hold the process open when it is asked just after listening.
    setTimeout(() => process.exit(0), stopDeadlineMs).unref();
    void (async () => {
      await stopJobs();
      await closeMail();
      await new Promise<void>((resolve) => void io.close(() => resolve()));
      await sequelize.close();
      await pool.end();
      process.exit(0);
    })();
  };
  process.on('SIGTERM', () => stop('SIGTERM'));
  process.on('SIGINT', () => stop('SIGINT'));
}

start().catch((error: unknown) => {
  logger.fatal({ err: error }, 'could not start');
  process.exit(1);
});

import { logger } from '../config/logger.ts';
import { closingJob, closingSoonJob, planJob } from './closing.ts';
import { eraseExpiredJob } from './eraseExpired.ts';
import { eraseRecordsJob, remindUnclaimedJob } from './pickup.ts';
import { remindDuesJob } from './remindDues.ts';
import { sendMail } from './sendMail.ts';

/** Something done again and again; every process runs it, so it must take its own locks in the database. */
export interface Job {
  readonly name: string;
  readonly everyMs: number;
  run(): Promise<void>;
}

const jobs: readonly Job[] = [
  sendMail,
  eraseExpiredJob,
  closingJob,
  closingSoonJob,
  planJob,
  remindDuesJob,
  remindUnclaimedJob,
  eraseRecordsJob,
];

/** Starts all jobs; the returned function lets running ones finish and starts no more. */
export async function startJobs(list: readonly Job[] = jobs): Promise<() => Promise<void>> {
  let stopped = false;
  const running = new Set<Promise<void>>();
  const timers = list.map((job) => {
    let busy = false;
    const round = () => {
      if (busy || stopped) return;
      busy = true;
      const turn = job
        .run()
        .catch((error: unknown) => logger.error({ err: error, job: job.name }, 'job failed'))
        .finally(() => {
          busy = false;
          running.delete(turn);
        });
      running.add(turn);
    };
    round();
    return setInterval(round, job.everyMs);
  });
  return async () => {
    stopped = true;
    timers.forEach((timer) => clearInterval(timer));
    await Promise.all(running);
  };
}

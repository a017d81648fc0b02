import { eraseOldRecords } from '../services/pickup/records.ts';
import { remindUnclaimed } from '../services/pickup/unclaimed.ts';
import type { Job } from './index.ts';

const hour = 3_600_000;

/** Reminds of shares that nobody has collected yet. */
export const remindUnclaimedJob: Job = {
  name: 'remind of unclaimed shares',
  everyMs: hour,
  run: remindUnclaimed,
};

/** Erases records of reportable salts when their time is over. */
export const eraseRecordsJob: Job = {
  name: 'erase old records',
  everyMs: 6 * hour,
  run: eraseOldRecords,
};

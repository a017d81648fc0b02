import { eraseExpired } from '../services/accounts/eraseExpired.ts';
import type { Job } from './index.ts';

/** Hourly; several processes may do it at once, since deleting twice is harmless. */
export const eraseExpiredJob: Job = {
  name: 'erase-expired',
  everyMs: 3_600_000,
  run: eraseExpired,
};

import { remindDueBuys } from '../services/orders/remindDues.ts';
import type { Job } from './index.ts';

/** Reminds members of dues the day before they are due and the day after. */
export const remindDuesJob: Job = { name: 'remind-dues', everyMs: 15 * 60_000, run: remindDueBuys };

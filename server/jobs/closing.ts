import { closeDueBuys } from '../services/sheet/closeBuys.ts';
import { requestMissingPlans } from '../services/sheet/planning.ts';
import { tellClosingSoon } from '../services/sheet/tellClosingSoon.ts';
import type { Job } from './index.ts';

/** Locks or freezes buys whose closing time has come, and cancels those that nobody thawed. */
export const closingJob: Job = { name: 'closing', everyMs: 1_000, run: closeDueBuys };

/** Tells of buys that close within a day. */
export const closingSoonJob: Job = { name: 'closing-soon', everyMs: 60_000, run: tellClosingSoon };

/** Plans what a change in another process, or a crash, left without a plan. */
export const planJob: Job = { name: 'plans', everyMs: 1_000, run: requestMissingPlans };

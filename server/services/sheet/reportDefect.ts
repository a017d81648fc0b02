import type { DefectBody } from '#shared/schemas/sheet.ts';
import { logger } from '../../config/logger.ts';
import type { BuyActor } from '../actors.ts';

/** Logs that a browser's sums differ from the server's for one version: the same code must give the same result. */
export function reportDefect(actor: BuyActor, defect: DefectBody): void {
  logger.error({ buyId: actor.buy.id, requestId: actor.requestId, defect }, 'sums differ');
}

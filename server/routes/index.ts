import { Router, type RequestHandler } from 'express';
import multer from 'multer';
import { action } from '../middlewares/action.ts';
import { noSuchRoute } from '../middlewares/problem.ts';
import type { RouteDef } from '../middlewares/route.ts';
import { accountsRoutes } from './accounts.ts';
import { auditRoutes } from './audit.ts';
import { billsRoutes } from './bills.ts';
import { buyPeopleRoutes } from './buyPeople.ts';
import { buysRoutes } from './buys.ts';
import { buyTermsRoutes } from './buyTerms.ts';
import { clubsRoutes } from './clubs.ts';
import { handOnsRoutes } from './handOns.ts';
import { invitationsRoutes } from './invitations.ts';
import { ledgerRoutes } from './ledger.ts';
import { membersRoutes } from './members.ts';
import { offerImportRoutes } from './offerImport.ts';
import { noticesRoutes } from './notices.ts';
import { ordersRoutes } from './orders.ts';
import { outboxRoutes } from './outbox.ts';
import { pickupRoutes } from './pickup.ts';
import { saltsRoutes } from './salts.ts';
import { sessionRoutes } from './session.ts';
import { sheetRoutes } from './sheet.ts';
import { splitsRoutes } from './splits.ts';
import { suppliersRoutes } from './suppliers.ts';
import { uploadsRoutes } from './uploads.ts';

/** Every route of the API; OpenAPI and the refusal tests read this list. */
export const allRoutes: readonly RouteDef[] = [
  ...sessionRoutes,
  ...saltsRoutes,
  ...offerImportRoutes,
  ...suppliersRoutes,
  ...uploadsRoutes,
  ...accountsRoutes,
  ...clubsRoutes,
  ...membersRoutes,
  ...invitationsRoutes,
  ...auditRoutes,
  ...outboxRoutes,
  ...noticesRoutes,
  ...pickupRoutes,
  ...buysRoutes,
  ...buyTermsRoutes,
  ...buyPeopleRoutes,
  ...handOnsRoutes,
  ...sheetRoutes,
  ...ledgerRoutes,
  ...ordersRoutes,
  ...billsRoutes,
  ...splitsRoutes,
];

const readFile = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: 10 * 1024 * 1024, files: 1, fields: 20 },
}).single('file');

/** Nobody who isn't signed in makes the server hold a file in memory. */
const upload: RequestHandler = (req, res, next) => {
  if (req.user) readFile(req, res, next);
  else next();
};

/** Router of /api/v1. */
export function apiRouter(): Router {
  const router = Router();
  // A router tries its routes one after the other, so each method has its own.
  const byMethod = new Map<string, Router>();
  for (const route of allRoutes) {
    const handlers: RequestHandler[] = [...route.before];
    if (route.takesFile) handlers.push(upload);
    const own = byMethod.get(route.method) ?? Router();
    byMethod.set(route.method, own);
    own[route.method](route.path, ...handlers, action(route));
  }
  router.use((req, res, next) => {
    const method = req.method === 'HEAD' ? 'get' : req.method.toLowerCase();
    const own = byMethod.get(method);
    if (own) own(req, res, next);
    else next();
  });
  router.use(noSuchRoute);
  return router;
}

import {
  BuyTerms,
  ChargeBody,
  ChargeParams,
  HeadBody,
  LineBody,
  LineChange,
  LineChoices,
  LineOrder,
  LineParams,
  TermsBody,
  TermsReply,
} from '#shared/schemas/buyTerms.ts';
import { buyRoute, type RouteDef } from '../middlewares/route.ts';
import { canOrganiseBuy } from '../policies/buys.ts';
import {
  addCharge,
  changeCharge,
  removeCharge,
  restoreCharge,
} from '../services/buys/changeCharges.ts';
import { changeHead } from '../services/buys/changeHead.ts';
import { addLine, changeLine } from '../services/buys/changeLines.ts';
import { orderLines, removeLine, restoreLine } from '../services/buys/removeLine.ts';
import { listLineChoices, readTerms } from '../services/buys/readTerms.ts';

const allow = canOrganiseBuy;
const reply = TermsReply;

export const buyTermsRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/terms',
    summary:
      "All that a buy's editor shows: lines, their offers, charges, what keeps it from opening",
    reply: BuyTerms,
    allow,
    run: ({ actor }) => readTerms(actor),
  }),
  buyRoute({
    method: 'patch',
    path: '/terms',
    summary: "Change a buy's name, times, place, minimum, price limit and policies",
    body: HeadBody,
    reply,
    allow,
    run: ({ actor, body }) => changeHead(actor, body),
  }),
  buyRoute({
    method: 'get',
    path: '/line-choices',
    summary: 'Salts for a new line, with the reason where one may not be',
    reply: LineChoices,
    allow,
    run: ({ actor }) => listLineChoices(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/lines',
    summary: 'Add a line',
    body: LineBody,
    reply,
    status: 201,
    allow,
    run: ({ actor, body }) => addLine(actor, body),
  }),
  buyRoute({
    method: 'put',
    path: '/lines/order',
    summary: 'Put the lines in an order',
    body: LineOrder,
    reply,
    allow,
    run: ({ actor, body }) => orderLines(actor, body),
  }),
  buyRoute({
    method: 'put',
    path: '/lines/:line',
    summary: "Change a line's offers and policies",
    params: LineParams,
    body: LineChange,
    reply,
    allow,
    run: ({ actor, params, body }) => changeLine(actor, params.line, body),
  }),
  buyRoute({
    method: 'delete',
    path: '/lines/:line',
    summary: 'Take a line out; pledges on it are withdrawn with a notice',
    params: LineParams,
    body: TermsBody,
    reply,
    allow,
    run: ({ actor, params, body }) => removeLine(actor, params.line, body),
  }),
  buyRoute({
    method: 'post',
    path: '/lines/:line/restore',
    summary: 'Put a line back into a draft',
    params: LineParams,
    body: TermsBody,
    reply,
    allow,
    run: ({ actor, params, body }) => restoreLine(actor, params.line, body),
  }),
  buyRoute({
    method: 'post',
    path: '/charges',
    summary: 'Add a charge or rebate',
    body: ChargeBody,
    reply,
    status: 201,
    allow,
    run: ({ actor, body }) => addCharge(actor, body),
  }),
  buyRoute({
    method: 'put',
    path: '/charges/:charge',
    summary: 'Change a charge',
    params: ChargeParams,
    body: ChargeBody,
    reply,
    allow,
    run: ({ actor, params, body }) => changeCharge(actor, params.charge, body),
  }),
  buyRoute({
    method: 'delete',
    path: '/charges/:charge',
    summary: 'Take a charge out',
    params: ChargeParams,
    body: TermsBody,
    reply,
    allow,
    run: ({ actor, params, body }) => removeCharge(actor, params.charge, body),
  }),
  buyRoute({
    method: 'post',
    path: '/charges/:charge/restore',
    summary: 'Put a charge back into a draft',
    params: ChargeParams,
    body: TermsBody,
    reply,
    allow,
    run: ({ actor, params, body }) => restoreCharge(actor, params.charge, body),
  }),
];

import { describeRights } from '#tests/support/rights.ts';
import { ledgerRoutes } from '#server/routes/ledger.ts';

describeRights(
  'ledger',
  (route) => ledgerRoutes.includes(route),
  {
    'GET /clubs/:club/ledger/statement': 'everyone',
    'GET /clubs/:club/ledger/members': ['treasurer'],
    'GET /clubs/:club/ledger/members/:member': ['treasurer'],
    'GET /clubs/:club/ledger/members/:member/payments': ['treasurer'],
    'GET /clubs/:club/ledger/tasks': ['treasurer'],
    'GET /clubs/:club/ledger/journal': ['treasurer'],
    'POST /clubs/:club/payments': ['treasurer'],
    'POST /clubs/:club/payments/confirm': ['treasurer'],
    'POST /clubs/:club/payments/:payment/reverse': ['treasurer'],
    'POST /clubs/:club/refunds': ['treasurer'],
    'GET /clubs/:club/buys/:buy/payments': ['own', 'treasurer'],
    'POST /clubs/:club/buys/:buy/payments': ['own', 'cashHelper'],
    'POST /clubs/:club/buys/:buy/payments/:payment/withdraw': ['own', 'cashHelper'],
  },
  'pickup',
);

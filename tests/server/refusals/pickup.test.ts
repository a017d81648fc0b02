import { describeRights } from '#tests/support/rights.ts';

const desk = ['own', 'treasurer', 'helper', 'cashHelper'] as const;
const hands = ['own', 'helper', 'cashHelper'] as const;

describeRights(
  'pickup',
  (route) => /\/(pickup|handovers|precursors|shelf)(\/|$)/.test(route.path),
  {
    'GET /clubs/:club/buys/:buy/pickup': desk,
    'GET /clubs/:club/buys/:buy/pickup/mine': 'everyone',
    'PUT /clubs/:club/buys/:buy/pickup/mine/slot': [],
    'PUT /clubs/:club/buys/:buy/pickup/mine/proxy': [],
    'POST /clubs/:club/buys/:buy/pickup/pass': hands,
    'POST /clubs/:club/buys/:buy/handovers': hands,
    'DELETE /clubs/:club/buys/:buy/handovers/:handover': hands,
    'POST /clubs/:club/buys/:buy/pickup/slots': ['own'],
    'PUT /clubs/:club/buys/:buy/pickup/slots/:slot': ['own'],
    'DELETE /clubs/:club/buys/:buy/pickup/slots/:slot': ['own'],
    'POST /clubs/:club/buys/:buy/pickup/notices': ['own'],
    'POST /clubs/:club/buys/:buy/pickup/members/:member/reminders': ['own'],
    'POST /clubs/:club/buys/:buy/pickup/members/:member/unclaimed': ['own'],
    'GET /clubs/:club/buys/:buy/precursors': ['own', 'steward'],
    'POST /clubs/:club/buys/:buy/precursors/losses': ['own', 'steward'],
    'GET /clubs/:club/precursors': ['steward'],
    'GET /clubs/:club/shelf': 'everyone',
    'PUT /clubs/:club/shelf/:stock': ['organiser', 'own'],
    'POST /clubs/:club/shelf/:stock/sales': 'everyone',
    'DELETE /clubs/:club/shelf/sales/:sale': 'everyone',
  },
  'pickup',
);
